import { firstAtOrAfter } from '../first-at-or-after.ts';
import { median } from '../statistics/quantile.ts';
import { choleskyFactor, choleskySolve } from '../statistics/solve-normal.ts';
import {
  legsAt,
  LN_LAG,
  parameterCount,
  placeOfRamp,
  placeOfNode,
  placeOfSwitch,
  SHARED,
  solveLegs,
  type LegShape,
} from './lagged-legs.ts';

/** What the readings of a window are fitted with. */
export type LegProblem = {
  shape: LegShape;
  timesS: Float64Array;
  tempsC: Float64Array;
  /** Readings behind each value over the usual number. */
  weights: Float64Array;
  /** What is believed before the fit: the starting values, and how far off they may be (k = 1). */
  start: Float64Array;
  looseness: Float64Array;
  /** Least standard deviation of a value, K. */
  leastNoiseK: number;
  /** 1 for each value that the noise is estimated from, 0 for one that counts too little; absent: all. */
  nears?: Float64Array;
};

export type FittedLegs = {
  shape: LegShape;
  parameters: Float64Array;
  /** Cholesky factor of the inverse covariance of the parameters. */
  factor: Float64Array;
  noiseK: number;
  /** Values left over after the parameters that the values themselves determine. */
  degrees: number;
};

const MOST_ROUNDS = 30;
/** Residuals beyond this many deviations count less (Huber, 1964). */
const HUBER = 2.5;

/**
 * Fits lagged legs to a window by damped Gauss–Newton with Huber weights; what is believed beforehand enters as
 * one more observation a parameter.
 *
 * @returns null where the fit does not settle on anything finite
 */
export function fitLegs(problem: LegProblem): FittedLegs | null {
  const n = problem.timesS.length;
  const p = parameterCount(problem.shape);
  let parameters: Float64Array = Float64Array.from(problem.start);
  const fitted = new Float64Array(n);
  legsAt(solveLegs(parameters, problem.shape), problem.timesS, fitted);
  let noiseK = robustNoise(problem, fitted);
  let damping = 1e-3;
  let cost = costOf(problem, parameters, fitted, noiseK);
  const tried = new Float64Array(n);
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const system = normalSystem(problem, parameters, fitted, noiseK);
    let improved = false;
    for (let attempt = 0; attempt < 8 && !improved; attempt++) {
      const step = dampedStep(system, p, damping);
      if (!step) {
        damping = Math.max(damping * 10, 1e-6);
        continue;
      }
      const next = stepped(problem.shape, parameters, step);
      legsAt(solveLegs(next, problem.shape), problem.timesS, tried);
      const nextCost = costOf(problem, next, tried, noiseK);
      if (!(nextCost < cost)) {
        damping = Math.max(damping * 8, 1e-6);
        continue;
      }
      improved = true;
      const gain = cost - nextCost;
      parameters = next;
      fitted.set(tried);
      damping = Math.max(damping / 6, 1e-9);
      if (gain < 1e-4 * Math.max(1, cost) && round > 3) round = MOST_ROUNDS;
    }
    if (!improved) break;
    noiseK = robustNoise(problem, fitted);
    cost = costOf(problem, parameters, fitted, noiseK);
  }
  return finish(problem, parameters, fitted, noiseK);
}

type NormalSystem = { matrix: Float64Array; right: Float64Array };

function finish(
  problem: LegProblem,
  parameters: Float64Array,
  fitted: Float64Array,
  noiseK: number,
): FittedLegs | null {
  const n = problem.timesS.length;
  const p = parameterCount(problem.shape);
  const { matrix } = normalSystem(problem, parameters, fitted, noiseK);
  const factor = choleskyFactor(matrix, p);
  if (!factor || !parameters.every(Number.isFinite)) return null;
  // How many parameters the values determine: one that only its belief holds up counts as none.
  let determined = 0;
  const unit = new Float64Array(p);
  for (let j = 0; j < p; j++) {
    unit.fill(0);
    unit[j] = 1;
    const variance = choleskySolve(factor, unit, p)[j]!;
    determined += Math.max(0, 1 - variance / problem.looseness[j]! ** 2);
  }
  const degrees = Math.max(1, (problem.nears ? sumOf(problem.weights) : n) - determined);
  let squares = 0;
  for (let i = 0; i < n; i++) {
    const off = Math.min(Math.abs(problem.tempsC[i]! - fitted[i]!), 3 * noiseK);
    squares += problem.weights[i]! * off * off;
  }
  const finalK = Math.max(problem.leastNoiseK, Math.sqrt(squares / degrees));
  const rescaled = choleskyFactor(normalSystem(problem, parameters, fitted, finalK).matrix, p);
  return (
    rescaled && { shape: problem.shape, parameters, factor: rescaled, noiseK: finalK, degrees }
  );
}

function robustNoise(problem: LegProblem, fitted: Float64Array): number {
  const offs = new Float64Array(fitted.length);
  for (let i = 0; i < offs.length; i++) {
    offs[i] = Math.abs(problem.tempsC[i]! - fitted[i]!) * Math.sqrt(problem.weights[i]!);
  }
  const { nears } = problem;
  const used = nears ? offs.filter((_, i) => nears[i] === 1) : offs;
  return Math.max(problem.leastNoiseK, 1.4826 * median(used));
}

function sumOf(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0);
}

function costOf(
  problem: LegProblem,
  parameters: Float64Array,
  fitted: Float64Array,
  noiseK: number,
): number {
  let cost = 0;
  for (let i = 0; i < fitted.length; i++) {
    const off =
      (Math.abs(problem.tempsC[i]! - fitted[i]!) * Math.sqrt(problem.weights[i]!)) / noiseK;
    cost += off < HUBER ? off * off : HUBER * (2 * off - HUBER);
  }
  for (let j = 0; j < parameters.length; j++) {
    cost += ((parameters[j]! - problem.start[j]!) / problem.looseness[j]!) ** 2;
  }
  return cost;
}

function normalSystem(
  problem: LegProblem,
  parameters: Float64Array,
  fitted: Float64Array,
  noiseK: number,
): NormalSystem {
  const { shape, timesS, tempsC, weights } = problem;
  const n = timesS.length;
  const p = parameters.length;
  const columns: { from: number; to: number; slopes: Float64Array }[] = [];
  const pushed = new Float64Array(n);
  for (let j = 0; j < p; j++) {
    const [from, to] = touched(shape, parameters, timesS, j);
    const step = stepFor(shape, parameters, j);
    const before = parameters[j]!;
    parameters[j] = before + step;
    legsAt(solveLegs(parameters, shape), timesS, pushed, from, to);
    parameters[j] = before;
    const slopes = new Float64Array(n);
    for (let i = from; i < to; i++) slopes[i] = (pushed[i]! - fitted[i]!) / step;
    columns.push({ from, to, slopes });
  }
  const importance = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const off = (Math.abs(tempsC[i]! - fitted[i]!) * Math.sqrt(weights[i]!)) / noiseK;
    importance[i] = (weights[i]! / (noiseK * noiseK)) * (off < HUBER ? 1 : HUBER / off);
  }
  const matrix = new Float64Array(p * p);
  const right = new Float64Array(p);
  for (let a = 0; a < p; a++) {
    const one = columns[a]!;
    for (let b = 0; b <= a; b++) {
      const two = columns[b]!;
      const to = Math.min(one.to, two.to);
      let sum = 0;
      for (let i = Math.max(one.from, two.from); i < to; i++) {
        sum += importance[i]! * one.slopes[i]! * two.slopes[i]!;
      }
      matrix[a * p + b] = sum;
    }
    let sum = 0;
    for (let i = one.from; i < one.to; i++) {
      sum += importance[i]! * one.slopes[i]! * (tempsC[i]! - fitted[i]!);
    }
    const belief = 1 / problem.looseness[a]! ** 2;
    matrix[a * p + a]! += belief;
    right[a] = sum + belief * (problem.start[a]! - parameters[a]!);
  }
  return { matrix, right };
}

function dampedStep({ matrix, right }: NormalSystem, p: number, damping: number) {
  const damped = Float64Array.from(matrix);
  for (let j = 0; j < p; j++) damped[j * p + j]! *= 1 + damping;
  const factor = choleskyFactor(damped, p);
  return factor && choleskySolve(factor, right, p);
}

/** Takes a step, but no shared parameter by more than e-fold's half, and no switch past its neighbour. */
function stepped(shape: LegShape, parameters: Float64Array, step: Float64Array): Float64Array {
  const next = Float64Array.from(parameters);
  for (let j = 0; j < next.length; j++) {
    const most = j < SHARED ? 0.7 : Infinity;
    next[j]! += Math.max(-most, Math.min(most, step[j]!));
  }
  for (let k = 0; k < shape.switches; k++) {
    const at = placeOfSwitch(k);
    const beforeS = k === 0 ? shape.startS : parameters[at - 1]!;
    const afterS = k === shape.switches - 1 ? shape.endS : parameters[at + 1]!;
    const lowS = parameters[at]! - 0.4 * (parameters[at]! - beforeS);
    const highS = parameters[at]! + 0.4 * (afterS - parameters[at]!);
    next[at] = Math.max(lowS, Math.min(highS, next[at]!));
  }
  return next;
}

/** Which values a parameter can move: its own legs and the lags' tail in the one after. */
function touched(
  shape: LegShape,
  parameters: Float64Array,
  timesS: Float64Array,
  j: number,
): [number, number] {
  let firstLeg: number;
  let lastLeg: number;
  if (j < SHARED) return [0, timesS.length];
  if (j < placeOfNode(shape, 0)) {
    firstLeg = j - SHARED;
    lastLeg = firstLeg + 2;
  } else if (j < placeOfRamp(shape, 0)) {
    firstLeg = j - placeOfNode(shape, 0) - 1;
    lastLeg = firstLeg + 2;
  } else {
    firstLeg = j - placeOfRamp(shape, 0);
    lastLeg = firstLeg + 1;
  }
  const fromS = firstLeg <= 0 ? -Infinity : parameters[placeOfSwitch(firstLeg - 1)]!;
  const toS = lastLeg >= shape.switches ? Infinity : parameters[placeOfSwitch(lastLeg)]!;
  return [firstAtOrAfter(timesS, fromS), firstAtOrAfter(timesS, toS)];
}

function stepFor(shape: LegShape, parameters: Float64Array, j: number): number {
  if (j < SHARED) return 1e-4;
  if (j >= placeOfNode(shape, 0)) return 0.01;
  return 1e-3 * Math.exp(parameters[LN_LAG]!);
}
