import { expect, test } from 'vitest';
import { findKnee } from '#shared/analysis/find-knee.ts';
import type { BinnedView } from '#shared/analysis/run-facts.ts';
import { seededNormal } from '#tests/support/build-series.ts';

/** A heating leg of 200 s at 1 s; from `kneeS` on it rises at `share` of the rate it had. */
function leg(kneeS: number, share: number, noiseK: number, seed = 5): BinnedView {
  const normal = seededNormal(seed);
  const rise = (timeS: number) => 40 * (1 - Math.exp(-timeS / 150));
  const timesS = Float64Array.from({ length: 201 }, (_, i) => i);
  const tempsC = timesS.map((timeS) => {
    const before = Math.min(timeS, kneeS);
    return 40 + rise(before) + share * (rise(timeS) - rise(before)) + noiseK * normal();
  });
  return { widthS: 1, timesS, tempsC, smoothC: tempsC, smoothNoiseK: noiseK };
}

test.each([
  [110, 0.4, 0.05],
  [90, 0.35, 0.2],
  [130, 2.5, 0.1],
])('finds the knee at %d s where the rate falls to %d of itself', (kneeS, share, noiseK) => {
  const knee = findKnee(leg(kneeS, share, noiseK), 0, 200, noiseK)!;

  expect(Math.abs(knee.timeS - kneeS)).toBeLessThan(10);
  expect(Math.abs(knee.tempC - (40 + 40 * (1 - Math.exp(-kneeS / 150))))).toBeLessThan(1.5);
  expect(knee.slopeAfterKPerS / knee.slopeBeforeKPerS).toBeCloseTo(share, 0);
  expect(knee.pValue).toBeLessThan(1e-6);
});

test('a first-order leg has none, whatever the noise', () => {
  for (const noiseK of [0.02, 0.1, 0.5, 0.9]) {
    for (let seed = 1; seed <= 20; seed++) {
      expect(findKnee(leg(100, 1, noiseK, seed), 0, 200, noiseK)).toBeNull();
    }
  }
});

test('a change that noise hides is none, nor is one in a dozen readings', () => {
  expect(findKnee(leg(110, 0.9, 0.9), 0, 200, 0.9)).toBeNull();
  expect(findKnee(leg(110, 0.4, 0.05), 95, 106, 0.05)).toBeNull();
});
