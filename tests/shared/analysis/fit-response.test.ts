import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fitResponse } from '#shared/analysis/fit-response.ts';
import { BOXBOD } from '#tests/fixtures/published/boxbod.ts';
import { MISRA1A } from '#tests/fixtures/published/misra1a.ts';
import { BOD, CO2_QN1, LOBLOLLY } from '#tests/fixtures/published/r-first-order.ts';
import { seededNormal } from '#tests/support/build-series.ts';

const FROM_ZERO = { startC: 0, guessTauS: null };

/** |value/expected − 1|, as the certified values ask for. */
function relative(value: number, expected: number): number {
  return Math.abs(value / expected - 1);
}

describe('fitResponse', () => {
  test.each([
    ['Misra1a', MISRA1A, [10_000, 2000]],
    ['BoxBOD', BOXBOD, [1, 1 / 0.75]],
  ])(
    'matches the NIST certified values for %s, from both starts and from none',
    (_, nist, taus) => {
      for (const guessTauS of [null, ...taus]) {
        const fit = fitResponse(nist.x, nist.y, 0, { startC: 0, guessTauS })!;

        expect(relative(fit.asymptoteC, nist.b1)).toBeLessThan(1e-6);
        expect(relative(1 / fit.tauS, nist.b2)).toBeLessThan(1e-6);
        expect(relative(fit.asymptoteErrorK, nist.sdB1)).toBeLessThan(1e-5);
        // By the delta method u(τ) = u(b2)/b2².
        expect(relative(fit.tauErrorS, nist.sdB2 / nist.b2 ** 2)).toBeLessThan(1e-5);
        expect(relative(fit.residualSquares, nist.residualSquares)).toBeLessThan(1e-9);
        expect(relative(fit.residualSdK, nist.residualSd)).toBeLessThan(1e-9);
      }
    },
  );

  test('says that asymptote and time constant of a truncated rise hang together', () => {
    // Misra1a reaches 0.42 τ only; with τ = 1/b2 the correlation is +0.998776, recomputed from the certified Jacobian.
    const fit = fitResponse(MISRA1A.x, MISRA1A.y, 0, FROM_ZERO)!;

    const correlation = fit.covarianceKS / (fit.asymptoteErrorK * fit.tauErrorS);
    expect(correlation).toBeCloseTo(0.998776, 5);
  });

  test('matches R’s SSasymp on Loblolly, where the start is free', () => {
    const fit = fitResponse(LOBLOLLY.x, LOBLOLLY.y, 0)!;

    expect(fit.asymptoteC).toBeCloseTo(LOBLOLLY.asym, 4);
    expect(fit.asymptoteErrorK).toBeCloseTo(LOBLOLLY.seAsym, 3);
    expect(fit.startC).toBeCloseTo(LOBLOLLY.r0, 5);
    expect(fit.startErrorK).toBeCloseTo(LOBLOLLY.seR0, 4);
    expect(-Math.log(fit.tauS)).toBeCloseTo(LOBLOLLY.lrc, 5);
    expect(fit.tauErrorS / fit.tauS).toBeCloseTo(LOBLOLLY.seLrc, 4);
    expect(fit.residualSdK).toBeCloseTo(LOBLOLLY.residualSd, 4);
  });

  test('matches R’s SSasympOff on CO2, whose dead time is where the curve crosses zero', () => {
    const fit = fitResponse(CO2_QN1.x, CO2_QN1.y, 0)!;

    expect(fit.asymptoteC).toBeCloseTo(CO2_QN1.asym, 4);
    expect(fit.asymptoteErrorK).toBeCloseTo(CO2_QN1.seAsym, 4);
    expect(-Math.log(fit.tauS)).toBeCloseTo(CO2_QN1.lrc, 5);
    const deadS = fit.tauS * Math.log((fit.asymptoteC - fit.startC) / fit.asymptoteC);
    expect(deadS).toBeCloseTo(CO2_QN1.c0, 3);
    expect(fit.residualSdK).toBeCloseTo(CO2_QN1.residualSd, 3);
  });

  test('matches R’s SSasympOrig on BOD', () => {
    const fit = fitResponse(BOD.x, BOD.y, 0, FROM_ZERO)!;

    expect(fit.asymptoteC).toBeCloseTo(BOD.a, 4);
    expect(fit.asymptoteErrorK).toBeCloseTo(BOD.seA, 3);
    expect(-Math.log(fit.tauS)).toBeCloseTo(BOD.lrc, 4);
    expect(fit.tauErrorS / fit.tauS).toBeCloseTo(BOD.seLrc, 3);
    expect(fit.residualSdK).toBeCloseTo(BOD.residualSd, 2);
  });

  test('covers the true asymptote of a truncated leg about 95 times in 100', () => {
    const normal = seededNormal(11);
    let covered = 0;
    const runs = 200;
    for (let run = 0; run < runs; run++) {
      const timesS = Array.from({ length: 90 }, (_, i) => i);
      const tempsC = timesS.map((timeS) => 80 - 50 * Math.exp(-timeS / 100) + 0.1 * normal());
      const fit = fitResponse(timesS, tempsC)!;
      if (Math.abs(fit.asymptoteC - 80) <= 2 * fit.asymptoteErrorK) covered++;
    }

    // Binomial, n = 200, p = 0.95: three standard deviations are 9 runs.
    expect(covered).toBeGreaterThanOrEqual(181);
    expect(covered).toBeLessThanOrEqual(199);
  });

  test('has no answer for a straight line, nor for fewer readings than it needs', () => {
    const timesS = [0, 10, 20, 30, 40, 50];

    expect(fitResponse(timesS, timesS)).toBeNull();
    expect(fitResponse([0, 1, 2], [0, 3, 4])).toBeNull();
  });

  test('finds the same leg whatever the clock, the scale and the unit', () => {
    const shift = fc.double({ min: -1e4, max: 1e4, noNaN: true });
    const stretch = fc.double({ min: 0.05, max: 20, noNaN: true });
    const timesS = Array.from({ length: 40 }, (_, i) => i * 3);
    const normal = seededNormal(4);
    const tempsC = timesS.map((timeS) => 85 - 60 * Math.exp(-timeS / 70) + 0.05 * normal());
    const fit = fitResponse(timesS, tempsC)!;
    fc.assert(
      fc.property(shift, stretch, (byS, factor) => {
        const moved = fitResponse(
          timesS.map((timeS) => byS + factor * timeS),
          tempsC.map((tempC) => tempC * 1.8 + 32),
        )!;
        expect(relative(moved.tauS, factor * fit.tauS)).toBeLessThan(1e-5);
        expect(relative(moved.asymptoteC, fit.asymptoteC * 1.8 + 32)).toBeLessThan(1e-5);
        expect(relative(moved.asymptoteErrorK, fit.asymptoteErrorK * 1.8)).toBeLessThan(1e-4);
      }),
      { numRuns: 30 },
    );
  });
});
