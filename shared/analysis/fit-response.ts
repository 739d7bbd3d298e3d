import { choleskyFactor, choleskySolve, gradientError } from './statistics/solve-normal.ts';

/** A first-order response `A − (A − T0)·exp(−(t − t0)/τ)` with standard errors (k = 1). */
export type ResponseFit = {
  asymptoteC: number;
  asymptoteErrorK: number;
  tauS: number;
  tauErrorS: number;
  /** T0, at t0. */
  startC: number;
  startErrorK: number;
  /** Covariance of asymptote and tau, K·s. */
  covarianceKS: number;
  residualSdK: number;
  residualSquares: number;
  /** Degrees of freedom. */
  degrees: number;
};

/** How the fit is held: `startC` fixed at t0, or free (null); and a τ to try first, which saves the search where it serves. */
export type ResponseHold = { startC: number | null; guessTauS: number | null };

/** τ is looked for between a tenth of the usual spacing and this many spans; past that a leg shows no curvature. */
const MOST_SPANS = 40;
const PLACES = 48;
/** A fit from a guess is believed when it ends within this many e-folds of it. */
const NEAR_GUESS = 0.7;
/** Polishing ends when a round takes off less than this share of the residual squares. */
const ENOUGH_GAIN = 1e-10;

/**
 * Least-squares fit of a first-order response by variable projection: for a given τ the other parameters are linear,
 * so τ alone is searched (a grid, golden section) and then all are polished by Gauss–Newton. It needs no start.
 * Standard errors are those of the linearised model; a leg that stops well before its plateau gets the large
 * asymptote error that belongs to it.
 *
 * @param timesS strictly rising, s; t0 is `fromS`
 * @param tempsC °C, same length
 * @returns null where the readings show no such curvature (τ beyond 40 spans or under a tenth of a spacing), or are
 *   fewer than the parameters + 1
 * @see https://www.itl.nist.gov/div898/strd/nls/data/misra1a.shtml certified test case, as is BoxBOD
 */
export function fitResponse(
  timesS: ArrayLike<number>,
  tempsC: ArrayLike<number>,
  fromS = timesS[0] ?? 0,
  hold: ResponseHold = { startC: null, guessTauS: null },
): ResponseFit | null {
  const n = timesS.length;
  const parameters = hold.startC === null ? 3 : 2;
  if (n < parameters + 1) return null;
  const nearGuess = hold.guessTauS && polish(timesS, tempsC, fromS, hold.guessTauS, hold.startC);
  if (nearGuess && Math.abs(Math.log(nearGuess.tauS / hold.guessTauS!)) < NEAR_GUESS)
    return nearGuess;
  const spanS = timesS[n - 1]! - timesS[0]!;
  const lowest = Math.log((0.1 * spanS) / n);
  const highest = Math.log(MOST_SPANS * spanS);
  const squaresAt = (lnTau: number) =>
    project(timesS, tempsC, fromS, Math.exp(lnTau), hold.startC).squares;

  const lnTau = leastOf(squaresAt, lowest, highest);
  if (lnTau === null) return null;
  return polish(timesS, tempsC, fromS, Math.exp(lnTau), hold.startC);
}

type Projection = { asymptoteC: number; startC: number; squares: number };

/** The best asymptote and start for a given τ. */
function project(
  timesS: ArrayLike<number>,
  tempsC: ArrayLike<number>,
  fromS: number,
  tauS: number,
  heldC: number | null,
): Projection {
  const n = timesS.length;
  // T = A·(1 − e) + T0·e, e = exp(−t/τ): a line in e. Centred, since e hardly varies where τ is long.
  const decays = new Float64Array(n);
  let meanE = 0;
  let meanT = 0;
  for (let i = 0; i < n; i++) {
    const e = Math.exp((fromS - timesS[i]!) / tauS);
    decays[i] = e;
    meanE += e / n;
    meanT += tempsC[i]! / n;
  }
  let ee = 0;
  let et = 0;
  for (let i = 0; i < n; i++) {
    const e = decays[i]!;
    const a = heldC === null ? e - meanE : 1 - e;
    ee += a * a;
    et += a * (tempsC[i]! - (heldC ?? meanT));
  }
  const slope = et / ee;
  const asymptoteC = heldC === null ? meanT - slope * meanE : heldC + slope;
  const startC = heldC ?? asymptoteC + slope;
  let squares = 0;
  for (let i = 0; i < n; i++) {
    const off = tempsC[i]! - (asymptoteC + (startC - asymptoteC) * decays[i]!);
    squares += off * off;
  }
  return { asymptoteC, startC, squares: Number.isFinite(squares) ? squares : Infinity };
}

/** Place of the least value: a grid, then golden section; null where it lies at an end of the grid. */
function leastOf(value: (x: number) => number, low: number, high: number): number | null {
  let best = 0;
  let least = Infinity;
  for (let i = 0; i <= PLACES; i++) {
    const found = value(low + ((high - low) * i) / PLACES);
    if (found < least) {
      least = found;
      best = i;
    }
  }
  if (best === 0 || best === PLACES) return null;
  let a = low + ((high - low) * (best - 1)) / PLACES;
  let b = low + ((high - low) * (best + 1)) / PLACES;
  for (let i = 0; i < 40; i++) {
    const c = a + 0.381966 * (b - a);
    const d = a + 0.618034 * (b - a);
    if (value(c) < value(d)) b = d;
    else a = c;
  }
  return (a + b) / 2;
}

function polish(
  timesS: ArrayLike<number>,
  tempsC: ArrayLike<number>,
  fromS: number,
  roughTauS: number,
  heldC: number | null,
): ResponseFit | null {
  const n = timesS.length;
  const p = heldC === null ? 3 : 2;
  let tauS = roughTauS;
  let best = project(timesS, tempsC, fromS, tauS, heldC);
  for (let round = 0; round < 12; round++) {
    const { matrix, right } = linearised(timesS, tempsC, fromS, tauS, best, heldC);
    const factor = choleskyFactor(matrix, p);
    if (!factor) return null;
    const step = choleskySolve(factor, right, p)[1]!;
    const next = tauS + Math.max(-0.5 * tauS, Math.min(tauS, step));
    const tried = project(timesS, tempsC, fromS, next, heldC);
    if (!(tried.squares <= best.squares)) break;
    const done =
      Math.abs(next - tauS) < 1e-8 * tauS ||
      best.squares - tried.squares < ENOUGH_GAIN * best.squares;
    tauS = next;
    best = tried;
    if (done) break;
  }
  const factor = choleskyFactor(linearised(timesS, tempsC, fromS, tauS, best, heldC).matrix, p);
  if (!factor) return null;
  const degrees = n - p;
  const residualSdK = Math.sqrt(best.squares / degrees);
  const errorOf = (j: number) => {
    const unit = new Float64Array(p);
    unit[j] = 1;
    return residualSdK * gradientError(factor, unit, p);
  };
  const tauColumn = choleskySolve(
    factor,
    Float64Array.from({ length: p }, (_, j) => (j === 1 ? 1 : 0)),
    p,
  );
  return {
    asymptoteC: best.asymptoteC,
    asymptoteErrorK: errorOf(0),
    tauS,
    tauErrorS: errorOf(1),
    startC: best.startC,
    startErrorK: heldC === null ? errorOf(2) : 0,
    covarianceKS: residualSdK * residualSdK * tauColumn[0]!,
    residualSdK,
    residualSquares: best.squares,
    degrees,
  };
}

/** Normal equations of the model linearised in asymptote, τ and (where free) start. */
function linearised(
  timesS: ArrayLike<number>,
  tempsC: ArrayLike<number>,
  fromS: number,
  tauS: number,
  { asymptoteC, startC }: Projection,
  heldC: number | null,
) {
  const p = heldC === null ? 3 : 2;
  const matrix = new Float64Array(p * p);
  const right = new Float64Array(p);
  const slopes = new Float64Array(3);
  for (let i = 0; i < timesS.length; i++) {
    const sinceS = timesS[i]! - fromS;
    const e = Math.exp(-sinceS / tauS);
    slopes[0] = 1 - e;
    slopes[1] = ((startC - asymptoteC) * e * sinceS) / (tauS * tauS);
    slopes[2] = e;
    const off = tempsC[i]! - (asymptoteC + (startC - asymptoteC) * e);
    for (let a = 0; a < p; a++) {
      for (let b = 0; b <= a; b++) matrix[a * p + b]! += slopes[a]! * slopes[b]!;
      right[a]! += slopes[a]! * off;
    }
  }
  return { matrix, right };
}
