import type { BinnedView, Knee } from './run-facts.ts';
import { choleskyFactor, choleskySolve } from './statistics/solve-normal.ts';
import { fTail } from './statistics/student-t.ts';
import { firstAtOrAfter } from './first-at-or-after.ts';

/** Values looked at; the rest is averaged. */
const VALUES = 120;
const LEAST_VALUES = 14;
/** Places tried for the knee, and the share of the leg left at either end of it. */
const PLACES = 40;
const MARGIN = 0.12;
/** Chance of a knee where there is none; divided by the places tried (Bonferroni). */
const RISK = 1e-6;
/** A knee is a change of power, not of curvature: the slope changes by at least this share. */
const LEAST_CHANGE = 0.3;
/** One piece that leaves no more than this times the noise needs no second. */
const ENOUGH = 1.15;

/**
 * Where a heating leg changes its rate without turning, if two pieces fit it significantly better than one.
 *
 * One piece is a cubic: it bends as much as cold metal, a first-order response and drift together can. The second
 * model adds a change of slope at one instant. Tested by F on the fall of the residual squares with two more parameters
 * (slope change and place), at a risk shared among the places tried.
 *
 * @param fromS start of the leg, clear of the corner, s
 * @param toS end of the leg, before the next corner, s
 * @param noiseK standard deviation of a reading, K: a change smaller than noise shows is none
 */
export function findKnee(
  view: BinnedView,
  fromS: number,
  toS: number,
  noiseK: number,
): Knee | null {
  const { x, y, each } = gather(view, fromS, toS);
  const n = x.length;
  if (n < LEAST_VALUES) return null;
  const sums = sumMoments(x, y);
  const one = leastSquares(sums, null);
  if (!one || one.squares < (ENOUGH * n * noiseK * noiseK) / each) return null;
  const place = bestPlace(sums, one);
  const fit = place === null ? null : leastSquares(sums, place);
  if (place === null || !fit) return null;
  const degrees = n - 6;
  const floor = Math.max(fit.squares / degrees, 0.1 * noiseK * noiseK);
  const ratio = (one.squares - fit.squares) / 2 / floor;
  const pValue = Math.min(1, fTail(ratio, 2, degrees) * (PLACES + 1));
  const slopes = slopesAt(fit, place);
  const change = Math.abs(slopes.after - slopes.before);
  const greater = Math.max(Math.abs(slopes.after), Math.abs(slopes.before));
  if (pValue > RISK || change < LEAST_CHANGE * greater) return null;
  const lengthS = toS - fromS;
  return {
    timeS: fromS + place * lengthS,
    tempC: meanOf(y) + valueAt(fit, place),
    slopeBeforeKPerS: slopes.before / lengthS,
    slopeAfterKPerS: slopes.after / lengthS,
    pValue,
  };
}

/** Coefficients of 1, x, x², x³ and, with a knee, of the ramp after it; x from 0 to 1 along the leg. */
type Fit = {
  coefficients: Float64Array;
  squares: number;
  /** Of the normal equations, and their right side. */
  factor: Float64Array;
  right: Float64Array;
};

/** Powers of (x − ½) that moments go up to, and the columns of a row of them: those, y times the first five, y². */
const POWERS = 7;
const COLUMNS = POWERS + 5 + 1;

/** Moments of the values from each on to the last: row i sums values i … n − 1. */
type Moments = { x: Float64Array; table: Float64Array };

function sumMoments(x: Float64Array, y: Float64Array): Moments {
  const n = x.length;
  const table = new Float64Array((n + 1) * COLUMNS);
  const meanY = meanOf(y);
  for (let i = n - 1; i >= 0; i--) {
    const at = i * COLUMNS;
    const later = at + COLUMNS;
    const value = y[i]! - meanY;
    let power = 1;
    for (let k = 0; k < POWERS; k++) {
      table[at + k] = table[later + k]! + power;
      if (k < 5) table[at + POWERS + k] = table[later + POWERS + k]! + value * power;
      power *= x[i]! - 0.5;
    }
    table[later - 1] = table[later + COLUMNS - 1]! + value * value;
  }
  return { x, table };
}

/** A cubic, or with a place a cubic and a ramp from there on, from the moments alone. */
function leastSquares(sums: Moments, place: number | null): Fit | null {
  const { table } = sums;
  const p = place === null ? 4 : 5;
  const matrix = new Float64Array(p * p);
  const right = new Float64Array(p);
  for (let a = 0; a < 4; a++) {
    for (let b = 0; b <= a; b++) matrix[a * p + b] = table[a + b]!;
    right[a] = table[POWERS + a]!;
  }
  if (place !== null) {
    const ramp = rampAt(sums, place, new Float64Array(6));
    matrix.set(ramp.subarray(0, 5), 4 * p);
    right[4] = ramp[5]!;
  }
  const factor = choleskyFactor(matrix, p);
  if (!factor) return null;
  const coefficients = choleskySolve(factor, right, p);
  let squares = table[COLUMNS - 1]!;
  for (let a = 0; a < p; a++) squares -= coefficients[a]! * right[a]!;
  return { coefficients, squares: Math.max(0, squares), factor, right };
}

/** Products of a ramp from a place on with the cubic's four columns, with itself and with y. */
function rampAt({ x, table }: Moments, place: number, ramp: Float64Array): Float64Array {
  const at = firstAtOrAfter(x, place) * COLUMNS;
  const knee = place - 0.5;
  for (let b = 0; b < 4; b++) ramp[b] = table[at + b + 1]! - knee * table[at + b]!;
  ramp[4] = ramp[1]! - knee * ramp[0]!;
  ramp[5] = table[at + POWERS + 1]! - knee * table[at + POWERS]!;
  return ramp;
}

/**
 * The place whose ramp takes most off the cubic's residual squares. What it takes off follows from the cubic's own
 * factor: the ramp's part that the cubic does not have already, against the residuals.
 */
function bestPlace(sums: Moments, { factor, right }: Fit): number | null {
  const ramp = new Float64Array(6);
  const own = new Float64Array(4);
  const shared = new Float64Array(4);
  forward(factor, right, own);
  let best: number | null = null;
  let greatest = -Infinity;
  for (let i = 0; i <= PLACES; i++) {
    const place = MARGIN + ((1 - 2 * MARGIN) * i) / PLACES;
    rampAt(sums, place, ramp);
    forward(factor, ramp, shared);
    let left = ramp[4]!;
    let leftWithY = ramp[5]!;
    for (let a = 0; a < 4; a++) {
      left -= shared[a]! * shared[a]!;
      leftWithY -= shared[a]! * own[a]!;
    }
    const gain = (leftWithY * leftWithY) / left;
    if (left > 0 && gain > greatest) {
      greatest = gain;
      best = place;
    }
  }
  return best;
}

/** `x = L⁻¹·right` for the cubic's factor. */
function forward(factor: Float64Array, right: Float64Array, x: Float64Array): void {
  for (let i = 0; i < 4; i++) {
    let sum = right[i]!;
    for (let k = 0; k < i; k++) sum -= factor[i * 4 + k]! * x[k]!;
    x[i] = sum / factor[i * 4 + i]!;
  }
}

function meanOf(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function slopesAt({ coefficients: c }: Fit, place: number) {
  const x = place - 0.5;
  const before = c[1]! + 2 * c[2]! * x + 3 * c[3]! * x * x;
  return { before, after: before + c[4]! };
}

function valueAt({ coefficients: c }: Fit, place: number): number {
  const x = place - 0.5;
  return c[0]! + (c[1]! + (c[2]! + c[3]! * x) * x) * x;
}

function gather({ timesS, tempsC }: BinnedView, fromS: number, toS: number) {
  const from = firstAtOrAfter(timesS, fromS);
  const to = firstAtOrAfter(timesS, toS + 1e-9);
  const each = Math.max(1, Math.ceil((to - from) / VALUES));
  const size = Math.ceil((to - from) / each);
  const x = new Float64Array(Math.max(0, size));
  const y = new Float64Array(x.length);
  for (let k = 0; k < x.length; k++) {
    const first = from + k * each;
    const last = Math.min(to, first + each);
    let sumS = 0;
    let sumC = 0;
    for (let i = first; i < last; i++) {
      sumS += timesS[i]! - fromS;
      sumC += tempsC[i]!;
    }
    x[k] = sumS / (last - first) / (toS - fromS);
    y[k] = sumC / (last - first);
  }
  return { x, y, each };
}
