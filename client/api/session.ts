import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { sessionSchema, type PasswordChange } from '#shared/schemas/people.ts';
import { fetchJson, sendOnly } from './http.ts';

/** Who is signed in, and the shop. */
export function sessionQuery() {
  return queryOptions({
    queryKey: ['session'],
    queryFn: ({ signal }) => fetchJson(sessionSchema, '/api/session', { signal }),
    staleTime: 5 * 60_000,
  });
}

export function useSignOut() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: () => sendOnly('DELETE', '/api/session'),
    onSuccess: () => queryClient.clear(),
  });
}

export function useChangePassword() {
  return useMutation({
    mutationFn: (change: PasswordChange) => sendOnly('PUT', '/api/password', change),
  });
}
