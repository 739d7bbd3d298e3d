import { expect, test } from 'vitest';
import { findParts, medianStepS } from '#shared/reading/find-parts.ts';

test('a record without a long pause is one part', () => {
  expect(findParts(Float64Array.of(0, 10, 20, 500, 510))).toEqual([{ fromS: 0, toS: 510 }]);
});

test('a pause of over ten minutes parts it', () => {
  expect(findParts(Float64Array.of(0, 10, 20, 700, 710, 720))).toEqual([
    { fromS: 0, toS: 20 },
    { fromS: 700, toS: 720 },
  ]);
});

test('a few readings alone are no part', () => {
  expect(findParts(Float64Array.of(0, 10, 20, 700, 710, 1500, 1510, 1520))).toEqual([
    { fromS: 0, toS: 20 },
    { fromS: 1500, toS: 1520 },
  ]);
});

test('a record with a reading every five minutes is not parted by fifteen', () => {
  const timesS = Float64Array.of(0, 300, 600, 1500, 1800, 2100);

  expect(findParts(timesS)).toEqual([{ fromS: 0, toS: 2100 }]);
  expect(medianStepS(timesS)).toBe(300);
});
