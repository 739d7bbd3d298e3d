import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { roundsSchema, visitPageSchema } from '#shared/schemas/jobs.ts';
import { fetchJson, postJson } from './http.ts';

export function visitQuery(id: string) {
  return queryOptions({
    queryKey: ['visits', id],
    queryFn: ({ signal }) => fetchJson(visitPageSchema, `/api/visits/${id}`, { signal }),
  });
}

/** The visits of a day, `2026-03-04` in the shop's zone; null: the server's today. */
export function roundsQuery(day: string | null) {
  return queryOptions({
    queryKey: ['rounds', day],
    queryFn: ({ signal }) =>
      fetchJson(roundsSchema, day === null ? '/api/rounds' : `/api/rounds?day=${day}`, { signal }),
  });
}

/** Ticks the cautions of a visit, now. */
export function useTickSafety(id: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: () => postJson(visitPageSchema, `/api/visits/${id}/safety`),
    onSuccess: (visit) => {
      queryClient.setQueryData(visitQuery(id).queryKey, visit);
      return queryClient.invalidateQueries({ queryKey: ['rounds'] });
    },
  });
}
