import fc from 'fast-check';
import { inUtf16, inWindows1252 } from './read-text.ts';

/** One way to write a log. */
export type Writing = {
  encoding: 'utf-8' | 'utf-8-mark' | 'utf-16le' | 'utf-16be' | 'windows-1252';
  delimiter: ',' | ';' | '\t' | '|';
  decimal: '.' | ',';
  end: '\n' | '\r\n' | '\r';
  clock:
    | 'seconds'
    | 'minutes-and-seconds'
    | 'hours'
    | 'iso'
    | 'iso-zone'
    | 'space'
    | 'day-first'
    | 'two-columns'
    | 'twelve-hour'
    | 'month-names'
    | 'unix-ms';
  unitIn: 'header' | 'unit row' | 'cells' | 'preamble';
  quoted: boolean;
  extraColumn: boolean;
  lastLineEnd: boolean;
};

export const writingArbitrary: fc.Arbitrary<Writing> = fc
  .record({
    encoding: fc.constantFrom<Writing['encoding']>(
      'utf-8',
      'utf-8-mark',
      'utf-16le',
      'utf-16be',
      'windows-1252',
    ),
    delimiter: fc.constantFrom<Writing['delimiter']>(',', ';', '\t', '|'),
    decimal: fc.constantFrom<Writing['decimal']>('.', ','),
    end: fc.constantFrom<Writing['end']>('\n', '\r\n', '\r'),
    clock: fc.constantFrom<Writing['clock']>(
      'seconds',
      'minutes-and-seconds',
      'hours',
      'iso',
      'iso-zone',
      'space',
      'day-first',
      'two-columns',
      'twelve-hour',
      'month-names',
      'unix-ms',
    ),
    unitIn: fc.constantFrom<Writing['unitIn']>('header', 'unit row', 'cells', 'preamble'),
    quoted: fc.boolean(),
    extraColumn: fc.boolean(),
    lastLineEnd: fc.boolean(),
  })
  // a decimal comma beside commas must be quoted
  .map((writing) =>
    writing.delimiter === ',' && writing.decimal === ',' ? { ...writing, quoted: true } : writing,
  );

const START_MS = Date.UTC(2026, 4, 14, 9, 58, 0);

/** A log in that writing; temperatures keep two decimals, times one. */
export function writeLog(series: { t: number[]; temp: number[] }, writing: Writing): Uint8Array {
  const { delimiter, decimal, clock, unitIn, end } = writing;
  const names =
    clock === 'two-columns'
      ? ['Date', 'Clock']
      : [clock === 'seconds' ? 'Elapsed (s)' : 'Elapsed time'];
  const header = [...names, unitIn === 'header' ? 'Exhaust °F' : 'Exhaust'];
  const lines: string[][] = [];
  if (unitIn === 'preamble') lines.push(['Unit: °F'], []);
  lines.push(writing.extraColumn ? [...header, 'Comment'] : header);
  if (unitIn === 'unit row')
    lines.push([...names.map(() => ''), '°F', ...(writing.extraColumn ? [''] : [])]);
  series.t.forEach((timeS, i) => {
    const number = series.temp[i]!.toFixed(2).replace('.', decimal);
    const cells = [...stampsOf(timeS, writing), unitIn === 'cells' ? `${number} °F` : number];
    lines.push(writing.extraColumn ? [...cells, i === 0 ? 'start' : ''] : cells);
  });
  const text = lines
    .map((cells) =>
      cells.map((cell) => (writing.quoted && cell ? `"${cell}"` : cell)).join(delimiter),
    )
    .join(end);
  return encode(writing.lastLineEnd ? text + end : text, writing.encoding);
}

function stampsOf(timeS: number, { clock, decimal }: Writing): string[] {
  const at = new Date(START_MS + Math.round(timeS * 1000));
  const iso = at.toISOString();
  const day = iso.slice(0, 10);
  const time = iso.slice(11, 21);
  const [year, month, date] = day.split('-');
  switch (clock) {
    case 'seconds':
      return [timeS.toFixed(1).replace('.', decimal)];
    case 'minutes-and-seconds':
      return [`${Math.floor(timeS / 60)}:${(timeS % 60).toFixed(1).padStart(4, '0')}`];
    case 'hours':
      return [
        `${Math.floor(timeS / 3600)}:${new Date(Math.round(timeS * 1000)).toISOString().slice(14, 21)}`,
      ];
    case 'iso':
      return [`${day}T${time}Z`];
    case 'iso-zone':
      return [`${day}T${time}-05:00`];
    case 'space':
      return [`${day} ${time}`];
    case 'day-first':
      return [`${date}.${month}.${year} ${time}`];
    case 'two-columns':
      return [`${month}/${date}/${year}`, time];
    case 'twelve-hour':
      return [`${month}/${date}/${year} ${twelveHours(time)}`];
    case 'month-names':
      return [`${date}-May-${year} ${time}`];
    case 'unix-ms':
      return [String(at.getTime())];
  }
}

function twelveHours(time: string): string {
  const hours = Number(time.slice(0, 2));
  return `${hours % 12 || 12}${time.slice(2)} ${hours < 12 ? 'AM' : 'PM'}`;
}

function encode(text: string, encoding: Writing['encoding']): Uint8Array {
  if (encoding === 'utf-16le') return inUtf16(text, 'le', true);
  if (encoding === 'utf-16be') return inUtf16(text, 'be', true);
  if (encoding === 'windows-1252') return inWindows1252(text);
  return new TextEncoder().encode(encoding === 'utf-8-mark' ? `\ufeff${text}` : text);
}
