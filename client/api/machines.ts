import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import {
  machinePageSchema,
  machineSchema,
  type MachinePage,
  type NewFittedPart,
  type NewMachine,
  type NewSpecifiedRating,
  type RemovedPart,
} from '#shared/schemas/homes.ts';
import { runCardSchema } from '#shared/schemas/runs.ts';
import { fetchJson, postJson, putJson } from './http.ts';

export function machineQuery(id: string) {
  return queryOptions({
    queryKey: ['machines', id],
    queryFn: ({ signal }) => fetchJson(machinePageSchema, `/api/machines/${id}`, { signal }),
    meta: { url: `/api/machines/${id}` },
  });
}

/** Every run of a machine, newest first. */
export function machineRunsQuery(id: string) {
  return queryOptions({
    queryKey: ['machines', id, 'runs'],
    queryFn: ({ signal }) =>
      fetchJson(z.array(runCardSchema), `/api/machines/${id}/runs`, { signal }),
    meta: { url: `/api/machines/${id}/runs` },
  });
}

/** Clean runs to go by. Only laid by here: the stopwatch reads them, and checks them when it does. */
export function machineReferencesQuery(id: string) {
  const url = `/api/machines/${id}/references`;
  return queryOptions({
    queryKey: ['machines', id, 'references'],
    queryFn: ({ signal }) => fetchJson(z.array(z.unknown()), url, { signal }),
    meta: { url },
  });
}

export function useAddMachine() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (machine: NewMachine) => postJson(machineSchema, '/api/machines', machine),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: ['homes'] }),
  });
}

export function useChangeMachine(id: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (machine: NewMachine) => putJson(machineSchema, `/api/machines/${id}`, machine),
    onSuccess: () =>
      Promise.all(
        ['homes', 'machines', 'jobs'].map((noun) =>
          queryClient.invalidateQueries({ queryKey: [noun] }),
        ),
      ),
  });
}

/** Each of these answers with the whole machine. */
function useMachineChange<Change>(id: string, send: (change: Change) => Promise<MachinePage>) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: (machine) => queryClient.setQueryData(machineQuery(id).queryKey, machine),
  });
}

export function useSpecifyRating(id: string) {
  return useMachineChange(id, (specified: NewSpecifiedRating) =>
    putJson(machinePageSchema, `/api/machines/${id}/specified`, specified),
  );
}

export function useFitPart(id: string) {
  return useMachineChange(id, (part: NewFittedPart) =>
    postJson(machinePageSchema, `/api/machines/${id}/parts`, part),
  );
}

type PartRemoval = RemovedPart & { partId: string };

export function useRemovePart(id: string) {
  return useMachineChange(id, ({ partId, ...removal }: PartRemoval) =>
    postJson(machinePageSchema, `/api/machines/${id}/parts/${partId}/remove`, removal),
  );
}
