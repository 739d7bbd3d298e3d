import { parseStamp, type DateOrder } from './parse-stamp.ts';

const ANSWERS: Record<string, DateOrder> = {
  'day-first': 'dmy',
  'month-first': 'mdy',
  'year-first': 'ymd',
};
const ENOUGH = 0.9;

/** The answer's name of an order. */
export function orderAnswer(order: DateOrder): string {
  return order === 'dmy' ? 'day-first' : order === 'mdy' ? 'month-first' : 'year-first';
}

export const DATE_ORDER_ANSWERS = Object.keys(ANSWERS);

/** Date orders under which nearly all of the stamps are real dates; the first is to be tried first. */
export function dateOrders(stamps: string[], answer: string | undefined): DateOrder[] {
  const answered = answer === undefined ? undefined : ANSWERS[answer];
  if (answered) return [answered];
  if (stamps.some((text) => isOrderFree(text))) return ['ymd'];
  const orders = (['dmy', 'mdy'] as const).filter((order) => fits(stamps, order));
  if (orders.length === 0) return fits(stamps, 'ymd') ? ['ymd'] : [];
  return yearMayLead(stamps) ? [...orders, 'ymd'] : orders;
}

/** The year comes first, or the month is a word. */
function isOrderFree(text: string): boolean {
  return /^\d{4}[-/.]|^(19|20)\d{6}|[A-Za-zÀ-ÿ]{3}/.test(text);
}

function fits(stamps: string[], order: DateOrder): boolean {
  const filled = stamps.filter((text) => text.trim() !== '');
  const right = filled.filter((text) => parseStamp(text, order) !== null).length;
  return filled.length > 0 && right >= filled.length * ENOUGH && notBeyondTwelve(filled, order);
}

/** One real date that only the other order can read settles it. */
function notBeyondTwelve(stamps: string[], order: DateOrder): boolean {
  const other = order === 'dmy' ? 'mdy' : 'dmy';
  return stamps.every((text) => parseStamp(text, order) || !parseStamp(text, other));
}

/** "26/05/04" to "26/05/05": the last number runs while the first stands still, as a day would. */
function yearMayLead(stamps: string[]): boolean {
  const first = new Set<string>();
  const third = new Set<string>();
  for (const text of stamps) {
    const match = /^(\d{2})[-/.]\d{2}[-/.](\d{2})(?!\d)/.exec(text);
    if (!match) return false;
    first.add(match[1]!);
    third.add(match[2]!);
  }
  return first.size === 1 && third.size > 1 && fits(stamps, 'ymd');
}

/** How stamps are written, in words for people. */
export function orderWords(order: DateOrder, stamps: string[]): string {
  const sample = stamps.find((text) => text.trim() !== '') ?? '';
  if (/^\d{4}-\d{2}-\d{2}/.test(sample)) return 'ISO 8601';
  if (/[A-Za-zÀ-ÿ]{3}/.test(sample.replace(/\b(utc|gmt)\b/i, ''))) return 'dates with month names';
  if (order === 'ymd') return 'year first';
  return order === 'dmy' ? 'day first' : 'month first';
}
