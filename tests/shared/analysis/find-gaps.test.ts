import { expect, test } from 'vitest';
import { findGaps, gapsWithin, usualSpacing } from '#shared/analysis/find-gaps.ts';

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

test('the gaps within a stretch are those that reach into it, not those that only touch it', () => {
  const gaps = [
    { fromS: 10, toS: 20, beforeIndex: 0, afterIndex: 1 },
    { fromS: 30, toS: 40, beforeIndex: 2, afterIndex: 3 },
    { fromS: 50, toS: 60, beforeIndex: 4, afterIndex: 5 },
  ];

  expect(gapsWithin(gaps, 20, 30)).toEqual([]);
  expect(gapsWithin(gaps, 19, 31)).toEqual(gaps.slice(0, 2));
  expect(gapsWithin(gaps, 33, 35)).toEqual(gaps.slice(1, 2));
  expect(gapsWithin(gaps, 0, 100)).toEqual(gaps);
});
