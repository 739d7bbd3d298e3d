import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { ApiError } from './http.ts';

/** Told to whoever shows the sign-in slip: the server no longer knows who this is. */
export const SIGNED_OUT_EVENT = 'fusekeeper-signed-out';

function tellWhenSignedOut(error: Error) {
  if (isSignedOut(error)) window.dispatchEvent(new Event(SIGNED_OUT_EVENT));
}

export function isSignedOut(error: Error | null) {
  return error instanceof ApiError && error.status === 401 && error.code !== 'wrong-sign-in';
}

/** A refusal stays a refusal; only silence and a broken server are worth another try. */
function isWorthRetrying(failures: number, error: Error) {
  const isRefusal = error instanceof ApiError && error.status > 0 && error.status < 500;
  return failures < 2 && !isRefusal && error.name !== 'ZodError';
}

export function createQueryClient() {
  return new QueryClient({
    queryCache: new QueryCache({ onError: tellWhenSignedOut }),
    mutationCache: new MutationCache({ onError: tellWhenSignedOut }),
    defaultOptions: {
      // Asked even where the browser believes itself offline: the device may have the answer, and the page says so.
      queries: {
        retry: isWorthRetrying,
        staleTime: 10_000,
        networkMode: 'always',
        refetchOnReconnect: 'always',
      },
      mutations: { retry: false, networkMode: 'always' },
    },
  });
}
