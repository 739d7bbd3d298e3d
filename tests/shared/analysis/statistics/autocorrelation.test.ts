import { describe, expect, test } from 'vitest';
import { autocorrelation } from '#shared/analysis/statistics/autocorrelation.ts';
import { seededNormal } from '#tests/support/build-series.ts';

describe('correlation of each value with the next', () => {
  test('by hand: (1·2 + 2·−1)/(1 + 4 + 1) and (2·2 + 2·2)/12', () => {
    expect(autocorrelation(Float64Array.of(1, 2, -1))).toBe(0);
    expect(autocorrelation(Float64Array.of(2, 2, 2))).toBeCloseTo(8 / 12, 12);
  });

  test('runs that are parted are not correlated across the gap', () => {
    expect(autocorrelation(Float64Array.of(1, NaN, 1))).toBe(0);
  });

  test('an autoregression of 0.6 gives 0.6 within three standard errors', () => {
    const normal = seededNormal(5);
    const values = new Float64Array(4000);
    for (let i = 1; i < values.length; i++) values[i] = 0.6 * values[i - 1]! + normal();

    // Bartlett: the standard error is √((1 − ρ²)/n).
    expect(Math.abs(autocorrelation(values) - 0.6)).toBeLessThan(3 * Math.sqrt(0.64 / 4000));
  });

  test('nothing to correlate gives 0', () => {
    expect(autocorrelation(new Float64Array(0))).toBe(0);
  });
});
