import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { probeSchema, type NewProbe } from '#shared/schemas/ratings.ts';
import { fetchJson, postJson, putJson } from './http.ts';

export function probesQuery() {
  return queryOptions({
    queryKey: ['probes'],
    queryFn: ({ signal }) => fetchJson(z.array(probeSchema), '/api/probes', { signal }),
    meta: { url: '/api/probes' },
  });
}

/** Adds a probe, or changes the one with this id. */
export function useSaveProbe(id: string | null) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (probe: NewProbe) =>
      id === null
        ? postJson(probeSchema, '/api/probes', probe)
        : putJson(probeSchema, `/api/probes/${id}`, probe),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: ['probes'] }),
  });
}
