const DAY_MS = 86_400_000;

/** The day that an instant falls on in a zone, `2026-03-04`. */
export function dayOf(atMs: number, zone: string): string {
  return new Date(atMs + offsetMs(atMs, zone)).toISOString().slice(0, 10);
}

/**
 * First and last-but-one instant of a day in a zone: half open, 23 to 25 h long where clocks change.
 * Where midnight itself is skipped the day begins when the clocks have moved on.
 */
export function dayBounds(day: string, zone: string): { fromMs: number; toMs: number } {
  const next = new Date(Date.parse(day) + DAY_MS).toISOString().slice(0, 10);
  return { fromMs: midnightMs(day, zone), toMs: midnightMs(next, zone) };
}

function midnightMs(day: string, zone: string): number {
  const asUtcMs = Date.parse(`${day}T00:00:00Z`);
  // The offset is that of the instant looked for, which depends on it: the second look settles it.
  const firstMs = asUtcMs - offsetMs(asUtcMs, zone);
  const secondMs = asUtcMs - offsetMs(firstMs, zone);
  return dayOf(secondMs, zone) === day ? secondMs : firstMs;
}

/** How far the zone's wall clock is ahead of UTC at an instant, ms. */
function offsetMs(atMs: number, zone: string): number {
  const parts = new Intl.DateTimeFormat('en-US', {
    timeZone: zone,
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
  }).formatToParts(atMs);
  const part = (type: string) => Number(parts.find((each) => each.type === type)?.value);
  const wallMs = Date.UTC(
    part('year'),
    part('month') - 1,
    part('day'),
    part('hour'),
    part('minute'),
    part('second'),
  );
  return wallMs - Math.floor(atMs / 1000) * 1000;
}
