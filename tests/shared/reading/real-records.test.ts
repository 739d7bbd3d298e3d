import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import type { Answers } from '#shared/reading/log-reading.ts';
import { readingOf } from './read-text.ts';

/** Records of heated and cooled things, measured by others; not part of the project, so skipped where absent. */
const FOLDER = new URL('../../../../shared/data/', import.meta.url);

type Record = {
  name: string;
  answers: Answers;
  delimiter: RegExp;
  /** Place of the temperature among the cells, and the rows that are not to be read, by a plain look at the cells. */
  column: number;
  isReading: (cells: string[]) => boolean;
};

const isNumber = (cell: string | undefined) => /^-?\d+(\.\d+)?$/.test(cell ?? '');

const RECORDS: Record[] = [
  {
    name: 'sousvide-70',
    answers: { unit: 'C' },
    delimiter: /,/,
    column: 1,
    isReading: (c) => isNumber(c[1]),
  },
  {
    name: 'sousvide-60',
    answers: { unit: 'C' },
    delimiter: /,/,
    column: 1,
    isReading: (c) => isNumber(c[1]),
  },
  {
    name: 'sousvide-53',
    answers: { unit: 'C' },
    delimiter: /,/,
    column: 1,
    isReading: (c) => isNumber(c[1]),
  },
  {
    name: 'heatpad-60a',
    answers: { unit: 'C' },
    delimiter: /,/,
    column: 2,
    isReading: (c) => c.length === 5 && isNumber(c[2]) && c[2] !== '-45.0',
  },
  {
    name: 'heatpad-60c',
    answers: { unit: 'C' },
    delimiter: /,/,
    column: 2,
    isReading: (c) => c.length === 5 && isNumber(c[2]) && c[2] !== '-45.0',
  },
  {
    name: 'step-halogen',
    answers: { unit: 'C' },
    delimiter: /\s+/,
    column: 2,
    isReading: (c) => isNumber(c[2]),
  },
  {
    name: 'step-fahrenheit',
    answers: { unit: 'F' },
    delimiter: /,/,
    column: 2,
    isReading: (c) => isNumber(c[2]),
  },
  {
    name: 'messy-dropped-field',
    answers: { unit: 'C', channel: 'Sensor 4' },
    delimiter: /,/,
    column: 4,
    isReading: (c) => c.length === 6 && isNumber(c[4]),
  },
  {
    name: 'messy-column-order',
    answers: { unit: 'C', channel: 'Sensor 1' },
    delimiter: /,/,
    column: 3,
    isReading: (c) => c.length === 6 && isNumber(c[3]),
  },
  {
    name: 'messy-compact-stamp',
    answers: { unit: 'C' },
    delimiter: /\s+/,
    column: 1,
    isReading: (c) => isNumber(c[1]),
  },
  {
    name: 'messy-spikes',
    answers: { unit: 'C', channel: 'Column 2' },
    delimiter: /,/,
    column: 1,
    isReading: (c) => isNumber(c[1]),
  },
  {
    name: 'messy-quoted-epoch',
    answers: { unit: 'C', channel: 'internal' },
    delimiter: /,\s*/,
    column: 1,
    isReading: (c) => isNumber(c[1]),
  },
  {
    name: 'messy-bom-minute',
    answers: { unit: 'C' },
    delimiter: /,/,
    column: 1,
    isReading: (c) => isNumber(c[0]) && isNumber(c[1]),
  },
];

/** The readings of a record by splitting lines at their delimiter and looking at each cell: no code of the product. */
function plainReadings({ name, delimiter, column, isReading }: Record): number[] {
  const text = readFileSync(fileURLToPath(new URL(`${name}.csv`, FOLDER)), 'utf8');
  return text
    .split(/\r?\n/)
    .map((line) => line.trim().split(delimiter))
    .filter(isReading)
    .map((cells) => Number(cells[column]));
}

describe.skipIf(!existsSync(FOLDER))('real records, where ../shared/data is', () => {
  test.each(RECORDS)('$name: the readings that a plain look at its cells finds', (record) => {
    const bytes = readFileSync(fileURLToPath(new URL(`${record.name}.csv`, FOLDER)));
    const { temps, skippedCount, rows } = readingOf(bytes, { answers: record.answers });
    const plain = plainReadings(record);

    expect(temps.length).toBe(plain.length);
    expect(sorted(temps)).toEqual(sorted(plain));
    expect(rows - temps.length).toBe(skippedCount);
  });

  test.each(['ferment-fridge-a-day2', 'ferment-fridge-b-end'])(
    '%s: each reading but those written twice under one stamp',
    (name) => {
      const bytes = readFileSync(fileURLToPath(new URL(`${name}.csv`, FOLDER)));
      const { temps } = readingOf(bytes, { answers: { unit: 'C', channel: 'Column 2' } });
      const lines = bytes.toString('utf8').trim().split(/\r?\n/);
      const twice = lines.filter((line, i) => sameReading(line, lines[i - 1]));

      expect(temps.length).toBe(lines.length - twice.length);
    },
  );
});

function sorted(temps: ArrayLike<number>): number[] {
  return Array.from(temps).sort((a, b) => a - b);
}

/** The stamp and the three measured columns are those of the line before. */
function sameReading(line: string, before: string | undefined): boolean {
  const measured = (text: string) => [0, 1, 4, 5].map((i) => text.split(';')[i]).join(';');
  return before !== undefined && measured(line) === measured(before);
}
