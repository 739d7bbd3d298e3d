import { expect, test } from 'vitest';
import { fitLeg } from '#shared/analysis/fit-leg.ts';
import { seededNormal } from '#tests/support/build-series.ts';

const SPAN = { fromS: 60, toS: 299, guessTauS: null };

/** Level at 20 °C until 50 s, then towards 90 °C with 80 s. */
function rise(perSecond: number, noiseK = 0) {
  const random = seededNormal(3);
  const timesS = Float64Array.from({ length: 300 * perSecond }, (_, i) => i / perSecond);
  const tempsC = timesS.map((timeS) => {
    const tempC = timeS < 50 ? 20 : 90 - 70 * Math.exp(-(timeS - 50) / 80);
    return tempC + noiseK * random();
  });
  return { timesS, tempsC };
}

test('a leg is fitted by the named part only, and thinning it out changes little', () => {
  for (const [perSecond, quickly, guessTauS] of [
    [1, false, null],
    [10, false, null],
    [10, true, 50],
  ] as const) {
    const { timesS, tempsC } = rise(perSecond);

    const fit = fitLeg(timesS, tempsC, { ...SPAN, guessTauS }, quickly)!;

    // Averaging an exponential over 10 s scales it by about 1 + (10/80)²/24 and leaves asymptote and τ.
    expect(fit.asymptoteC).toBeCloseTo(90, 1);
    expect(Math.abs(fit.tauS - 80)).toBeLessThan(0.2);
  }
});

test('one leg among thousands is known nearly as well from its few values', () => {
  const { timesS, tempsC } = rise(1, 0.3);

  const whole = fitLeg(timesS, tempsC, SPAN)!;
  const quick = fitLeg(timesS, tempsC, { ...SPAN, guessTauS: 120 }, true)!;

  expect(Math.abs(quick.tauS - whole.tauS)).toBeLessThan(whole.tauErrorS);
  expect(quick.tauErrorS / whole.tauErrorS).toBeGreaterThan(0.6);
  expect(quick.tauErrorS / whole.tauErrorS).toBeLessThan(1.6);
  // The noise that the readings were made with.
  expect(Math.abs(quick.residualSdK - 0.3)).toBeLessThan(0.12);
});

test('under five readings a leg has no fit', () => {
  const { timesS, tempsC } = rise(1);

  expect(fitLeg(timesS, tempsC, { fromS: 60, toS: 63, guessTauS: 80 }, true)).toBeNull();
});
