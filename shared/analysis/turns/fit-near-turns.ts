import { autocorrelation } from '../statistics/autocorrelation.ts';
import { fitLegs, type FittedLegs, type LegProblem } from './fit-legs.ts';
import { legsAt, LN_LAG, placeOfSwitch, solveLegs } from './lagged-legs.ts';

/** Residuals of white noise correlate less than this over √n, from one value to the next (2.3 % one-sided). */
const WHITE = 2;
/** How far from a turn a value counts in full, in lags; the next where too few values lie so near. */
const REACHES = [3, 4.5, 7];
/** An extreme comes about this long after its switch, in lags. */
const TURN_AFTER = 0.5;
/** Values near a turn for every parameter that is its own. */
const VALUES_A_PARAMETER = 1.7;

/**
 * Fits a window's legs and, where the residuals follow each other and so show that the legs are no first-order ones
 * all along (air first, drum metal later), once more with the values near the turns: there a short piece of any leg
 * is like one. What is still correlated then widens the errors, as fewer independent values would (AR(1), effective
 * number n·(1 − ρ)/(1 + ρ); Bayley and Hammersley 1946).
 *
 * @returns null where no fit holds
 */
export function fitNearTurns(problem: LegProblem): FittedLegs | null {
  const whole = fitLegs(problem);
  if (!whole) return null;
  const residuals = residualsOf(problem, whole);
  const correlation = autocorrelation(residuals);
  const lagS = Math.exp(whole.parameters[LN_LAG]!);
  const isWhite = [1, valuesIn(problem, lagS)].every((each) => looksWhite(residuals, each));
  if (isWhite) return widened(whole, correlation);
  for (const reach of REACHES) {
    const near = nearOnly(problem, whole, reach);
    const fit = near && fitLegs(near);
    if (fit) return widened(fit, autocorrelation(residualsOf(near, fit)));
  }
  return widened(whole, correlation);
}

function looksWhite(residuals: Float64Array, each: number): boolean {
  const means = meansOf(residuals, each);
  return autocorrelation(means) <= WHITE / Math.sqrt(means.length);
}

/** How many values a lag holds: a misfit lasts about so long, and noise drowns it less in the mean of as many. */
function valuesIn({ shape, timesS }: LegProblem, lagS: number): number {
  return Math.max(1, Math.round((lagS * timesS.length) / (shape.endS - shape.startS)));
}

function meansOf(values: Float64Array, each: number): Float64Array {
  return Float64Array.from({ length: Math.floor(values.length / each) }, (_, i) => {
    const block = values.subarray(i * each, (i + 1) * each);
    return block.reduce((sum, value) => sum + value, 0) / each;
  });
}

/** The same problem with the values far from any turn counting little; null where too few lie near. */
function nearOnly(problem: LegProblem, fit: FittedLegs, reach: number): LegProblem | null {
  const { timesS, weights } = problem;
  const lagS = Math.exp(fit.parameters[LN_LAG]!);
  const shares = timesS.map(
    (timeS) => 1 / (1 + (distanceS(fit, timeS, lagS) / (reach * lagS)) ** 2) ** 2,
  );
  const nears = shares.map((share) => (share > 0.25 ? 1 : 0));
  const count = nears.reduce((sum, near) => sum + near, 0);
  if (count < VALUES_A_PARAMETER * fit.parameters.length) return null;
  return { ...problem, weights: weights.map((weight, i) => weight * shares[i]!), nears };
}

function distanceS({ shape, parameters }: FittedLegs, timeS: number, lagS: number): number {
  let leastS = Infinity;
  for (let k = 0; k < shape.switches; k++) {
    const turnS = parameters[placeOfSwitch(k)]! + TURN_AFTER * lagS;
    leastS = Math.min(leastS, Math.abs(timeS - turnS));
  }
  return leastS;
}

/** Residuals over their deviation, in runs: NaN parts what does not follow on. */
function residualsOf({ timesS, tempsC, nears }: LegProblem, fit: FittedLegs): Float64Array {
  const residuals = new Float64Array(timesS.length);
  legsAt(solveLegs(fit.parameters, fit.shape), timesS, residuals);
  for (let i = 0; i < residuals.length; i++) {
    const off = (tempsC[i]! - residuals[i]!) / fit.noiseK;
    residuals[i] = nears && nears[i] === 0 ? NaN : Math.max(-3, Math.min(3, off));
  }
  return residuals;
}

function widened(fit: FittedLegs, correlation: number): FittedLegs {
  const followed = Math.max(0, Math.min(0.9, correlation));
  const factor = Math.sqrt((1 - followed) / (1 + followed));
  return { ...fit, factor: fit.factor.map((entry) => entry * factor) };
}
