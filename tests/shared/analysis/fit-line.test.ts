import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fitLine } from '#shared/analysis/fit-line.ts';
import { FORMALDEHYDE, GUM_H3, HANDBOOK_91 } from '#tests/fixtures/published/lines.ts';
import { NORRIS } from '#tests/fixtures/published/norris.ts';

describe('fitLine', () => {
  test('matches the NIST certified values for Norris', () => {
    const fit = fitLine(NORRIS.x, NORRIS.y);

    expect(fit.slopeCPerS).toBeCloseTo(NORRIS.slope, 12);
    expect(fit.interceptC).toBeCloseTo(NORRIS.intercept, 11);
    expect(fit.slopeErrorCPerS).toBeCloseTo(NORRIS.sdSlope, 13);
    expect(fit.interceptErrorK).toBeCloseTo(NORRIS.sdIntercept, 10);
    expect(fit.residualSdC).toBeCloseTo(NORRIS.residualSd, 10);
  });

  test('keeps the digits of Norris when times are seconds since 1970', () => {
    const epochS = NORRIS.x.map((x) => 1.8e9 + x);

    // Float64 holds such times to 2.4e-7 s, which over a span of 1000 s leaves nine digits.
    expect(fitLine(epochS, NORRIS.y).slopeCPerS).toBeCloseTo(NORRIS.slope, 8);
  });

  test('matches worksheet 5-4.1 of NBS Handbook 91', () => {
    const fit = fitLine(HANDBOOK_91.x, HANDBOOK_91.y);

    expect(fit.slopeCPerS).toBeCloseTo(HANDBOOK_91.slope, 7);
    expect(fit.interceptC).toBeCloseTo(HANDBOOK_91.intercept, 3);
    expect(fit.residualSdC).toBeCloseTo(HANDBOOK_91.residualSd, 5);
    expect(fit.slopeErrorCPerS ** 2).toBeCloseTo(HANDBOOK_91.varianceOfSlope, 11);
    expect(fit.interceptErrorK ** 2).toBeCloseTo(HANDBOOK_91.varianceOfIntercept, 4);
    const fromMean = fit.slopeErrorCPerS * (1200 - fit.meanS);
    const variance = fit.residualSdC ** 2 / HANDBOOK_91.x.length + fromMean ** 2;
    expect(variance).toBeCloseTo(HANDBOOK_91.varianceAt1200, 2);
  });

  test('matches example H.3 of the GUM, the covariance in the prediction included', () => {
    const fit = fitLine(GUM_H3.x, GUM_H3.y);

    expect(fit.interceptC).toBeCloseTo(GUM_H3.y1, 4);
    expect(fit.interceptErrorK).toBeCloseTo(GUM_H3.uY1, 4);
    expect(fit.slopeCPerS).toBeCloseTo(GUM_H3.y2, 5);
    expect(fit.slopeErrorCPerS).toBeCloseTo(GUM_H3.uY2, 5);
    expect(fit.residualSdC).toBeCloseTo(GUM_H3.residualSd, 4);
    expect(fit.interceptC + 10 * fit.slopeCPerS).toBeCloseTo(GUM_H3.at30, 4);
    const fromMean = fit.slopeErrorCPerS * (10 - fit.meanS);
    const uAt30 = Math.hypot(fit.residualSdC / Math.sqrt(11), fromMean);
    expect(uAt30).toBeCloseTo(GUM_H3.uAt30, 4);
  });

  test('matches R on Formaldehyde', () => {
    const fit = fitLine(FORMALDEHYDE.x, FORMALDEHYDE.y);

    expect(fit.interceptC).toBeCloseTo(FORMALDEHYDE.intercept, 6);
    expect(fit.interceptErrorK).toBeCloseTo(FORMALDEHYDE.seIntercept, 6);
    expect(fit.slopeCPerS).toBeCloseTo(FORMALDEHYDE.slope, 6);
    expect(fit.slopeErrorCPerS).toBeCloseTo(FORMALDEHYDE.seSlope, 6);
    expect(fit.residualSdC).toBeCloseTo(FORMALDEHYDE.residualSd, 6);
  });

  test('moves with the temperatures and turns with the times', () => {
    const temps = fc.array(fc.double({ min: -50, max: 150, noNaN: true }), {
      minLength: 3,
      maxLength: 30,
    });
    fc.assert(
      fc.property(temps, fc.double({ min: -100, max: 100, noNaN: true }), (tempsC, shiftK) => {
        const timesS = tempsC.map((_, i) => i);
        const fit = fitLine(timesS, tempsC);
        const moved = fitLine(
          timesS,
          tempsC.map((tempC) => tempC + shiftK),
        );
        const backwards = fitLine(timesS, [...tempsC].reverse());
        expect(moved.slopeCPerS).toBeCloseTo(fit.slopeCPerS, 8);
        expect(moved.meanC).toBeCloseTo(fit.meanC + shiftK, 8);
        expect(backwards.slopeCPerS).toBeCloseTo(-fit.slopeCPerS, 8);
      }),
    );
  });

  test.each([
    ['lengths differ', [0, 1, 2], [1, 2]],
    ['there are two samples', [0, 1], [1, 2]],
    ['a value is not finite', [0, 1, 2], [1, NaN, 2]],
    ['all times are equal', [5, 5, 5], [1, 2, 3]],
  ])('refuses when %s', (_, timesS, tempsC) => {
    expect(() => fitLine(timesS, tempsC)).toThrow(RangeError);
  });
});
