import { expect, test } from 'vitest';
import {
  choleskyFactor,
  choleskySolve,
  gradientError,
} from '#shared/analysis/statistics/solve-normal.ts';

// The textbook factorisation: [[4,12,−16],[12,37,−43],[−16,−43,98]] = L·Lᵀ with L = [[2],[6,1],[−8,5,3]].
const MATRIX = Float64Array.from([4, 12, -16, 12, 37, -43, -16, -43, 98]);

test('choleskyFactor finds the known factor', () => {
  expect([...choleskyFactor(MATRIX, 3)!]).toEqual([2, 0, 0, 6, 1, 0, -8, 5, 3]);
});

test('choleskySolve solves what the matrix was multiplied from', () => {
  const factor = choleskyFactor(MATRIX, 3)!;

  const x = choleskySolve(
    factor,
    Float64Array.from([4 + 24 - 48, 12 + 74 - 129, -16 - 86 + 294]),
    3,
  );

  expect(x[0]).toBeCloseTo(1, 10);
  expect(x[1]).toBeCloseTo(2, 10);
  expect(x[2]).toBeCloseTo(3, 10);
});

test('gradientError is the root of the diagonal of the inverse', () => {
  const factor = choleskyFactor(Float64Array.from([4, 0, 0, 25]), 2)!;

  expect(gradientError(factor, Float64Array.from([1, 0]), 2)).toBeCloseTo(0.5, 12);
  expect(gradientError(factor, Float64Array.from([0, 3]), 2)).toBeCloseTo(0.6, 12);
});

test('a matrix that is not positive definite has no factor', () => {
  expect(choleskyFactor(Float64Array.from([1, 2, 2, 1]), 2)).toBeNull();
});
