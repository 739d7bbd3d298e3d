import { describe, expect, test } from 'vitest';
import {
  fTail,
  studentTProbability,
  studentTQuantile,
} from '#shared/analysis/statistics/student-t.ts';

describe('studentTQuantile', () => {
  test.each([
    // R Core Team, R sources, tests/Examples/stats-Ex.Rout.save, example TDist: qt(.975, df).
    [1, 12.706205],
    [2, 4.302653],
    [3, 3.182446],
    [4, 2.776445],
    [5, 2.570582],
    [6, 2.446912],
    [7, 2.364624],
    [8, 2.306004],
    [9, 2.262157],
    [10, 2.228139],
    [20, 2.085963],
    [50, 2.008559],
    [100, 1.983972],
    [1000, 1.962339],
  ])('at 0.975 with %d degrees of freedom is %d', (degrees, expected) => {
    expect(studentTQuantile(0.975, degrees)).toBeCloseTo(expected, 5);
    expect(studentTQuantile(0.025, degrees)).toBeCloseTo(-expected, 5);
  });

  test('is undone by the probability', () => {
    for (const p of [0.001, 0.2, 0.5, 0.9, 0.9999]) {
      expect(studentTProbability(studentTQuantile(p, 3.5), 3.5)).toBeCloseTo(p, 9);
    }
  });

  test('refuses probabilities of 0 and 1, and no degrees of freedom', () => {
    expect(() => studentTQuantile(0, 5)).toThrow(RangeError);
    expect(() => studentTQuantile(1, 5)).toThrow(RangeError);
    expect(() => studentTQuantile(0.5, 0)).toThrow(RangeError);
  });
});

describe('fTail', () => {
  test('with one degree above is a two-sided t test', () => {
    // t(0.975, 9) = 2.262157: the square of t is F(1, 9), so its tail is 5 %.
    expect(fTail(2.262157 ** 2, 1, 9)).toBeCloseTo(0.05, 6);
  });

  test('with two degrees above has the closed form (1 + 2F/n)^(−n/2)', () => {
    expect(fTail(5, 2, 8)).toBeCloseTo((1 + 10 / 8) ** -4, 12);
    expect(fTail(0, 2, 8)).toBe(1);
  });
});
