import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  normalProbability,
  probabilityBetween,
} from '#shared/analysis/statistics/normal-probability.ts';

describe('normalProbability', () => {
  test.each([
    // JCGM 106:2012, 7.3, table 1: z for a one-sided conformance probability.
    [0.8416212, 0.8, 7],
    [1.2815516, 0.9, 7],
    [1.6448536, 0.95, 7],
    [2.3263479, 0.99, 7],
    [3.0902323, 0.999, 7],
    // Standard normal distribution, as in NIST/SEMATECH e-Handbook 1.3.6.7.1, to more digits.
    [0, 0.5, 15],
    [1, 0.8413447461, 10],
    [1.5, 0.9331927987, 10],
    [2, 0.9772498681, 10],
    [3, 0.998650102, 10],
    [-2, 0.0227501319, 10],
  ])('at z = %d is %d', (z, expected, digits) => {
    expect(normalProbability(z)).toBeCloseTo(expected, digits);
  });

  test('keeps the digits of a far tail', () => {
    // A guard band of 3U (k = 2) leaves less than 1 ppm: ILAC-G8:09/2019, table; 9.8659E-10 is 1 − Φ(6).
    expect(normalProbability(-6) / 9.8659e-10).toBeCloseTo(1, 4);
  });

  test('is certain at the infinities and refuses what is no number', () => {
    expect(normalProbability(Infinity)).toBe(1);
    expect(normalProbability(-Infinity)).toBe(0);
    expect(() => normalProbability(NaN)).toThrow(RangeError);
  });

  test('never falls, and mirrors about zero', () => {
    fc.assert(
      fc.property(fc.double({ min: -9, max: 9, noNaN: true }), (z) => {
        expect(normalProbability(z) + normalProbability(-z)).toBeCloseTo(1, 12);
        expect(normalProbability(z + 0.01)).toBeGreaterThanOrEqual(normalProbability(z));
      }),
    );
  });
});

describe('probabilityBetween', () => {
  test('agrees with JCGM 106:2012, 7.4: viscosity of an SAE 40 oil', () => {
    // y = 13.6, u = 1.8, limits 12.5 and 16.3 mm²/s: the document prints 0.66.
    expect(probabilityBetween(13.6, 1.8, 12.5, 16.3)).toBeCloseTo(0.6626297865, 9);
  });

  test('agrees with JCGM 106:2012, 7.3.3: one limit', () => {
    // Example 1 (upper limit −5.40 V) prints 0.92, example 2 (lower limit 490 kPa) 0.99.
    expect(probabilityBetween(-5.47, 0.05, -Infinity, -5.4)).toBeCloseTo(0.9192433408, 9);
    expect(probabilityBetween(509.7, 8.6, 490, Infinity)).toBeCloseTo(0.9890095474, 9);
  });

  test('leaves 2.275 % at a guard band as wide as U', () => {
    // ILAC-G8:09/2019: w = U gives a specific risk below 2.5 %. 155 °F upper limit, U = 4 °F.
    expect(probabilityBetween(151, 2, -Infinity, 155)).toBeCloseTo(0.97725, 5);
    expect(probabilityBetween(159, 2, -Infinity, 155)).toBeCloseTo(0.02275, 5);
    expect(probabilityBetween(153, 2, -Infinity, 155)).toBeCloseTo(0.84134, 5);
  });

  test('is yes or no where the value is known exactly', () => {
    expect(probabilityBetween(3, 0, 3, 4)).toBe(1);
    expect(probabilityBetween(2.9, 0, 3, 4)).toBe(0);
  });

  test('adds up to one over the whole line', () => {
    const value = fc.double({ min: -50, max: 50, noNaN: true });
    const u = fc.double({ min: 0.01, max: 20, noNaN: true });
    fc.assert(
      fc.property(value, u, value, (at, standardU, limit) => {
        const below = probabilityBetween(at, standardU, -Infinity, limit);
        const above = probabilityBetween(at, standardU, limit, Infinity);
        expect(below + above).toBeCloseTo(1, 12);
      }),
    );
  });
});
