import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { sessionSchema, type PasswordChange } from '#shared/schemas/people.ts';
import { readSession, leaveDevice } from '../device/device-session.ts';
import { fetchJson, sendOnly } from './http.ts';

const SESSION_URL = '/api/session';

/** Who is signed in, and the shop; from the device where the server cannot be asked. */
export function sessionQuery() {
  return queryOptions({
    queryKey: ['session'],
    queryFn: ({ signal }) =>
      readSession(
        () => fetchJson(sessionSchema, SESSION_URL, { signal }),
        (answer) => sessionSchema.parse(answer),
      ),
    staleTime: 5 * 60_000,
    meta: { url: SESSION_URL },
  });
}

export function useSignOut() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: () => sendOnly('DELETE', '/api/session'),
    onSuccess: async () => {
      await leaveDevice();
      queryClient.clear();
    },
  });
}

export function useChangePassword() {
  return useMutation({
    mutationFn: (change: PasswordChange) => sendOnly('PUT', '/api/password', change),
  });
}
