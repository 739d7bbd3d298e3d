import { useSyncExternalStore } from 'react';

const MINUTE_MS = 60_000;

function everyMinute(onTick: () => void) {
  const timer = setInterval(onTick, MINUTE_MS);
  return () => clearInterval(timer);
}

/** Now, to the minute: "today" turns into "yesterday" on a page left open. */
export function useNowMs(): number {
  return useSyncExternalStore(everyMinute, () => Math.floor(Date.now() / MINUTE_MS) * MINUTE_MS);
}
