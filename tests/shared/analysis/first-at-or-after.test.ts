import { expect, test } from 'vitest';
import { firstAtOrAfter } from '#shared/analysis/first-at-or-after.ts';

test('finds the first time that is not before', () => {
  const timesS = [0, 10, 20];

  expect(firstAtOrAfter(timesS, -1)).toBe(0);
  expect(firstAtOrAfter(timesS, 10)).toBe(1);
  expect(firstAtOrAfter(timesS, 10.1)).toBe(2);
  expect(firstAtOrAfter(timesS, 21)).toBe(3);
  expect(firstAtOrAfter([], 0)).toBe(0);
});
