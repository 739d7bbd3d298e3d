import { expect, test } from 'vitest';
import { readLog } from '#shared/reading/read-log.ts';
import { roomOf } from '#shared/reading/room-of.ts';

function readingOf(header: string, rows: string[]) {
  const outcome = readLog(new TextEncoder().encode([header, ...rows, ''].join('\n')));
  if (outcome.kind !== 'read') throw new Error(`not read: ${outcome.kind}`);
  return outcome.reading;
}

const rows = [
  '0,80,68',
  '10,100,68',
  '20,120,68',
  '30,140,212',
  '40,150,68',
  '50,152,77',
  '60,151,77',
  '70,150,77',
];

test('the room is the median of its own column while the run lasted, so that one wild reading is no matter', () => {
  const reading = readingOf('Elapsed (s),Exhaust (°F),Room (°F)', rows);

  // 68 °F is 20 °C and 77 °F is 25 °C, exactly.
  expect(roomOf(reading, 0, 40)).toBeCloseTo(20, 9);
  expect(roomOf(reading, 50, 70)).toBeCloseTo(25, 9);
});

test('a log without a column of the room tells nothing of it', () => {
  const reading = readingOf(
    'Elapsed (s),Exhaust (°F)',
    rows.map((row) => row.slice(0, row.lastIndexOf(','))),
  );

  expect(roomOf(reading, 0, 70)).toBeNull();
});
