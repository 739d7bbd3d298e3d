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

test.each([1, 3, 1 / 3, 1 / 8])(
  'in many times that bunch as the power %d does, the place is that of a walk through them all',
  (power) => {
    const timesS = Array.from({ length: 300 }, (_, i) => 5 + 900 * ((i + 1) / 300) ** power);

    for (const [i, timeS] of timesS.entries()) {
      expect(firstAtOrAfter(timesS, timeS)).toBe(i);
      const betweenS = (timeS + (timesS[i + 1] ?? timeS + 1)) / 2;
      expect(firstAtOrAfter(timesS, betweenS)).toBe(timesS.filter((t) => t < betweenS).length);
    }
    expect(firstAtOrAfter(timesS, 0)).toBe(0);
  },
);
