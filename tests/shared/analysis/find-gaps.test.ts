import { expect, test } from 'vitest';
import { findGaps, usualSpacing } from '#shared/analysis/find-gaps.ts';

test('usual spacing is the middle one', () => {
  expect(usualSpacing(Float64Array.from([0, 1, 2, 3, 60, 61]))).toBe(1);
  expect(usualSpacing(Float64Array.from([0]))).toBe(0);
});

test('a gap is a span of more than four usual spacings, named by both its ends', () => {
  const timesS = Float64Array.from([0, 2, 4, 6, 14, 16, 25, 27]);

  expect(findGaps(timesS, 2)).toEqual([{ fromS: 16, toS: 25, beforeIndex: 5, afterIndex: 6 }]);
});

test('a quick probe that misses a second has no gap', () => {
  const timesS = Float64Array.from([0, 0.2, 0.4, 2.4, 2.6]);

  expect(findGaps(timesS, 0.2)).toEqual([]);
});
