import type { BinnedView } from '../run-facts.ts';
import { choleskyFactor, choleskySolve, gradientError } from '../statistics/solve-normal.ts';
import { fillColumns, normals, takeValues, type QuickBench } from './quick-bench.ts';
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
