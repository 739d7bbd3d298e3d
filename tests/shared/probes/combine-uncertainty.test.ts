import { describe, expect, test } from 'vitest';
import {
  combineUncertainty,
  coverageFactor,
  ofLag,
  ofRepeats,
  ofResolution,
  rectangular,
} from '#shared/probes/combine-uncertainty.ts';

const part = (standard: number, degrees: number) => ({ name: 'part', standard, degrees });

describe('combined uncertainty', () => {
  test('has the effective degrees of freedom of the worked example', () => {
    // JCGM 100:2008, G.4.1, example (from memory): 0.25, 0.57 and 0.82 % from 10, 5 and 15 observations give
    // u_c 1.03 %, 19.0 degrees, t 2.09, U 2.2 %.
    const combined = combineUncertainty([part(0.25, 9), part(0.57, 4), part(0.82, 14)]);

    expect(combined.standard).toBeCloseTo(1.03, 2);
    expect(combined.degrees).toBeCloseTo(19, 1);
    expect(combined.factor).toBeCloseTo(2.09, 2);
    expect(combined.expanded).toBeCloseTo(2.2, 1);
  });

  test('agrees with the end gauge', () => {
    // JCGM 100:2008, H.1, table H.1: 25 nm with 18 degrees, 9.7 with 25.6, 2.9 with 50, 16.6 with 2: u_c 32 nm,
    // 16 degrees after cutting (inputs seen in public examples, result from memory).
    const gauge = [part(25, 18), part(9.7, 25.6), part(2.9, 50), part(16.6, 2)];

    const { standard, degrees } = combineUncertainty(gauge);

    expect(standard).toBeCloseTo(32, 0);
    expect(Math.floor(degrees)).toBe(16);
  });

  test('knows no fewer degrees than infinity where all is stated', () => {
    const combined = combineUncertainty([part(3, Infinity), part(4, Infinity)]);

    expect(combined).toMatchObject({ standard: 5, degrees: Infinity });
    expect(combined.factor).toBeCloseTo(1.96, 3);
  });

  test('takes the coverage factor for 95 % from the table of t', () => {
    // R sources, TDist example: qt(.975, df).
    expect(coverageFactor(1)).toBeCloseTo(12.706205, 5);
    expect(coverageFactor(9)).toBeCloseTo(2.262157, 5);
    expect(coverageFactor(9.5)).toBeGreaterThan(2.228139);
    expect(coverageFactor(9.5)).toBeLessThan(2.262157);
  });

  test.each([
    [-1, 1],
    [Number.NaN, 1],
    [Infinity, 1],
    [1, 0],
    [1, Number.NaN],
  ])('refuses %d with %d degrees', (standard, degrees) => {
    expect(() => combineUncertainty([part(standard, degrees)])).toThrow(RangeError);
  });
});

describe('standard uncertainties', () => {
  test('of bounds and of steps', () => {
    // JCGM 100:2008, F.2.2.1: a step of δ gives 0.29 δ.
    expect(rectangular(3)).toBeCloseTo(1.7320508, 7);
    expect(ofResolution(1)).toBeCloseTo(0.2886751, 7);
  });

  test('of repeated readings', () => {
    // NIST StRD NumAcc1: mean 10000002, standard deviation 1 of three.
    const repeats = ofRepeats([10_000_001, 10_000_003, 10_000_002]);

    expect(repeats).toMatchObject({ mean: 10_000_002, degrees: 2 });
    expect(repeats.standard).toBeCloseTo(1 / Math.sqrt(3), 12);
    expect(() => ofRepeats([1])).toThrow(RangeError);
  });

  test('of lag on a ramp', () => {
    // 0.5 K/s behind by 6 s is 3 K, rectangular.
    expect(ofLag(-0.5, 6)).toBeCloseTo(Math.sqrt(3), 12);
  });
});
