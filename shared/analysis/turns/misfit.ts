import { firstAtOrAfter } from '../first-at-or-after.ts';
import { autocorrelation } from '../statistics/autocorrelation.ts';
import type { FittedPlant } from './fit-plant.ts';
import { LN_LAG, placeOfSwitch } from './switched-plant.ts';

/** Residuals follow each other no more than this: beyond it a fit says nothing. */
const MOST_CORRELATION = 0.9;
/** A turn is rounded for so many of the longest lag. */
const ROUNDED_LAGS = 1.5;
/** Fewer residuals than this near turns, or far from them, show nothing of their spread. */
const LEAST_VALUES = 20;

/**
 * How much wider errors are than the fit's covariance says, by what its residuals show: the greatest of three.
 * √((1 + ρ)/(1 − ρ)) with the correlation of each residual with the next, as the effective number of values falls to
 * n·(1 − ρ)/(1 + ρ) (Bayley and Hammersley 1946); the spread of the means of as many residuals as the longest lag holds
 * against that of white ones (batch means); the spread of residuals near the turns against that of the others.
 *
 * @returns at least 1
 */
export function widening(fit: FittedPlant, timesS: Float64Array): number {
  const { residualsK, shape, parameters } = fit;
  const lagS = Math.exp(parameters[LN_LAG]!);
  const share = lagS / (shape.endS - shape.startS);
  const inLag = Math.max(1, Math.round(share * timesS.length));
  const followed = Math.max(0, Math.min(MOST_CORRELATION, autocorrelation(residualsK)));
  return Math.sqrt(
    Math.max(
      (1 + followed) / (1 - followed),
      batchRatio(residualsK, inLag),
      nearRatio(fit, timesS, ROUNDED_LAGS * lagS),
    ),
  );
}

/** Variance of batch means over that of white residuals' means. */
function batchRatio(residuals: Float64Array, each: number): number {
  const batches = Math.floor(residuals.length / each);
  if (each < 2 || batches < 2) return 1;
  let ofMeans = 0;
  let ofAll = 0;
  for (let batch = 0; batch < batches; batch++) {
    let sum = 0;
    for (let i = batch * each; i < (batch + 1) * each; i++) {
      sum += residuals[i]!;
      ofAll += residuals[i]! * residuals[i]!;
    }
    ofMeans += (sum * sum) / each;
  }
  return ofAll > 0 ? ofMeans / ofAll : 1;
}

/** Variance of residuals after a switch over that of the others. */
function nearRatio(
  { residualsK, shape, parameters }: FittedPlant,
  timesS: Float64Array,
  afterS: number,
): number {
  const near = { squares: 0, count: 0 };
  let allSquares = 0;
  let from = 0;
  for (let k = 0; k < shape.switches; k++) {
    const switchS = parameters[placeOfSwitch(k)]!;
    const start = Math.max(from, firstAtOrAfter(timesS, switchS));
    const end = firstAtOrAfter(timesS, switchS + afterS);
    for (let i = start; i < end; i++) near.squares += residualsK[i]! ** 2;
    near.count += Math.max(0, end - start);
    from = Math.max(from, end);
  }
  for (const residual of residualsK) allSquares += residual * residual;
  const farCount = residualsK.length - near.count;
  if (near.count < LEAST_VALUES || farCount < LEAST_VALUES) return 1;
  return near.squares / near.count / ((allSquares - near.squares) / farCount);
}
