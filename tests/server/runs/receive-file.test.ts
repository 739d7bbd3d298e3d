import { expect, test } from 'vitest';
import { safeName } from '#server/runs/receive-file.ts';

test.each([
  ['run 3.csv', 'run 3.csv'],
  ['../../etc/passwd.csv', 'passwd.csv'],
  ['C:\\logs\\a.txt', 'a.txt'],
  ['exhaust\u202Evsc.csv', 'exhaustvsc.csv'],
  ['a"\r\nSet-Cookie: x.csv', 'aSet-Cookie: x.csv'],
  ['Trockner Öffnung ½.csv', 'Trockner Öffnung ½.csv'],
])('a file that was called %j is shown as %j', (given, shown) => {
  expect(safeName(given)).toBe(shown);
});

test('a very long name is cut, its ending kept', () => {
  expect(safeName(`${'x'.repeat(500)}.csv`)).toBe(`${'x'.repeat(120)}.csv`);
});
