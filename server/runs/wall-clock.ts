/**
 * The instant at which a clock in `zone` shows `stamp` ("2026-03-04 10:15:00"), ms since 1970.
 * In the hour that a clock change repeats, the first; undefined where the stamp is no date and time.
 */
export function wallClockMs(stamp: string, zone: string): number | undefined {
  const asUtcMs = Date.parse(`${stamp.replace(' ', 'T')}Z`);
  if (Number.isNaN(asUtcMs)) return undefined;
  // The zone's offset is looked up where it is guessed to be, then once more where that leads.
  const guessMs = asUtcMs - offsetMs(asUtcMs, zone);
  return asUtcMs - offsetMs(guessMs, zone);
}

function offsetMs(atMs: number, zone: string): number {
  const format = new Intl.DateTimeFormat('en-US', {
    timeZone: zone,
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
  });
  const parts = new Map(format.formatToParts(atMs).map(({ type, value }) => [type, Number(value)]));
  const part = (name: Intl.DateTimeFormatPartTypes) => parts.get(name) ?? 0;
  const shown = [part('hour'), part('minute'), part('second')] as const;
  const shownMs = Date.UTC(part('year'), part('month') - 1, part('day'), ...shown);
  return shownMs - Math.floor(atMs / 1000) * 1000;
}
