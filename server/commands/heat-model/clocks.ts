/** How the time of a reading is written. Wall clocks have no zone: a run needs none. */
export type Clock =
  | 'iso'
  | 'iso-zulu'
  | 'iso-space'
  | 'day-first-dots'
  | 'day-first-slashes'
  | 'month-first'
  | 'month-first-12h'
  | 'two-columns-iso'
  | 'two-columns-month-first'
  | 'time-of-day'
  | 'seconds'
  | 'm:ss'
  | 'h:mm:ss';

/** The cells of one stamp: one, or two where date and time stand in columns of their own. */
export function stampCells(clock: Clock, startMs: number, timeS: number): string[] {
  const at = new Date(startMs + Math.round(timeS * 1000));
  const year = String(at.getUTCFullYear());
  const month = two(at.getUTCMonth() + 1);
  const day = two(at.getUTCDate());
  const time = `${two(at.getUTCHours())}:${two(at.getUTCMinutes())}:${two(at.getUTCSeconds())}`;
  const date = `${year}-${month}-${day}`;
  switch (clock) {
    case 'iso':
      return [`${date}T${time}`];
    case 'iso-zulu':
      return [`${date}T${time}Z`];
    case 'iso-space':
      return [`${date} ${time}`];
    case 'day-first-dots':
      return [`${day}.${month}.${year} ${time}`];
    case 'day-first-slashes':
      return [`${day}/${month}/${year} ${time}`];
    case 'month-first':
      return [`${month}/${day}/${year} ${time}`];
    case 'month-first-12h':
      return [`${month}/${day}/${year} ${twelveHours(at)}`];
    case 'two-columns-iso':
      return [date, time];
    case 'two-columns-month-first':
      return [`${month}/${day}/${year}`, twelveHours(at)];
    case 'time-of-day':
      return [time];
    case 'seconds':
      return [String(Math.round(timeS * 10) / 10)];
    case 'm:ss':
      return [`${Math.floor(timeS / 60)}:${two(Math.floor(timeS % 60))}`];
    case 'h:mm:ss':
      return [
        `${Math.floor(timeS / 3600)}:${two(Math.floor(timeS / 60) % 60)}:${two(Math.floor(timeS % 60))}`,
      ];
  }
}

function twelveHours(at: Date): string {
  const hours = at.getUTCHours();
  const tail = `${two(at.getUTCMinutes())}:${two(at.getUTCSeconds())} ${hours < 12 ? 'AM' : 'PM'}`;
  return `${hours % 12 === 0 ? 12 : hours % 12}:${tail}`;
}

function two(number: number): string {
  return String(number).padStart(2, '0');
}
