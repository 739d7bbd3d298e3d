import type { LiveParts } from '#client/device/live/live-probe.ts';

/** A clock that goes when the test says so. */
export function handClock() {
  let nowMs = 1_000;
  let later: { atMs: number; work: () => void }[] = [];
  const parts: LiveParts = {
    nowMs: () => nowMs,
    after(ms, work) {
      const each = { atMs: nowMs + ms, work };
      later.push(each);
      return () => void (later = later.filter((one) => one !== each));
    },
  };
  return {
    parts,
    nowMs: () => nowMs,
    /** How long until the next thing that is to be done, ms; null: nothing is. */
    nextMs: () => (later.length === 0 ? null : Math.min(...later.map(({ atMs }) => atMs)) - nowMs),
    async pass(ms: number): Promise<void> {
      const toMs = nowMs + ms;
      for (;;) {
        const [due] = later.filter(({ atMs }) => atMs <= toMs).sort((a, b) => a.atMs - b.atMs);
        if (!due) break;
        nowMs = due.atMs;
        later = later.filter((one) => one !== due);
        due.work();
        await settled();
      }
      nowMs = toMs;
      await settled();
    },
  };
}

/** Everything that waits on promises alone is done. */
export function settled(): Promise<void> {
  return new Promise((resolve) => setImmediate(resolve));
}
