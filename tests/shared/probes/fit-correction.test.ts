import { describe, expect, test } from 'vitest';
import { correctionAt, correctionErrorAt } from '#shared/analysis/correct-series.ts';
import { fitCorrection } from '#shared/probes/fit-correction.ts';
import { GUM_H3, HANDBOOK_91 } from '#tests/fixtures/published/lines.ts';

/** The thermometer of table H.6: readings t_k and corrections b_k. */
const THERMOMETER = GUM_H3.x.map((x, i) => ({
  readingC: x + 20,
  referenceC: x + 20 + GUM_H3.y[i]!,
  ownErrorK: 0,
}));

describe('the calibration of a thermometer, JCGM 100:2008, H.3', () => {
  const { correction, residualSdK, degrees } = fitCorrection(THERMOMETER, 20);

  test('gives the intercept and slope of H.3.3', () => {
    expect(correction.interceptK).toBeCloseTo(GUM_H3.y1, 4);
    expect(correction.slope).toBeCloseTo(GUM_H3.y2, 5);
    // Recomputed from the table at full precision.
    expect(correction.interceptK).toBeCloseTo(-0.17120379013135, 9);
    expect(correction.slope).toBeCloseTo(0.002182697739887, 9);
  });

  test('gives their uncertainties and correlation', () => {
    expect(correction.interceptErrorK).toBeCloseTo(GUM_H3.uY1, 4);
    expect(correction.slopeError).toBeCloseTo(GUM_H3.uY2, 5);
    expect(correction.correlation).toBeCloseTo(-0.93, 3);
    expect(correction.interceptErrorK).toBeCloseTo(0.00287759783516, 9);
    expect(correction.slopeError).toBeCloseTo(0.000667938773228, 9);
    expect(residualSdK).toBeCloseTo(GUM_H3.residualSd, 4);
    expect(degrees).toBe(9);
  });

  test('predicts the correction at 30 °C with its covariance', () => {
    expect(correctionAt(correction, 30)).toBeCloseTo(GUM_H3.at30, 4);
    expect(correctionErrorAt(correction, 30)).toBeCloseTo(GUM_H3.uAt30, 4);
    // 0.0073 without the covariance.
    expect(correctionErrorAt({ ...correction, correlation: 0 }, 30)).toBeCloseTo(0.0073, 4);
  });

  test('says the same about any temperature it is written about', () => {
    const other = fitCorrection(THERMOMETER, 24.008).correction;

    expect(correctionAt(other, 30)).toBeCloseTo(correctionAt(correction, 30), 12);
    expect(correctionErrorAt(other, 30)).toBeCloseTo(correctionErrorAt(correction, 30), 12);
    // H.3.5: about the mean of the readings the two do not correlate.
    expect(Math.abs(other.correlation)).toBeLessThan(1e-3);
  });
});

test('agrees with another published line', () => {
  // NBS Handbook 91, worksheet 5-4.1.
  const points = HANDBOOK_91.x.map((x, i) => {
    const readingC = x;
    return { readingC, referenceC: x + HANDBOOK_91.y[i]!, ownErrorK: 0 };
  });

  const { correction } = fitCorrection(points, 0);

  expect(correction.interceptK).toBeCloseTo(HANDBOOK_91.intercept, 4);
  expect(correction.slope).toBeCloseTo(HANDBOOK_91.slope, 8);
  expect(correctionErrorAt(correction, 1200) ** 2).toBeCloseTo(HANDBOOK_91.varianceAt1200, 2);
});

describe('what the points are stated to be', () => {
  const point = (readingC: number, referenceC: number, ownErrorK: number) => ({
    readingC,
    referenceC,
    ownErrorK,
  });

  test('is all that two points can go by', () => {
    const fit = fitCorrection([point(0, 0, 0.1), point(100, 99, 0.3)], 0);

    // By hand: b(50) is the mean of both, so u = √(0.1² + 0.3²)/2; at a point it is that point's own.
    expect(fit).toMatchObject({ degrees: Infinity, residualSdK: null });
    expect(correctionAt(fit.correction, 50)).toBeCloseTo(-0.5, 12);
    expect(correctionErrorAt(fit.correction, 50)).toBeCloseTo(Math.hypot(0.1, 0.3) / 2, 12);
    expect(correctionErrorAt(fit.correction, 0)).toBeCloseTo(0.1, 12);
    expect(correctionErrorAt(fit.correction, 100)).toBeCloseTo(0.3, 12);
  });

  test('counts where points lie on a line by luck', () => {
    const fit = fitCorrection([point(0, 1, 0.2), point(50, 51, 0.2), point(100, 101, 0.2)], 50);

    // u of the mean of three, by hand.
    expect(correctionErrorAt(fit.correction, 50)).toBeCloseTo(0.2 / Math.sqrt(3), 12);
    expect(fit.degrees).toBe(Infinity);
  });
});

describe('points that give no line', () => {
  const at = (readingC: number) => ({ readingC, referenceC: readingC, ownErrorK: 0 });

  test.each([
    ['one point', [at(20)]],
    ['two at the same temperature', [at(20), at(20.5)]],
    ['one that is no number', [at(20), at(Number.NaN)]],
  ])('%s is refused', (_, points) => {
    expect(() => fitCorrection(points, 20)).toThrow(RangeError);
  });
});
