import fc from 'fast-check';
import { expect, test } from 'vitest';
import { fitNearGuess } from '#shared/analysis/fit-near-guess.ts';
import { fitResponse } from '#shared/analysis/fit-response.ts';
import { seededNormal } from '#tests/support/build-series.ts';

function exponential(tauS: number, swingK: number, noiseK: number, seed = 1) {
  const random = seededNormal(seed);
  const timesS = Float64Array.from({ length: 24 }, (_, i) => 40 + 5 * i);
  const tempsC = timesS.map(
    (timeS) => 50 + swingK * (1 - Math.exp((40 - timeS) / tauS)) + noiseK * random(),
  );
  return { timesS, tempsC };
}

test('near a guess the fit and its errors are those of the search', () => {
  fc.assert(
    fc.property(
      fc.double({ min: 30, max: 150, noNaN: true }),
      fc.double({ min: 0.5, max: 2, noNaN: true }),
      fc.constantFrom(-40, 60),
      fc.integer({ min: 1, max: 1000 }),
      (tauS, offBy, swingK, seed) => {
        const { timesS, tempsC } = exponential(tauS, swingK, 0.05, seed);
        const searched = fitResponse(timesS, tempsC)!;

        const near = fitNearGuess(timesS, tempsC, tauS * offBy)!;

        // Steps end within a hundredth of the standard error.
        expect(Math.abs(near.tauS - searched.tauS)).toBeLessThan(0.02 * searched.tauErrorS);
        for (const name of ['asymptoteErrorK', 'tauErrorS', 'startErrorK', 'covarianceKS'] as const)
          expect(Math.abs(near[name] / searched[name] - 1)).toBeLessThan(0.01);
        expect(Math.abs(near.asymptoteC - searched.asymptoteC)).toBeLessThan(
          0.02 * searched.asymptoteErrorK,
        );
        expect(near.degrees).toBe(searched.degrees);
      },
    ),
    { numRuns: 60 },
  );
});

test('a stretch without curvature, or far from the guess, is left to the search', () => {
  const { timesS } = exponential(80, 40, 0);
  const straight = timesS.map((timeS) => 50 + 0.1 * timeS);

  expect(fitNearGuess(timesS, straight, 80)).toBeNull();
  expect(fitNearGuess(timesS, exponential(80, 40, 0.01).tempsC, 5)).toBeNull();
  expect(fitNearGuess(timesS.slice(0, 3), straight.slice(0, 3), 80)).toBeNull();
});
