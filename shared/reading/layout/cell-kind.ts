import { parseNumber, plain } from '../cells/parse-number.ts';
import { parseClock, parseDate, parseStamp, type DateOrder } from '../clock/parse-stamp.ts';

export type CellKind = 'empty' | 'open' | 'number' | 'stamp' | 'date' | 'time' | 'text';

const ORDERS: DateOrder[] = ['dmy', 'mdy', 'ymd'];
const TIME_SHAPE = /^\d{1,3}:\d{2}(:\d{2}([.,:]\d+)?|[.,]\d+)?(\s*[ap]\.?\s?m\.?)?$/i;
/** 20260504100000 is a stamp, not a number. */
const COMPACT_STAMP = /^(19|20)\d{12}$/;

/** What kind of thing a cell holds, by its looks alone. */
export function cellKind(cell: string): CellKind {
  const text = plain(cell);
  if (text === '') return 'empty';
  if (COMPACT_STAMP.test(text)) return 'stamp';
  const number = parseNumber(text, '.');
  if (number.kind !== 'text') return number.kind === 'too-large' ? 'number' : number.kind;
  if (!/\d/.test(text)) return 'text';
  if (TIME_SHAPE.test(text)) return 'time';
  for (const order of ORDERS) {
    if (parseStamp(text, order)) return 'stamp';
    if (parseDate(text, order)?.length === text.length) return 'date';
  }
  return parseClock(text) && text.includes(':') ? 'time' : 'text';
}

export function isTyped(kind: CellKind): boolean {
  return kind === 'number' || kind === 'stamp' || kind === 'date' || kind === 'time';
}
