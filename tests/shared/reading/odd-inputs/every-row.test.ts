import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';

const ROWS = 72;
const FOLDER = new URL('./', import.meta.url);

/** How many tests of this folder name each row, in a title ("row 17: …") or a table (row: 17). */
function casesByRow(): Map<number, number> {
  const cases = new Map<number, number>();
  for (const name of readdirSync(FOLDER).filter((file) => /\.test\.ts$|^cases-of-/.test(file))) {
    const text = readFileSync(new URL(name, FOLDER), 'utf8');
    for (const match of text.matchAll(/'rows? ([\d, ]+):|\{ ?\n? *row: (\d+)/g)) {
      for (const row of (match[1] ?? match[2]!).split(',').map(Number)) {
        cases.set(row, (cases.get(row) ?? 0) + 1);
      }
    }
  }
  return cases;
}

test('each of the 72 odd inputs has at least two cases', () => {
  const cases = casesByRow();
  const short = Array.from({ length: ROWS }, (_, i) => i + 1).filter(
    (row) => (cases.get(row) ?? 0) < 2,
  );

  expect(short).toEqual([]);
});
