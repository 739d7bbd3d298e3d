import { median } from '../statistics/quantile.ts';
import { choleskyFactor, gradientError } from '../statistics/solve-normal.ts';
import {
  parameterCount,
  placeOfLevel,
  placeOfStart,
  plantSlopes,
  type PlantShape,
} from './switched-plant.ts';

/** What the readings of a window are fitted with. */
export type PlantProblem = {
  shape: PlantShape;
  timesS: Float64Array;
  tempsC: Float64Array;
  /** Readings behind each value over the usual number. */
  weights: Float64Array;
  /** What is believed before the fit: the starting values, and how far off they may be (k = 1). */
  start: Float64Array;
  looseness: Float64Array;
  /** How far like legs' levels lie from one to the next before that is learnt, as a share of the levels' distance. */
  levelShare: number;
  /** Least standard deviation of a value, K, and what is believed of it where few values are left over to tell. */
  leastNoiseK: number;
  believedNoiseK: number;
};

/** Where a fit has come to. */
export type PlantState = {
  parameters: Float64Array;
  fitted: Float64Array;
  /** Standard deviation of a value, and of the steps from like leg to like leg, K. */
  noiseK: number;
  spreadK: number;
};

export type NormalSystem = { matrix: Float64Array; right: Float64Array };

/** Residuals beyond this many deviations count less (Huber, 1964). */
const HUBER = 2.5;
/** Degrees of freedom of the spread from like leg to like leg: a single odd leg counts less (Student's t). */
const LEVEL_DEGREES = 4;
/** The spread of levels is learnt as if from so many legs before the first, the noise as if from so many values. */
const LEVELS_BELIEVED = 3;
export const NOISE_BELIEVED = 4;

/** Twice the negative log posterior, constants and the noise's own term left out. */
export function costOf(
  problem: PlantProblem,
  { parameters, fitted, noiseK, spreadK }: PlantState,
): number {
  const { shape, tempsC, weights, start, looseness } = problem;
  let cost = 0;
  for (let i = 0; i < fitted.length; i++) {
    const off = (Math.abs(tempsC[i]! - fitted[i]!) * Math.sqrt(weights[i]!)) / noiseK;
    cost += off < HUBER ? off * off : HUBER * (2 * off - HUBER);
  }
  for (let j = 0; j < parameters.length; j++) {
    cost += ((parameters[j]! - start[j]!) / looseness[j]!) ** 2;
  }
  for (let leg = 2; leg <= shape.switches; leg++) {
    const off = levelStep(shape, parameters, leg) / spreadK;
    cost += (LEVEL_DEGREES + 1) * Math.log1p((off * off) / LEVEL_DEGREES);
  }
  return cost;
}

/** Normal equations of the linearised problem: values, beliefs, and that like legs' levels follow each other. */
export function normalSystem(problem: PlantProblem, state: PlantState): NormalSystem {
  const { shape, timesS, tempsC, weights, start, looseness } = problem;
  const { parameters, fitted, noiseK } = state;
  const p = parameterCount(shape);
  const slopes = plantSlopes(parameters, shape, timesS);
  const matrix = new Float64Array(p * p);
  const right = new Float64Array(p);
  const active = new Int32Array(p);
  for (let i = 0; i < timesS.length; i++) {
    const offK = tempsC[i]! - fitted[i]!;
    const off = (Math.abs(offK) * Math.sqrt(weights[i]!)) / noiseK;
    const importance = (weights[i]! / (noiseK * noiseK)) * (off < HUBER ? 1 : HUBER / off);
    addRow({ matrix, right }, slopes.subarray(i * p, (i + 1) * p), importance, offK, active);
  }
  for (let j = 0; j < p; j++) {
    const belief = 1 / looseness[j]! ** 2;
    matrix[j * p + j]! += belief;
    right[j]! += belief * (start[j]! - parameters[j]!);
  }
  addLevelBeliefs({ matrix, right }, shape, state);
  return { matrix, right };
}

/** One value's part; a switch still to come has no slope there and is passed over. */
function addRow(
  { matrix, right }: NormalSystem,
  slopes: Float64Array,
  importance: number,
  offK: number,
  active: Int32Array,
): void {
  const p = right.length;
  let count = 0;
  for (let j = 0; j < p; j++) if (slopes[j] !== 0) active[count++] = j;
  for (let x = 0; x < count; x++) {
    const a = active[x]!;
    const scaled = importance * slopes[a]!;
    for (let y = 0; y <= x; y++) {
      const b = active[y]!;
      matrix[a * p + b]! += scaled * slopes[b]!;
    }
    right[a]! += scaled * offK;
  }
}

function addLevelBeliefs(
  { matrix, right }: NormalSystem,
  shape: PlantShape,
  { parameters, spreadK }: PlantState,
): void {
  const p = right.length;
  for (let leg = 2; leg <= shape.switches; leg++) {
    const stepK = levelStep(shape, parameters, leg);
    const belief = levelWeight(stepK, spreadK) / (spreadK * spreadK);
    const now = placeOfLevel(shape, leg);
    const then = placeOfLevel(shape, leg - 2);
    matrix[now * p + now]! += belief;
    matrix[then * p + then]! += belief;
    matrix[now * p + then]! -= belief;
    right[now]! -= belief * stepK;
    right[then]! += belief * stepK;
  }
}

function levelStep(shape: PlantShape, parameters: Float64Array, leg: number): number {
  return parameters[placeOfLevel(shape, leg)]! - parameters[placeOfLevel(shape, leg - 2)]!;
}

/** How much a step between like legs counts: less the further out it is. */
function levelWeight(stepK: number, spreadK: number): number {
  const off = stepK / spreadK;
  return (LEVEL_DEGREES + 1) / (LEVEL_DEGREES + off * off);
}

/** How far the two kinds of legs' levels lie apart, K. */
export function levelDistance(shape: PlantShape, parameters: Float64Array): number {
  return Math.abs(parameters[placeOfLevel(shape, 1)]! - parameters[placeOfLevel(shape, 0)]!);
}

/** The spread that the levels show, each step's own uncertainty counted, with what was believed of it before, K. */
export function learnSpread(
  { shape, levelShare }: PlantProblem,
  { parameters, spreadK }: PlantState,
  factor: Float64Array,
): number {
  const p = parameters.length;
  const believedK = levelShare * levelDistance(shape, parameters);
  let squares = LEVELS_BELIEVED * believedK * believedK;
  for (let leg = 2; leg <= shape.switches; leg++) {
    const gradient = new Float64Array(p);
    gradient[placeOfLevel(shape, leg)] = 1;
    gradient[placeOfLevel(shape, leg - 2)] = -1;
    const errorK = gradientError(factor, gradient, p);
    const stepK = levelStep(shape, parameters, leg);
    squares += levelWeight(stepK, spreadK) * (stepK * stepK + errorK * errorK);
  }
  return Math.sqrt(squares / (LEVELS_BELIEVED + Math.max(0, shape.switches - 1)));
}

/** The spread's own part in twice the negative log posterior: a wide one explains any levels, but none well. */
export function spreadEvidence(
  { shape, levelShare }: PlantProblem,
  { parameters, spreadK }: PlantState,
): number {
  const wider = spreadK / (levelShare * levelDistance(shape, parameters));
  const steps = Math.max(0, shape.switches - 1);
  return (
    2 * steps * Math.log(spreadK) + LEVELS_BELIEVED * (2 * Math.log(wider) + 1 / (wider * wider))
  );
}

/**
 * The deviation of a value, K: robust, for the degrees of freedom that are left, and drawn to what is believed of it
 * where these are few.
 */
export function learnNoise(problem: PlantProblem, fitted: Float64Array, degrees: number): number {
  const { tempsC, weights, leastNoiseK, believedNoiseK } = problem;
  const offs = tempsC.map((tempC, i) => Math.abs(tempC - fitted[i]!) * Math.sqrt(weights[i]!));
  const squares = offs.length * (1.4826 * median(offs)) ** 2;
  const believed = NOISE_BELIEVED * believedNoiseK * believedNoiseK;
  return Math.max(leastNoiseK, Math.sqrt((squares + believed) / (degrees + NOISE_BELIEVED)));
}

/** How many values are left over after what they determine: a parameter that only its belief holds up counts as none. */
export function degreesLeft(problem: PlantProblem, spreadK: number, factor: Float64Array): number {
  const { shape, looseness } = problem;
  const p = looseness.length;
  let determined = 0;
  const unit = new Float64Array(p);
  for (let j = 0; j < p; j++) {
    unit.fill(0);
    unit[j] = 1;
    const isTied = j >= placeOfLevel(shape, 2) && j < placeOfStart(shape, 0);
    const believed = isTied ? spreadK : looseness[j]!;
    determined += Math.max(0, 1 - (gradientError(factor, unit, p) / believed) ** 2);
  }
  return Math.max(1, problem.timesS.length - determined);
}

/** Cholesky factor of a system's matrix; null where it is not positive definite. */
export function factorOf({ matrix, right }: NormalSystem): Float64Array | null {
  return choleskyFactor(matrix, right.length);
}
