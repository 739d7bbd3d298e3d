import fc from 'fast-check';
import { expect, test } from 'vitest';
import { median, quantile } from '#shared/analysis/statistics/quantile.ts';

test('quantile runs straight between neighbours', () => {
  // Hyndman and Fan (1996), type 7: with n = 5 the quartiles are the second and fourth values.
  expect(quantile([50, 10, 30, 20, 40], 0.25)).toBe(20);
  expect(quantile([50, 10, 30, 20, 40], 0.75)).toBe(40);
  expect(quantile([0, 10], 0.3)).toBeCloseTo(3, 12);
});

test('the median of an even number of values is the mean of the middle two', () => {
  expect(median([4, 1, 3, 2])).toBe(2.5);
});

test('quantile refuses to answer for nothing', () => {
  expect(() => median([])).toThrow(RangeError);
});

test('quantile does not mind the order and leaves its values alone', () => {
  fc.assert(
    fc.property(fc.array(fc.integer(), { minLength: 1 }), (values) => {
      const before = [...values];
      expect(median(values)).toBe(median([...values].reverse()));
      expect(values).toEqual(before);
    }),
  );
});
