import { firstAtOrAfter } from '../first-at-or-after.ts';
import type { BinnedView } from '../run-facts.ts';
import { choleskyFactor, choleskySolve, gradientError } from '../statistics/solve-normal.ts';
import { CURVES, type TurnShape } from './turn-shape.ts';

/** A turn found by one local fit; errors are standard ones, k = 1. */
export type QuickTurn = {
  timeS: number;
  tempC: number;
  errorK: number;
  switchS: number;
  switchC: number;
  switchErrorS: number;
  switchErrorK: number;
};

export type QuickTask = {
  shape: TurnShape;
  /** 1 for a peak, −1 for a valley. */
  sign: 1 | -1;
  /** Where the switch is first looked for, s. */
  switchS: number;
  /** Readings used, s. */
  startS: number;
  endS: number;
  noiseK: number;
  /** How great the ramps before and after may be, K/s; k = 1. */
  rampKPerS: number;
};

const UNKNOWNS = CURVES + 1;
const ROUNDS = 3;
const MOST_VALUES = 36;

/**
 * Locates one turn by a local fit of its known shape: five coefficients and the switch time, by Gauss–Newton.
 *
 * @param bench where to work; a long record has thousands of turns, so nothing is allocated per reading
 * @returns null where the readings do not settle it
 */
export function locateQuickly(
  view: BinnedView,
  task: QuickTask,
  bench: QuickBench,
): QuickTurn | null {
  const { shape } = task;
  if (takeValues(view, task, bench) < 2 * UNKNOWNS) return null;
  let switchS = task.switchS;
  let solution: Float64Array | null = null;
  let factor: Float64Array | null = null;
  for (let round = 0; round < ROUNDS; round++) {
    fillColumns(bench, shape, switchS, solution);
    const { matrix, right } = normals(bench, task.noiseK);
    addBeliefs(matrix, task, solution === null);
    factor = choleskyFactor(matrix, UNKNOWNS);
    if (!factor) return null;
    const step = choleskySolve(factor, right, UNKNOWNS);
    solution = step;
    const most = (task.endS - task.startS) / 8;
    const shift = Math.max(-most, Math.min(most, step[CURVES]!));
    switchS += shift;
    if (round > 0 && Math.abs(shift) < shape.stepS) break;
  }
  if (!solution || !factor || switchS <= task.startS || switchS >= task.endS) return null;
  return readOff(task, switchS, solution, factor);
}

/** Room for the values of one fit and the columns of its design; lent from fit to fit. */
export type QuickBench = {
  count: number;
  /** Readings behind each value. */
  each: number;
  timesS: Float64Array;
  tempsC: Float64Array;
  columns: Float64Array[];
};

export function createQuickBench(): QuickBench {
  const column = () => new Float64Array(MOST_VALUES);
  const columns = Array.from({ length: UNKNOWNS }, column);
  return { count: 0, each: 1, timesS: column(), tempsC: column(), columns };
}

/** Averages neighbouring readings to at most MOST_VALUES values. */
function takeValues(view: BinnedView, task: QuickTask, bench: QuickBench): number {
  const from = firstAtOrAfter(view.timesS, task.startS);
  const to = firstAtOrAfter(view.timesS, task.endS);
  const each = Math.max(1, Math.ceil((to - from) / MOST_VALUES));
  let count = 0;
  for (let i = from; i + each <= to; i += each) {
    let timeS = 0;
    let tempC = 0;
    for (let k = i; k < i + each; k++) {
      timeS += view.timesS[k]!;
      tempC += view.tempsC[k]!;
    }
    bench.timesS[count] = timeS / each;
    bench.tempsC[count] = tempC / each;
    count++;
  }
  bench.each = each;
  bench.count = count;
  return count;
}

/** The design's columns; in the first round, with no coefficients yet, the switch stays where it is. */
function fillColumns(
  { count, timesS, columns }: QuickBench,
  { fromS, stepS, table, rows }: TurnShape,
  switchS: number,
  solution: Float64Array | null,
): void {
  const [, a1, a2, b1, b2, moves] = columns as Columns;
  const [, s1 = 0, s2 = 0, s3 = 0, s4 = 0] = solution ?? [];
  for (let i = 0; i < count; i++) {
    const place = Math.max(0, Math.min(rows - 2, (timesS[i]! - switchS - fromS) / stepS));
    const row = Math.floor(place);
    const share = place - row;
    const at = row * CURVES;
    const d1 = table[at + CURVES + 1]! - table[at + 1]!;
    const d2 = table[at + CURVES + 2]! - table[at + 2]!;
    const d3 = table[at + CURVES + 3]! - table[at + 3]!;
    const d4 = table[at + CURVES + 4]! - table[at + 4]!;
    a1[i] = table[at + 1]! + share * d1;
    a2[i] = table[at + 2]! + share * d2;
    b1[i] = table[at + 3]! + share * d3;
    b2[i] = table[at + 4]! + share * d4;
    moves[i] = -(s1 * d1 + s2 * d2 + s3 * d3 + s4 * d4) / stepS;
  }
}

type Columns = [Float64Array, Float64Array, Float64Array, Float64Array, Float64Array, Float64Array];

/**
 * Normal equations of the six columns, the first of them all ones. Written out, since a long record passes here tens of
 * thousands of times: every value is loaded once instead of nine times.
 */
function normals({ count, each, tempsC, columns }: QuickBench, noiseK: number) {
  const [, a1, a2, b1, b2, moves] = columns as Columns;
  let [s1, s2, s3, s4, s5, st] = [0, 0, 0, 0, 0, 0];
  let [s11, s12, s13, s14, s15, s1t] = [0, 0, 0, 0, 0, 0];
  let [s22, s23, s24, s25, s2t] = [0, 0, 0, 0, 0];
  let [s33, s34, s35, s3t] = [0, 0, 0, 0];
  let [s44, s45, s4t] = [0, 0, 0];
  let [s55, s5t] = [0, 0];
  for (let i = 0; i < count; i++) {
    const v1 = a1[i]!;
    const v2 = a2[i]!;
    const v3 = b1[i]!;
    const v4 = b2[i]!;
    const v5 = moves[i]!;
    const t = tempsC[i]!;
    s1 += v1;
    s2 += v2;
    s3 += v3;
    s4 += v4;
    s5 += v5;
    st += t;
    s11 += v1 * v1;
    s12 += v1 * v2;
    s13 += v1 * v3;
    s14 += v1 * v4;
    s15 += v1 * v5;
    s1t += v1 * t;
    s22 += v2 * v2;
    s23 += v2 * v3;
    s24 += v2 * v4;
    s25 += v2 * v5;
    s2t += v2 * t;
    s33 += v3 * v3;
    s34 += v3 * v4;
    s35 += v3 * v5;
    s3t += v3 * t;
    s44 += v4 * v4;
    s45 += v4 * v5;
    s4t += v4 * t;
    s55 += v5 * v5;
    s5t += v5 * t;
  }
  // prettier-ignore
  const matrix = Float64Array.of(
    count, 0, 0, 0, 0, 0,
    s1, s11, 0, 0, 0, 0,
    s2, s12, s22, 0, 0, 0,
    s3, s13, s23, s33, 0, 0,
    s4, s14, s24, s34, s44, 0,
    s5, s15, s25, s35, s45, s55,
  );
  const right = Float64Array.of(st, s1t, s2t, s3t, s4t, s5t);
  const weight = each / (noiseK * noiseK);
  for (let i = 0; i < matrix.length; i++) matrix[i]! *= weight;
  for (let i = 0; i < right.length; i++) right[i]! *= weight;
  return { matrix, right };
}

/** Ramps are small; a coefficient that the readings leave open stays finite. */
function addBeliefs(matrix: Float64Array, { rampKPerS }: QuickTask, first: boolean): void {
  matrix[1 * UNKNOWNS + 1]! += 1 / (rampKPerS * rampKPerS);
  matrix[3 * UNKNOWNS + 3]! += 1 / (rampKPerS * rampKPerS);
  matrix[2 * UNKNOWNS + 2]! += 1e-8;
  matrix[4 * UNKNOWNS + 4]! += 1e-8;
  matrix[CURVES * UNKNOWNS + CURVES]! += first ? 1 : 1e-6;
}

function readOff(
  task: QuickTask,
  switchS: number,
  solution: Float64Array,
  factor: Float64Array,
): QuickTurn | null {
  const { shape, sign } = task;
  const mostS = Math.min(task.endS - switchS, 20 * 40 * shape.stepS);
  let bestS = 0;
  let best = -Infinity;
  const coarse = 8 * shape.stepS;
  for (let sinceS = 0; sinceS <= mostS; sinceS += coarse) {
    const value = sign * valueAt(shape, sinceS, solution);
    if (value < best) break;
    best = value;
    bestS = sinceS;
  }
  // The parabola through three places of the smooth curve.
  const before = sign * valueAt(shape, Math.max(0, bestS - coarse), solution);
  const after = sign * valueAt(shape, bestS + coarse, solution);
  const bend = before - 2 * best + after;
  if (bestS > 0 && bend < 0) bestS += (0.5 * coarse * (before - after)) / bend;
  const gradient = new Float64Array(UNKNOWNS);
  const errorAt = (sinceS: number, moves: boolean) => {
    curvesAt(shape, sinceS, gradient);
    gradient[CURVES] = moves ? 0 : -slopeAt(shape, sinceS, solution);
    return gradientError(factor, gradient, UNKNOWNS);
  };
  const errorK = errorAt(bestS, false);
  const switchErrorK = errorAt(0, true);
  gradient.fill(0);
  gradient[CURVES] = 1;
  const turn = {
    timeS: switchS + bestS,
    tempC: valueAt(shape, bestS, solution),
    errorK,
    switchS,
    switchC: valueAt(shape, 0, solution),
    switchErrorS: gradientError(factor, gradient, UNKNOWNS),
    switchErrorK,
  };
  return Object.values(turn).every(Number.isFinite) ? turn : null;
}

function curvesAt(
  { fromS, stepS, table, rows }: TurnShape,
  sinceS: number,
  into: Float64Array,
): void {
  const place = Math.max(0, Math.min(rows - 2, (sinceS - fromS) / stepS));
  const row = Math.floor(place);
  const share = place - row;
  const at = row * CURVES;
  for (let j = 0; j < CURVES; j++) {
    into[j] = table[at + j]! * (1 - share) + table[at + CURVES + j]! * share;
  }
}

function valueAt(
  { fromS, stepS, table, rows }: TurnShape,
  sinceS: number,
  by: Float64Array,
): number {
  const place = Math.max(0, Math.min(rows - 2, (sinceS - fromS) / stepS));
  const row = Math.floor(place);
  const share = place - row;
  let value = 0;
  for (let j = 0; j < CURVES; j++) {
    const at = row * CURVES + j;
    value += by[j]! * (table[at]! * (1 - share) + table[at + CURVES]! * share);
  }
  return value;
}

function slopeAt(
  { fromS, stepS, table, rows }: TurnShape,
  sinceS: number,
  by: Float64Array,
): number {
  const row = Math.floor(Math.max(0, Math.min(rows - 2, (sinceS - fromS) / stepS)));
  let slope = 0;
  for (let j = 0; j < CURVES; j++) {
    const at = row * CURVES + j;
    slope += by[j]! * (table[at + CURVES]! - table[at]!);
  }
  return slope / stepS;
}
