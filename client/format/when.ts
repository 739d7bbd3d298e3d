/** Instants in the shop's zone, in words. Every function takes the zone: the reader may sit elsewhere. */

const PARTS: Intl.DateTimeFormatOptions = {
  year: 'numeric',
  month: '2-digit',
  day: '2-digit',
  hour: '2-digit',
  minute: '2-digit',
  second: '2-digit',
  hourCycle: 'h23',
};

const formatters = new Map<string, Intl.DateTimeFormat>();

function formatterOf(zone: string, options: Intl.DateTimeFormatOptions) {
  const key = `${zone} ${JSON.stringify(options)}`;
  const known = formatters.get(key);
  if (known) return known;
  const made = new Intl.DateTimeFormat('en-GB', { ...options, timeZone: zone });
  formatters.set(key, made);
  return made;
}

function partsAt(atMs: number, zone: string) {
  const parts = formatterOf(zone, PARTS).formatToParts(atMs);
  const part = (type: Intl.DateTimeFormatPartTypes) =>
    parts.find((candidate) => candidate.type === type)?.value ?? '';
  return {
    day: `${part('year')}-${part('month')}-${part('day')}`,
    clock: `${part('hour')}:${part('minute')}`,
    hour: Number(part('hour')),
    minute: part('minute'),
    second: part('second'),
  };
}

/** The day in the shop's zone, `2026-03-04`. */
export function dayOf(atMs: number, zone: string): string {
  return partsAt(atMs, zone).day;
}

/** The clock in the shop's zone as a time field wants it, `16:30`. */
export function clockOf(atMs: number, zone: string): string {
  return partsAt(atMs, zone).clock;
}

/** "4:30". Each figure stands for one hour of the working day, 7 in the morning to 6:59; others say am or pm. */
export function timeWords(atMs: number, zone: string): string {
  const { hour, minute } = partsAt(atMs, zone);
  const shown = `${hour % 12 || 12}:${minute}`;
  if (hour >= 7 && hour < 19) return shown;
  return `${shown} ${hour < 12 ? 'am' : 'pm'}`;
}

/** "28 Apr", with the year where it is not this one. */
export function dateWords(atMs: number, zone: string, nowMs: number): string {
  const isThisYear = dayOf(atMs, zone).slice(0, 4) === dayOf(nowMs, zone).slice(0, 4);
  return formatterOf(zone, {
    day: 'numeric',
    month: 'short',
    ...(!isThisYear && { year: 'numeric' }),
  }).format(atMs);
}

/** "Tuesday 28 April". */
export function longDateWords(atMs: number, zone: string): string {
  return formatterOf(zone, { weekday: 'long', day: 'numeric', month: 'long' })
    .format(atMs)
    .replace(',', '');
}

const DAY_MS = 86_400_000;

/** Whole days from one day in the shop's zone to another; −1 is yesterday. */
export function daysBetween(fromMs: number, toMs: number, zone: string): number {
  const midnight = (atMs: number) => Date.parse(`${dayOf(atMs, zone)}T00:00:00Z`);
  return Math.round((midnight(toMs) - midnight(fromMs)) / DAY_MS);
}

/** "today", "tomorrow", "yesterday", else "28 Apr". */
export function dayWords(atMs: number, zone: string, nowMs: number): string {
  const days = daysBetween(nowMs, atMs, zone);
  if (days === 0) return 'today';
  if (days === 1) return 'tomorrow';
  return days === -1 ? 'yesterday' : dateWords(atMs, zone, nowMs);
}

/** "today, 4:30". */
export function momentWords(atMs: number, zone: string, nowMs: number): string {
  return `${dayWords(atMs, zone, nowMs)}, ${timeWords(atMs, zone)}`;
}

/**
 * The instant of a wall clock in the shop's zone.
 *
 * @param day `2026-03-04`
 * @param clock `16:30`
 * @returns null where either is not readable. A clock that the zone skips in spring moves on by the hour skipped;
 *   of one that comes twice in autumn, the first.
 */
export function instantAt(day: string, clock: string, zone: string): number | null {
  const asUtcMs = Date.parse(`${day}T${clock}:00Z`);
  if (Number.isNaN(asUtcMs)) return null;
  const offsetAt = (atMs: number) => {
    const { day: zoneDay, clock: zoneClock, second } = partsAt(atMs, zone);
    return Date.parse(`${zoneDay}T${zoneClock}:${second}Z`) - Math.floor(atMs / 1000) * 1000;
  };
  const before = asUtcMs - offsetAt(asUtcMs - DAY_MS);
  const after = asUtcMs - offsetAt(asUtcMs + DAY_MS);
  const isExact = (atMs: number) => atMs + offsetAt(atMs) === asUtcMs;
  return isExact(before) || !isExact(after) ? before : after;
}

/** "3:47" for a span of seconds; "1:02:05" from an hour on. */
export function spanWords(spanS: number): string {
  const wholeS = Math.round(spanS);
  const hours = Math.floor(wholeS / 3600);
  const minutes = Math.floor((wholeS % 3600) / 60);
  const seconds = String(wholeS % 60).padStart(2, '0');
  return hours > 0
    ? `${hours}:${String(minutes).padStart(2, '0')}:${seconds}`
    : `${minutes}:${seconds}`;
}
