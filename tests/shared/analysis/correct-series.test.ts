import { describe, expect, test } from 'vitest';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import { correctionAt, correctionErrorAt, correctSeries } from '#shared/analysis/correct-series.ts';
import { findTurnsOnly } from '#shared/analysis/find-turns-only.ts';
import { buildThermostatRun } from '#tests/support/build-series.ts';
import { plainInput } from './plain-input.ts';

/** JCGM 100:2008, H.3.3, full digits recomputed from table H.6. */
const THERMOMETER = {
  aboutC: 20,
  interceptK: -0.17120379013135,
  slope: 0.002182697739887,
  interceptErrorK: 0.00287759783516,
  slopeError: 0.000667938773228,
  correlation: -0.930429603093,
};
/** A probe that reads 3 K too low at every temperature. */
const READS_LOW = {
  aboutC: 0,
  interceptK: 3,
  slope: 0,
  interceptErrorK: 0.1,
  slopeError: 0,
  correlation: 0,
};

describe('a correction', () => {
  test('predicts as the worked example does at 30 °C', () => {
    // JCGM 100:2008, H.3.4: b(30 °C) = −0.1494 °C, u_c 0.0041 °C; 0.0073 where the covariance is forgotten.
    expect(correctionAt(THERMOMETER, 30)).toBeCloseTo(-0.1494, 4);
    expect(correctionErrorAt(THERMOMETER, 30)).toBeCloseTo(0.0041386, 6);
  });

  test('is added to every reading, and leaves what was given untouched', () => {
    const series = { timesS: Float64Array.of(0, 1, 2), tempsC: Float64Array.of(20, 30, 40) };

    const corrected = correctSeries(series, { correction: THERMOMETER });

    expect([...series.tempsC]).toEqual([20, 30, 40]);
    expect(corrected.tempsC[1]).toBeCloseTo(30 - 0.1494, 4);
    expect(corrected.timesS).toBe(series.timesS);
  });

  test('is no copy of the readings where the probe has none', () => {
    const series = { timesS: Float64Array.of(0), tempsC: Float64Array.of(20) };

    expect(correctSeries(series, { correction: null })).toBe(series);
  });
});

describe('a run judged with a correction', () => {
  const { series: run } = buildThermostatRun({ noiseK: 0.1 });
  const probe = { accuracyK: 0, calibrationUK: 0, correction: READS_LOW, responseS: null };

  test('has every point moved by it, and no less certain than the correction', () => {
    const plain = analyseRun(run, plainInput());
    const corrected = analyseRun(run, { ...plainInput(), probe });

    expect(corrected.cutOuts.length).toBe(plain.cutOuts.length);
    corrected.cutOuts.forEach((cutOut, i) => {
      expect(cutOut.tempC - plain.cutOuts[i]!.tempC).toBeCloseTo(3, 6);
      // The standard parts u/2 and 0.1 add by their squares (JCGM 100:2008, 5.1.2).
      expect(cutOut.uTotalK).toBeCloseTo(2 * Math.hypot(cutOut.uK / 2, 0.1), 9);
    });
  });

  test('is called by what the exhaust was, not by what the probe said', () => {
    const rating = plainInput().rating!;
    const plain = analyseRun(run, plainInput());
    const opensC = plain.cutOuts.at(-1)!.tempC + 3;
    const moved = { ...rating, opensC, opensTolK: 1, overshootK: 0 };
    const input = { ...plainInput(), rating: moved };

    expect(analyseRun(run, input).cutOuts.at(-1)!.call).toBe('outside');
    expect(analyseRun(run, { ...input, probe }).cutOuts.at(-1)!.call).toBe('inside');
  });

  test('has its peaks and valleys moved too where nothing is judged', () => {
    const plain = findTurnsOnly(run, 2, { ...probe, correction: null });

    const corrected = findTurnsOnly(run, 2, probe);

    expect(corrected.resets[0]!.tempC - plain.resets[0]!.tempC).toBeCloseTo(3, 6);
  });
});
