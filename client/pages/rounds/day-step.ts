const DAY_MS = 86_400_000;

/** The day so many days on, `2026-03-04`; a calendar's day, whatever the zone. */
export function stepDay(day: string, days: number): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + days * DAY_MS).toISOString().slice(0, 10);
}

/** "Tuesday 28 April"; with the year where it is not that of `today`. */
export function dayHeading(day: string, today: string): string {
  const words = new Intl.DateTimeFormat('en-GB', {
    timeZone: 'UTC',
    weekday: 'long',
    day: 'numeric',
    month: 'long',
    ...(day.slice(0, 4) !== today.slice(0, 4) && { year: 'numeric' }),
  });
  return words.format(Date.parse(`${day}T00:00:00Z`)).replace(',', '');
}
