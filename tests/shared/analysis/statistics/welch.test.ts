import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { compareMeans, sampleOf } from '#shared/analysis/statistics/welch.ts';

/** Student's sleep data (Biometrika 6 (1908), 20), hours of sleep gained with two drugs; R: `datasets::sleep`. */
const FIRST = [0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0.0, 2.0];
const SECOND = [1.9, 0.8, 1.1, 0.1, -0.1, 4.4, 5.5, 1.6, 4.6, 3.4];

describe('compareMeans', () => {
  test('agrees with R on Student’s sleep data', () => {
    const compared = compareMeans(sampleOf(FIRST), sampleOf(SECOND));

    // R documentation, t.test(extra ~ group, data = sleep): p = 0.07939, 95 % interval −3.3654832 to 0.2054832 of the
    // first less the second.
    expect(compared?.pValue).toBeCloseTo(0.07939, 5);
    expect(compared?.difference).toBeCloseTo(1.58, 10);
    expect((compared?.difference ?? 0) + (compared?.within ?? 0)).toBeCloseTo(3.3654832, 6);
  });

  test('agrees with the handbook on the mileage of cars', () => {
    // NIST/SEMATECH e-Handbook, 1.3.5.3: 249 cars at 20.14458 (sd 6.41470), 79 at 30.48101 (6.10771); t = 12.94627 with
    // unequal variances, so the standard error is 10.33643 / 12.94627.
    const cars = { count: 249, mean: 20.14458, variance: 6.4147 ** 2 };
    const others = { count: 79, mean: 30.48101, variance: 6.10771 ** 2 };

    const compared = compareMeans(cars, others);

    // t(0.975) of 137 degrees is 1.97743 (handbook, 1.3.6.7.2, between 100 and infinity).
    expect(compared?.difference).toBeCloseTo(10.33643, 5);
    expect((compared?.within ?? 0) / (10.33643 / 12.94627)).toBeCloseTo(1.977, 2);
    expect(compared?.pValue).toBeLessThan(1e-12);
  });

  test('says nothing of a single value', () => {
    expect(compareMeans(sampleOf([1]), sampleOf(SECOND))).toBeNull();
    expect(compareMeans(sampleOf(FIRST), sampleOf([1]))).toBeNull();
  });

  test('an error common to a mean widens the interval and does not average out', () => {
    const many = sampleOf(Array.from({ length: 5000 }, (_, i) => i % 2));

    const compared = compareMeans(many, many, 3);

    // 1.96 standard errors of 3 each way (standard normal, 0.975).
    expect(compared?.within).toBeCloseTo(1.96 * 3, 1);
  });

  test('equal values differ by nothing for sure, unequal ones for sure', () => {
    expect(compareMeans(sampleOf([2, 2]), sampleOf([2, 2]))).toEqual({
      difference: 0,
      within: 0,
      pValue: 1,
    });
    expect(compareMeans(sampleOf([2, 2]), sampleOf([3, 3]))?.pValue).toBe(0);
  });

  test('turned round the difference changes its sign and nothing else', () => {
    const values = fc.array(fc.double({ min: -50, max: 50, noNaN: true }), {
      minLength: 2,
      maxLength: 12,
    });
    fc.assert(
      fc.property(values, values, (one, other) => {
        const there = compareMeans(sampleOf(one), sampleOf(other));
        const back = compareMeans(sampleOf(other), sampleOf(one));

        expect(there?.difference).toBeCloseTo(-(back?.difference ?? NaN), 9);
        expect(there?.within).toBeCloseTo(back?.within ?? NaN, 9);
        expect(there?.pValue).toBeCloseTo(back?.pValue ?? NaN, 9);
      }),
    );
  });
});

describe('sampleOf', () => {
  test('a sample that agrees by luck is no better known than its values', () => {
    // Expanded 0.6, so 0.3 each: variance 0.09.
    expect(sampleOf([5, 5, 5], [0.6, 0.6, 0.6]).variance).toBeCloseTo(0.09, 12);
  });

  test('refuses an empty one', () => {
    expect(() => sampleOf([])).toThrow(RangeError);
  });
});
