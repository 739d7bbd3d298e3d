import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { madeShareSchema, shareSchema } from '#shared/schemas/shares.ts';
import { fetchJson, postJson } from './http.ts';

/** Every link to a run, newest first. */
export function sharesQuery(runId: string) {
  return queryOptions({
    queryKey: ['runs', runId, 'shares'],
    queryFn: ({ signal }) =>
      fetchJson(z.array(shareSchema), `/api/runs/${runId}/shares`, { signal }),
  });
}

/** Makes a link. Its token is in the answer, and nowhere else afterwards. */
export function useMakeShare(runId: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (days: number) => postJson(madeShareSchema, `/api/runs/${runId}/shares`, { days }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: sharesQuery(runId).queryKey }),
  });
}

export function useRevokeShare(runId: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (shareId: string) => postJson(shareSchema, `/api/shares/${shareId}/revoke`),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: sharesQuery(runId).queryKey }),
  });
}
