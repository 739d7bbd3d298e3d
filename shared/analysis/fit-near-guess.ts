import type { ResponseFit } from './fit-response.ts';

/** Steps are taken until one is under this share of the standard error of ln τ … */
const SMALL_STEP = 0.01;
/** … in at most so many rounds; one goes no further than this, in e-folds. */
const MOST_ROUNDS = 10;
const MOST_STEP = 0.7;
/** A fit this far from its guess, in e-folds, is left to the search. */
const FARTHEST = 2;
/** As in fitResponse: past so many spans a leg shows no curvature. */
const MOST_SPANS = 40;

/**
 * fitResponse with a free start from a good guess, at a fraction of its cost: every round makes one pass over the
 * values for the moments of `1`, `d = 1 − e^(−s/τ)` and `∂d/∂ln τ`, from which line, step and errors follow in closed
 * form (variable projection; Golub and Pereyra 2003).
 *
 * @param timesS strictly rising, s; t0 is the first
 * @param tempsC °C, same length
 * @returns null where the steps do not settle near the guess: search then
 */
export function fitNearGuess(
  timesS: Float64Array,
  tempsC: Float64Array,
  guessTauS: number,
): ResponseFit | null {
  const n = timesS.length;
  if (n < 4) return null;
  const sums = new Float64Array(SUMS);
  const highestTauS = MOST_SPANS * (timesS[n - 1]! - timesS[0]!);
  let tauS = guessTauS;
  let bestTauS = guessTauS;
  let step = 0;
  let least = Infinity;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    sumUp(timesS, tempsC, tauS, sums);
    const line = lineOf(sums, n);
    if (line.squares > least * (1 + 1e-9)) {
      // Too far: half as far from the best.
      step /= 2;
      tauS = bestTauS * Math.exp(step);
      continue;
    }
    least = line.squares;
    bestTauS = tauS;
    step = Math.max(-MOST_STEP, Math.min(MOST_STEP, line.lnTauStep));
    if (!Number.isFinite(step)) return null;
    if (Math.abs(step) <= SMALL_STEP * line.lnTauError) return toFit(sums, line, n, tauS);
    tauS = bestTauS * Math.exp(step);
    if (tauS > highestTauS || Math.abs(Math.log(tauS / guessTauS)) > FARTHEST) return null;
  }
  return null;
}

/** Places in the sums: of d, g (∂d/∂ln τ is −g), T, and of their products. */
const [D, G, T, DD, DG, GG, DT, GT, TT] = [0, 1, 2, 3, 4, 5, 6, 7, 8] as const;
const SUMS = 9;

/** Sums over the values, temperatures taken from the first so that squares keep their digits. */
function sumUp(timesS: Float64Array, tempsC: Float64Array, tauS: number, sums: Float64Array) {
  const n = timesS.length;
  const firstS = timesS[0]!;
  const firstC = tempsC[0]!;
  sums.fill(0);
  for (let i = 0; i < timesS.length; i++) {
    const folds = (timesS[i]! - firstS) / tauS;
    const e = Math.exp(-folds);
    const d = 1 - e;
    const g = e * folds;
    const t = tempsC[i]! - firstC;
    sums[D]! += d;
    sums[G]! += g;
    sums[T]! += t;
    sums[DD]! += d * d;
    sums[DG]! += d * g;
    sums[GG]! += g * g;
    sums[DT]! += d * t;
    sums[GT]! += g * t;
    sums[TT]! += t * t;
  }
  // Centred products.
  sums[DD]! -= (sums[D]! * sums[D]!) / n;
  sums[DG]! -= (sums[D]! * sums[G]!) / n;
  sums[GG]! -= (sums[G]! * sums[G]!) / n;
  sums[DT]! -= (sums[D]! * sums[T]!) / n;
  sums[GT]! -= (sums[G]! * sums[T]!) / n;
  sums[TT]! -= (sums[T]! * sums[T]!) / n;
  sums[T]! += firstC * n;
}

type Line = ReturnType<typeof lineOf>;

/** The best start and swing for a τ, and the step in ln τ that the linearised model asks for. */
function lineOf(sums: Float64Array, n: number) {
  const swingK = sums[DT]! / sums[DD]!;
  const squares = Math.max(0, sums[TT]! - swingK * sums[DT]!);
  const residualSdK = Math.sqrt(squares / (n - 3));
  const bendSquares = sums[GG]! - (sums[DG]! * sums[DG]!) / sums[DD]!;
  const lnTauStep = -(sums[GT]! - swingK * sums[DG]!) / (swingK * bendSquares);
  const lnTauError = residualSdK / (Math.abs(swingK) * Math.sqrt(bendSquares));
  return { swingK, squares, residualSdK, lnTauStep, lnTauError };
}

function toFit(
  sums: Float64Array,
  { swingK, squares, residualSdK, lnTauError }: Line,
  n: number,
  tauS: number,
): ResponseFit {
  const meanD = sums[D]! / n;
  const startC = sums[T]! / n - swingK * meanD;
  /** How start and asymptote follow ln τ, K. */
  const swingByTau = (swingK * sums[DG]!) / sums[DD]!;
  const startByTau = swingK * (sums[G]! / n) - meanD * swingByTau;
  const byTau = startByTau + swingByTau;
  const sdK = residualSdK;
  const errorOf = (share: number, followsK: number) =>
    Math.hypot(sdK / Math.sqrt(n), (share * sdK) / Math.sqrt(sums[DD]!), followsK * lnTauError);
  return {
    asymptoteC: startC + swingK,
    asymptoteErrorK: errorOf(1 - meanD, byTau),
    tauS,
    tauErrorS: tauS * lnTauError,
    startC,
    startErrorK: errorOf(meanD, startByTau),
    covarianceKS: byTau * lnTauError * lnTauError * tauS,
    residualSdK,
    residualSquares: squares,
    degrees: n - 3,
  };
}
