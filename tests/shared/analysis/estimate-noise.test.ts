import { expect, test } from 'vitest';
import { estimateNoise } from '#shared/analysis/estimate-noise.ts';
import { buildThermostatRun } from '#tests/support/build-series.ts';

test.each([
  [1, 0.06],
  [1, 0.9],
  [5, 0.3],
])('finds the noise of a cycling record at %d s that was made with %d K', (spacingS, noiseK) => {
  const { series } = buildThermostatRun({ spacingS, noiseK, cycles: 12 });

  const found = estimateNoise(series).noiseK;

  expect(found).toBeGreaterThan(0.75 * noiseK);
  expect(found).toBeLessThan(1.4 * noiseK);
});

test('sees the step that readings were rounded to, and counts it as noise', () => {
  const { series } = buildThermostatRun({ roundingK: 0.5 });

  const { roundingK, noiseK } = estimateNoise(series);

  expect(roundingK).toBeCloseTo(0.5, 9);
  // JCGM 100:2008, F.2.2.1: a step q adds a standard uncertainty of q/√12.
  expect(noiseK).toBeGreaterThanOrEqual(0.5 / Math.sqrt(12) - 1e-12);
});

test('sees no step in readings that were not rounded', () => {
  const { series } = buildThermostatRun({ noiseK: 0.1 });

  expect(estimateNoise(series).roundingK).toBe(0);
});

test('says nothing of fewer than five readings', () => {
  const timesS = Float64Array.from([0, 1, 2]);

  expect(estimateNoise({ timesS, tempsC: timesS })).toEqual({ noiseK: 0, roundingK: 0 });
});
