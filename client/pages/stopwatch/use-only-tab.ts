import { useEffect, useState } from 'react';

const LOCK = 'fusekeeper-stopwatch';

/** Whether this tab takes the readings; another one that does is waited for. */
export function useOnlyTab(): 'asking' | 'mine' | 'taken' {
  const [tab, setTab] = useState<'asking' | 'mine' | 'taken'>('asking');
  useEffect(() => {
    let release = () => {};
    const over = new Promise<void>((resolve) => (release = resolve));
    const giveUp = new AbortController();
    void take(
      () => {
        setTab('mine');
        return over;
      },
      setTab,
      giveUp.signal,
    );
    return () => {
      giveUp.abort();
      release();
    };
  }, []);
  return tab;
}

type Held = () => Promise<void>;

async function take(
  hold: Held,
  setTab: (tab: 'taken') => void,
  signal: AbortSignal,
): Promise<void> {
  // Without locks (plain http) the device's own numbering still keeps two tabs from doubling anything.
  if (!('locks' in navigator)) return hold();
  const wasFree = await navigator.locks.request(LOCK, { ifAvailable: true }, async (lock) => {
    if (!lock || signal.aborted) return lock !== null;
    await hold();
    return true;
  });
  if (wasFree || signal.aborted) return;
  setTab('taken');
  await navigator.locks.request(LOCK, { signal }, hold).catch((error: unknown) => {
    if (!signal.aborted) throw error;
  });
}
