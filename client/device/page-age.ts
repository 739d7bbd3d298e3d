import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import { useCallback, useSyncExternalStore } from 'react';
import { asOf } from './as-of.ts';

/** When the oldest answer on the page was given, where it came from this device; null: all is from the server. */
export function usePageAge(): number | null {
  const queryClient = useQueryClient();
  const subscribe = useCallback(
    (tell: () => void) => {
      const stops = [asOf.subscribe(tell), queryClient.getQueryCache().subscribe(tell)];
      return () => stops.forEach((stop) => stop());
    },
    [queryClient],
  );
  return useSyncExternalStore(subscribe, () => oldestOnPage(queryClient));
}

function oldestOnPage(queryClient: QueryClient): number | null {
  const times = queryClient
    .getQueryCache()
    .findAll({ type: 'active' })
    .flatMap(({ meta }) => asOf.times().get(String(meta?.['url'])) ?? []);
  return times.length === 0 ? null : Math.min(...times);
}

/** Asks the server again for everything that came from this device. */
export function askAgain(queryClient: QueryClient, urls = [...asOf.times().keys()]): void {
  if (urls.length === 0) return;
  void queryClient.invalidateQueries({
    predicate: ({ meta }) => urls.includes(String(meta?.['url'])),
  });
}
