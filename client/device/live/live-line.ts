import type { LiveValue } from '#shared/probes/live/live-value.ts';
import type { LiveProbe, LiveReading, LiveState, Silence } from './live-probe.ts';

const NOTHING: Silence = { count: 0, why: null };

/** What every live probe has: a state, its listeners, and readings that go out. */
export function createLiveLine(nowMs: () => number) {
  let state: LiveState = { is: 'connecting' };
  let silence = NOTHING;
  const watchers = new Set<() => void>();
  const readers = new Set<(reading: LiveReading) => void>();

  function tell(): void {
    for (const each of watchers) each();
  }

  return {
    state: () => state,
    show(next: LiveState): void {
      state = next;
      tell();
    },
    /** What a message said, now. */
    take(value: LiveValue | { none: 'unread' }): void {
      if ('none' in value) {
        silence = { count: silence.count + 1, why: value.none };
        return tell();
      }
      const reading = { temp: value.temp, unit: value.unit, monoMs: nowMs() };
      if (silence.count > 0) {
        silence = NOTHING;
        tell();
      }
      for (const each of readers) each(reading);
    },
    /** The part of a probe that is the same for all. */
    shared: {
      state: () => state,
      silence: () => silence,
      subscribe(watcher) {
        watchers.add(watcher);
        return () => void watchers.delete(watcher);
      },
      onReading(reader) {
        readers.add(reader);
        return () => void readers.delete(reader);
      },
    } satisfies Partial<LiveProbe>,
  };
}
