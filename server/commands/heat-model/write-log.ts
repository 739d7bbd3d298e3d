import { stampCells, type Clock } from './clocks.ts';
import type { Readings } from './take-readings.ts';

/** How a log is laid out on paper. */
export type Layout = {
  clock: Clock;
  delimiter: ',' | ';' | '\t';
  decimal: '.' | ',';
  encoding: 'utf-8' | 'utf-8-bom' | 'utf-16le' | 'windows-1252';
  newline: '\n' | '\r\n';
  preamble: string[];
  /** Names of the columns; one more than stamps and temperature where `notes` or `beside` is given. */
  header: string[];
  /** A second header row that holds the units. */
  unitRow: string[] | null;
  /** Written after each temperature: "138.4 °F". */
  unitInCells: string;
  /** What stands where the sensor said nothing. */
  openWord: string;
  /** Digits after the decimal mark. */
  digits: number;
  /** Every cell in quotes. */
  quoted: boolean;
};

export const PLAIN: Layout = {
  clock: 'iso',
  delimiter: ',',
  decimal: '.',
  encoding: 'utf-8',
  newline: '\n',
  preamble: [],
  header: ['Time', 'Exhaust °F'],
  unitRow: null,
  unitInCells: '',
  openWord: '',
  digits: 1,
  quoted: false,
};

/** Readings as rows of cells; `beside` adds further cells to the row of a reading. */
export function logRows(
  readings: Readings,
  layout: Layout,
  more: { startMs: number; beside: (index: number) => string[] },
): string[][] {
  return readings.timesS.map((timeS, index) => [
    ...stampCells(layout.clock, more.startMs, timeS),
    tempCell(readings.temps[index] ?? null, layout),
    ...more.beside(index),
  ]);
}

/** A number as the layout writes it. */
export function numberCell(
  value: number,
  { digits, decimal }: Pick<Layout, 'digits' | 'decimal'>,
): string {
  return value.toFixed(digits).replace('.', decimal);
}

function tempCell(temp: number | null, layout: Layout): string {
  return temp === null ? layout.openWord : numberCell(temp, layout) + layout.unitInCells;
}

/** The whole file as bytes. */
export function writeLog(rows: string[][], layout: Layout): Uint8Array {
  const table = [layout.header, ...(layout.unitRow ? [layout.unitRow] : []), ...rows];
  const lines = table.map((cells) =>
    cells.map((cell) => quote(cell, layout)).join(layout.delimiter),
  );
  const text = [...layout.preamble, ...lines, ''].join(layout.newline);
  return encode(text, layout.encoding);
}

function quote(cell: string, { quoted }: Layout): string {
  return quoted ? `"${cell}"` : cell;
}

function encode(text: string, encoding: Layout['encoding']): Uint8Array {
  if (encoding === 'utf-8') return Buffer.from(text, 'utf8');
  if (encoding === 'utf-8-bom') return Buffer.from(`\ufeff${text}`, 'utf8');
  if (encoding === 'utf-16le') return Buffer.from(`\ufeff${text}`, 'utf16le');
  // The texts use nothing of Windows-1252 that Latin-1 has not at the same place.
  return Buffer.from(text, 'latin1');
}
