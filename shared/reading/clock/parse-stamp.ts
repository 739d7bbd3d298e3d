/** Times are counted in whole microseconds, which a double holds exactly for 285 years. */
export const TICKS_PER_S = 1_000_000;
export const TICKS_PER_DAY = 86_400 * TICKS_PER_S;

export type DateOrder = 'ymd' | 'dmy' | 'mdy';

/** A stamp as written: microseconds of the wall clock since 1970-01-01, and what its zone adds. */
export type Stamp = { wallTicks: number; offsetTicks: number };

const MONTHS: Record<string, number> = {};
const MONTH_NAMES = [
  'jan january janvier januar januari enero gennaio janeiro ene',
  'feb february février fevrier fév februar februari febrero febbraio fevereiro',
  'mar march mars märz marz mrz maart marzo março mär mrt',
  'apr april avril avr abril aprile abr',
  'may mai mei mayo maggio maio',
  'jun june juin juni junio giugno junho',
  'jul july juillet juil juli julio luglio julho',
  'aug august août aout aoû augustus agosto ago',
  'sep sept september septembre septiembre settembre setembro',
  'oct october octobre oktober okt octubre ottobre outubro out',
  'nov november novembre noviembre novembro',
  'dec december décembre decembre déc dezember dez diciembre dicembre dezembro dic',
];
MONTH_NAMES.forEach((names, i) => {
  for (const name of names.split(' ')) MONTHS[name] = i + 1;
});

const WORD = '([A-Za-zÀ-ÿ]{3,})\\.?';
const YEAR_FIRST = /^(\d{4})([-/.])(\d{1,2})\2(\d{1,2})/;
const COMPACT = /^(\d{4})(\d{2})(\d{2})(?!\d{1,5}(?:\D|$))(?!\d{7})/;
const NUMERIC = /^(\d{1,2})([-/. ])(\d{1,2})\2(\d{4}|\d{2})(?!\d)/;
const DAY_NAME = new RegExp(
  `^(\\d{1,2})(?:st|nd|rd|th)?[-/. ]{1,2}${WORD}[-/., ]{1,2}(\\d{4}|\\d{2})(?!\\d)`,
);
const NAME_DAY = new RegExp(`^${WORD}[-/. ]{1,2}(\\d{1,2})(?:st|nd|rd|th)?,?[-/. ]{1,2}(\\d{4})`);
const WEEKDAY = /^(?:mon|tue|wed|thu|fri|sat|sun)[a-z]*\.?,?\s+/i;
const CLOCK =
  /^(\d{1,2}):(\d{2})(?::(\d{2})(?:[.,:](\d{1,9}))?)?(?:\s*([ap])\.?\s?m\.?)?(?![\d:])\s*(.*)$/i;
const COMPACT_CLOCK = /^(\d{2})(\d{2})(\d{2})(?:[.,](\d{1,9}))?\s*(.*)$/;
const ZONE = /^(?:(z|utc|gmt)|(?:utc|gmt)?([+-])(\d{2}):?(\d{2})?)$/i;

/**
 * A date with a time of day, in any common writing.
 *
 * @param order what the first numbers of an all-numeric date mean where the year does not come first
 * @returns null where the text is not such a stamp or names no real day or time
 */
export function parseStamp(text: string, order: DateOrder): Stamp | null {
  const rest = text.replace(WEEKDAY, '');
  const date = parseDate(rest, order);
  if (date === null) return null;
  const clock = parseClock(rest.slice(date.length).replace(/^(?:[ ,_]+|\s*[T_-]\s*)/i, ''));
  if (clock === null) return null;
  return { wallTicks: date.days * TICKS_PER_DAY + clock.ticks, offsetTicks: clock.offsetTicks };
}

/** A date alone: days since 1970-01-01 and how much of the text it took. */
export function parseDate(text: string, order: DateOrder): { days: number; length: number } | null {
  const iso = YEAR_FIRST.exec(text) ?? null;
  if (iso) return dated(+iso[1]!, +iso[3]!, +iso[4]!, iso[0].length);
  const numeric = NUMERIC.exec(text);
  if (numeric)
    return numericDate(+numeric[1]!, +numeric[3]!, numeric[4]!, order, numeric[0].length);
  const compact = COMPACT.exec(text);
  if (compact) return dated(+compact[1]!, +compact[2]!, +compact[3]!, compact[0].length);
  const dayName = DAY_NAME.exec(text);
  if (dayName) {
    const month = MONTHS[dayName[2]!.toLowerCase()];
    return month ? dated(fullYear(dayName[3]!), month, +dayName[1]!, dayName[0].length) : null;
  }
  const nameDay = NAME_DAY.exec(text);
  const month = nameDay ? MONTHS[nameDay[1]!.toLowerCase()] : undefined;
  return nameDay && month ? dated(+nameDay[3]!, month, +nameDay[2]!, nameDay[0].length) : null;
}

function numericDate(
  first: number,
  second: number,
  third: string,
  order: DateOrder,
  length: number,
) {
  if (order === 'dmy') return dated(fullYear(third), second, first, length);
  if (order === 'mdy') return dated(fullYear(third), first, second, length);
  return third.length === 2 ? dated(2000 + first, second, +third, length) : null;
}

function dated(year: number, month: number, day: number, length: number) {
  const days = daysOf(year, month, day);
  return Number.isNaN(days) ? null : { days, length };
}

/** Two digits: 1970 to 2069. */
export function fullYear(digits: string): number {
  const year = Number(digits);
  if (digits.length > 2) return year;
  return year < 70 ? 2000 + year : 1900 + year;
}

/** A time of day with what may follow it: microseconds since midnight, and what its zone adds. */
export function parseClock(text: string): { ticks: number; offsetTicks: number } | null {
  const match = CLOCK.exec(text);
  const compact = match ? null : COMPACT_CLOCK.exec(text);
  const [hours, minutes, seconds, fraction, half, zone] = match
    ? [match[1]!, match[2]!, match[3], match[4], match[5], match[6]!]
    : compact
      ? [compact[1]!, compact[2]!, compact[3], compact[4], undefined, compact[5]!]
      : [];
  if (hours === undefined || minutes === undefined) return null;
  const offsetTicks = zone ? parseZone(zone) : 0;
  const ticks = clockTicks(+hours, +minutes, +(seconds ?? 0), fraction, half);
  return ticks === null || offsetTicks === null ? null : { ticks, offsetTicks };
}

function clockTicks(h: number, m: number, s: number, fraction?: string, half?: string) {
  if (m > 59 || s > 60 || h > 24 || (h === 24 && (m > 0 || s > 0))) return null;
  let hours = h;
  if (half) {
    if (h < 1 || h > 12) return null;
    hours = (h % 12) + (half.toLowerCase() === 'p' ? 12 : 0);
  }
  return (hours * 3600 + m * 60 + s) * TICKS_PER_S + fractionTicks(fraction);
}

/** Digits after the point as microseconds; finer digits are rounded. */
export function fractionTicks(fraction: string | undefined): number {
  if (!fraction) return 0;
  return fraction.length <= 6
    ? Number(fraction) * 10 ** (6 - fraction.length)
    : Math.round(Number(fraction) / 10 ** (fraction.length - 6));
}

function parseZone(text: string): number | null {
  const zone = ZONE.exec(text.trim());
  if (!zone) return null;
  if (zone[1]) return 0;
  const minutes = Number(zone[3]) * 60 + Number(zone[4] ?? 0);
  return (zone[2] === '-' ? -minutes : minutes) * 60 * TICKS_PER_S;
}

const DAYS_IN_MONTH = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

/** Days since 1970-01-01 of a day of the Gregorian calendar; NaN where there is no such day. */
export function daysOf(year: number, month: number, day: number): number {
  if (month < 1 || month > 12 || day < 1) return NaN;
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  if (day > DAYS_IN_MONTH[month - 1]! + (leap && month === 2 ? 1 : 0)) return NaN;
  // years from March, so that a leap day is a year's last
  const y = month > 2 ? year : year - 1;
  const era = Math.floor(y / 400);
  const ofEra = y - era * 400;
  const ofYear = Math.floor((153 * (month + (month > 2 ? -3 : 9)) + 2) / 5) + day - 1;
  return (
    era * 146_097 + ofEra * 365 + Math.floor(ofEra / 4) - Math.floor(ofEra / 100) + ofYear - 719_468
  );
}
