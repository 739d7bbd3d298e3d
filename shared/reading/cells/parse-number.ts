import type { TemperatureUnit } from '../../units.ts';
import { CELL_SIGNAL, cellSignalFactor } from '../signals/find-signal.ts';
import { CELL_UNIT, cellUnit } from './find-unit.ts';

export type Decimal = '.' | ',';

/** What one cell says as a number. `open`: the sensor, or a tool, says that there is no reading. */
export type NumberCell =
  | { kind: 'number'; value: number; unit: TemperatureUnit | null }
  | { kind: 'open' }
  | { kind: 'empty' }
  | { kind: 'too-large' }
  | { kind: 'text' };

/** Words for "no reading" that loggers, meters, spreadsheets and programs write. */
const OPEN_WORDS = new Set(
  (
    'ol o.l o.l. -ol +ol ovl ovf over overload overrange over-range open opn err error e fail fault nc n/c n.c. ' +
    'nan -nan +nan nan(ind) -nan(ind) inf +inf -inf infinity -infinity #n/a n/a na #na #value! #ref! #div/0! #num! ' +
    'null none nil no nd n.d. disconnected unplugged lost missing invalid bad short under udf underrange'
  ).split(' '),
);
const OPEN_PHRASE =
  /^(sensor|probe|no|open|tc|thermocouple)[ -](open|probe|sensor|error|fault|data|reading|tc|circuit|signal)$/;

const EMPTY: NumberCell = { kind: 'empty' };
const OPEN: NumberCell = { kind: 'open' };
const TEXT: NumberCell = { kind: 'text' };
const TOO_LARGE: NumberCell = { kind: 'too-large' };

/**
 * A cell as a number, by every form that a logger writes: sign, decimal mark, grouping, exponent, unit.
 *
 * @param decimal the file's decimal mark; a lone mark that cannot be grouping is read either way
 */
export function parseNumber(cell: string, decimal: Decimal): NumberCell {
  const text = plain(cell);
  if (text === '' || /^[.\-_]$/.test(text)) return EMPTY;
  const bare = parseBare(text, decimal, null);
  if (bare !== TEXT) return bare;
  if (isOpenWord(text)) return OPEN;
  const unit = CELL_UNIT.exec(text);
  return unit && unit.index > 0
    ? parseBare(text.slice(0, unit.index), decimal, cellUnit(unit))
    : parseSignal(text, decimal);
}

/** "1.203 mV", "9.8 kΩ": in mV or ohm. */
function parseSignal(text: string, decimal: Decimal): NumberCell {
  const signal = CELL_SIGNAL.exec(text);
  if (!signal || signal.index === 0) return TEXT;
  const bare = parseBare(text.slice(0, signal.index), decimal, null);
  if (bare.kind !== 'number') return bare;
  return { ...bare, value: bare.value * cellSignalFactor(signal) };
}

export function isOpenWord(text: string): boolean {
  const word = text.toLowerCase();
  return OPEN_WORDS.has(word) || /^[-.*]{2,}$/.test(word) || OPEN_PHRASE.test(word);
}

function parseBare(text: string, decimal: Decimal, unit: TemperatureUnit | null): NumberCell {
  const digits = withPoint(text, decimal);
  if (digits === null || !/^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(digits)) return TEXT;
  const value = Number(digits);
  return Number.isFinite(value) ? { kind: 'number', value, unit } : TOO_LARGE;
}

/** The same number with a point and no grouping; null where its marks make no sense. */
function withPoint(text: string, decimal: Decimal): string | null {
  let digits = text;
  if (/[ '’]/.test(digits)) {
    if (!/^[+-]?\d{1,3}([ '’]\d{3})+([.,]\d*)?$/.test(digits)) return null;
    digits = digits.replace(/[ '’]/g, '');
  }
  const point = digits.indexOf('.');
  const comma = digits.indexOf(',');
  if (comma < 0 && (point < 0 || decimal === '.')) return digits;
  if (point < 0 && comma >= 0 && decimal === ',') {
    return digits.indexOf(',', comma + 1) < 0 ? digits.replace(',', '.') : ungroup(digits, ',');
  }
  if (point >= 0 && comma >= 0) return point < comma ? mixed(digits, '.') : mixed(digits, ',');
  // only the other mark: grouping where it can be, else the odd decimal mark of a single cell
  const mark = point >= 0 ? '.' : ',';
  return (
    ungroup(digits, mark) ?? (digits.split(mark).length === 2 ? digits.replace(mark, '.') : null)
  );
}

/** "0,125" groups nothing. */
function ungroup(digits: string, mark: Decimal): string | null {
  const grouped = mark === '.' ? /^[+-]?[1-9]\d{0,2}(\.\d{3})+$/ : /^[+-]?[1-9]\d{0,2}(,\d{3})+$/;
  return grouped.test(digits) ? digits.replaceAll(mark, '') : null;
}

function mixed(digits: string, grouping: Decimal): string | null {
  const shape = grouping === '.' ? /^[+-]?\d{1,3}(\.\d{3})+,\d*$/ : /^[+-]?\d{1,3}(,\d{3})+\.\d*$/;
  return shape.test(digits) ? digits.replaceAll(grouping, '').replace(',', '.') : null;
}

/** No plain number is written so. */
const ODD_FORM = 99;

/** How many decimals a cell's number is written with; a number with an exponent has none of a plain form. */
export function decimalsOf(cell: string, decimal: Decimal): number {
  const text = plain(cell);
  if (/\de[+-]?\d/i.test(text)) return ODD_FORM;
  const mark = text.lastIndexOf(decimal);
  if (mark < 0) return /\d[.,]\d/.test(text) ? ODD_FORM : 0;
  let digits = 0;
  while (/\d/.test(text[mark + 1 + digits] ?? '')) digits++;
  return digits === 0 ? ODD_FORM : digits;
}

/** Foreign digits, minus signs and spaces as ASCII. */
export function plain(cell: string): string {
  const text = cell.trim();
  for (let i = 0; i < text.length; i++) {
    if (text.charCodeAt(i) > 126) return toAscii(text);
  }
  return text;
}

function toAscii(text: string): string {
  return text
    .replace(/[\u2212\u2013\u2014\uFF0D\uFE63]/g, '-')
    .replace(/[\u00A0\u2007\u2009\u202F\u3000]/g, ' ')
    .replace(/[\uFF10-\uFF19]/g, (c) => String(c.charCodeAt(0) - 0xff10))
    .replace(/[\u0660-\u0669]/g, (c) => String(c.charCodeAt(0) - 0x660))
    .replace(/[\u06F0-\u06F9]/g, (c) => String(c.charCodeAt(0) - 0x6f0))
    .replace(/[\uFF0E\u066B]/g, '.')
    .trim();
}
