import { choleskyFactor, choleskySolve } from '../statistics/solve-normal.ts';
import {
  costOf,
  degreesLeft,
  factorOf,
  learnNoise,
  learnSpread,
  levelDistance,
  NOISE_BELIEVED,
  normalSystem,
  spreadEvidence,
  type NormalSystem,
  type PlantProblem,
  type PlantState,
} from './plant-system.ts';
import { plantTemps, SHARED, solvePlant, type PlantShape } from './switched-plant.ts';

export type FittedPlant = {
  shape: PlantShape;
  parameters: Float64Array;
  /** Cholesky factor of the inverse covariance of the parameters. */
  factor: Float64Array;
  noiseK: number;
  /** Values left over after the parameters that the values themselves determine. */
  degrees: number;
  /** Twice the negative log evidence (Laplace), constants left out: of two fits the lower is the likelier. */
  evidence: number;
  /** Scaled to a value of full weight. */
  residualsK: Float64Array;
};

const MOST_ROUNDS = 30;
/** Rounds in which the levels and starts alone are found, before times and time constants move. */
const LINEAR_ROUNDS = 2;
/** A round that gains less than this much of twice the log posterior is the last. */
const ENOUGH_GAIN = 0.1;
/** No shared parameter moves further at once; the whole step is shortened, so that it keeps its direction. */
const MOST_STEP = 1;
const SHORTEN = 0.4;

/**
 * Fits a switched plant by Gauss–Newton with a line search, damped only where that fails, and Huber weights. Beliefs
 * enter as one more observation a parameter, and one for each level, that it is that of the like leg before it: within
 * a spread which is learnt on the way from the levels themselves (expectation–maximisation; Dempster, Laird and Rubin
 * 1977).
 *
 * @returns null where the fit does not settle on anything finite
 */
export function fitPlant(problem: PlantProblem): FittedPlant | null {
  const n = problem.timesS.length;
  const parameters = Float64Array.from(problem.start);
  const fitted = new Float64Array(n);
  plantTemps(solvePlant(parameters, problem.shape), problem.timesS, fitted);
  const spreadK = problem.levelShare * levelDistance(problem.shape, parameters);
  let state: PlantState = {
    parameters,
    fitted,
    noiseK: learnNoise(problem, fitted, n),
    spreadK,
  };
  let damping = 1e-7;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const isLinear = round < LINEAR_ROUNDS;
    const before = costOf(problem, state);
    const system = normalSystem(problem, state);
    const factor = isLinear ? null : factorOf(system);
    if (isLinear) holdTimes(problem.shape, system.matrix);
    const stepped = improve(problem, state, system, damping);
    if (!stepped && !isLinear) break;
    if (!stepped) continue;
    const gain = before - costOf(problem, stepped.state);
    damping = Math.max(1e-9, stepped.damping / 10);
    state = learnt(problem, stepped.state, factor);
    if (!isLinear && gain < ENOUGH_GAIN) break;
  }
  return finish(problem, state);
}

/** Noise and spread as the fit now shows them. */
function learnt(problem: PlantProblem, state: PlantState, factor: Float64Array | null): PlantState {
  const spreadK = factor ? learnSpread(problem, state, factor) : state.spreadK;
  const degrees = factor ? degreesLeft(problem, spreadK, factor) : state.fitted.length;
  return { ...state, spreadK, noiseK: learnNoise(problem, state.fitted, degrees) };
}

/** One step that lowers the cost; null where none does. */
function improve(
  problem: PlantProblem,
  state: PlantState,
  { matrix, right }: NormalSystem,
  from: number,
) {
  const p = state.parameters.length;
  const cost = costOf(problem, state);
  let damping = from;
  for (let attempt = 0; attempt < 7; attempt++) {
    const damped = Float64Array.from(matrix);
    for (let j = 0; j < p; j++) damped[j * p + j]! *= 1 + damping;
    const factor = choleskyFactor(damped, p);
    const step = factor && choleskySolve(factor, right, p);
    // What the whole step would gain were the problem linear.
    if (step && step.reduce((sum, value, j) => sum + value * right[j]!, 0) < ENOUGH_GAIN)
      return null;
    for (let share = 1; step && share > 0.1; share *= SHORTEN) {
      const parameters = moved(problem.shape, state.parameters, step, share);
      const fitted = new Float64Array(state.fitted.length);
      plantTemps(solvePlant(parameters, problem.shape), problem.timesS, fitted);
      const next = { ...state, parameters, fitted };
      if (costOf(problem, next) < cost) return { state: next, damping };
    }
    damping = Math.max(damping * 30, 1e-7);
  }
  return null;
}

/** Makes the times and time constants all but fixed. */
function holdTimes({ switches }: PlantShape, matrix: Float64Array): void {
  const p = Math.sqrt(matrix.length);
  for (let j = 0; j < SHARED + switches; j++) matrix[j * p + j] = matrix[j * p + j]! * 1e9 + 1e9;
}

/** Takes a share of a step; no switch goes past its neighbour. */
function moved(
  shape: PlantShape,
  parameters: Float64Array,
  step: Float64Array,
  asked: number,
): Float64Array {
  let share = asked;
  for (let j = 0; j < SHARED; j++) {
    share = Math.min(share, (asked * MOST_STEP) / Math.abs(step[j]!));
  }
  const next = parameters.map((value, j) => value + share * step[j]!);
  for (let k = 0; k < shape.switches; k++) {
    const at = SHARED + k;
    const beforeS = k === 0 ? shape.startS : parameters[at - 1]!;
    const afterS = k === shape.switches - 1 ? shape.endS : parameters[at + 1]!;
    const lowS = parameters[at]! - 0.4 * (parameters[at]! - beforeS);
    const highS = parameters[at]! + 0.4 * (afterS - parameters[at]!);
    next[at] = Math.max(lowS, Math.min(highS, next[at]!));
  }
  return next;
}

function finish(problem: PlantProblem, state: PlantState): FittedPlant | null {
  const { shape, tempsC, weights } = problem;
  const { parameters, fitted } = state;
  if (!parameters.every(Number.isFinite)) return null;
  const found = factorOf(normalSystem(problem, state));
  if (!found) return null;
  const degrees = degreesLeft(problem, state.spreadK, found) + NOISE_BELIEVED;
  let squares = NOISE_BELIEVED * problem.believedNoiseK ** 2;
  for (let i = 0; i < fitted.length; i++) {
    const off = Math.min(Math.abs(tempsC[i]! - fitted[i]!), 3 * state.noiseK);
    squares += weights[i]! * off * off;
  }
  const noiseK = Math.max(problem.leastNoiseK, Math.sqrt(squares / degrees));
  const factor = factorOf(normalSystem(problem, { ...state, noiseK }));
  if (!factor) return null;
  const evidence = evidenceOf(problem, state, found);
  const residualsK = tempsC.map((tempC, i) => (tempC - fitted[i]!) * Math.sqrt(weights[i]!));
  return { shape, parameters, factor, noiseK, degrees, evidence, residualsK };
}

/** Twice the negative log evidence, by Laplace's approximation: the posterior's height times its width. */
function evidenceOf(problem: PlantProblem, state: PlantState, factor: Float64Array): number {
  const p = state.parameters.length;
  let evidence = costOf(problem, state) + 2 * state.fitted.length * Math.log(state.noiseK);
  for (let j = 0; j < p; j++) evidence += 2 * Math.log(factor[j * p + j]!);
  return evidence + spreadEvidence(problem, state);
}
