import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useSyncExternalStore } from 'react';
import type { Rounds } from '#shared/schemas/jobs.ts';
import { asOf } from '../../device/as-of.ts';

/**
 * Lays a person's day by for places without a signal. `visits` null: not somebody's own day.
 */
export function usePreparedDay(visits: Rounds['visits'] | null): void {
  const queryClient = useQueryClient();
  const isAway = useSyncExternalStore(asOf.subscribe, () => asOf.times().size > 0);
  useEffect(() => {
    if (!visits || isAway) return;
    const stop = new AbortController();
    // Behind what the page itself needs, and in a chunk of its own.
    void import('./prepare-day.ts').then(({ prepareDay }) =>
      prepareDay(queryClient, visits, stop.signal),
    );
    return () => stop.abort();
  }, [queryClient, visits, isAway]);
}
