import { gradientError } from '../statistics/solve-normal.ts';
import { studentTQuantile } from '../statistics/student-t.ts';
import { median } from '../statistics/quantile.ts';
import type { FittedLegs, LegProblem } from './fit-legs.ts';
import type { WindowValues } from './gather-values.ts';
import {
  legAt,
  lagsOf,
  LN_LAG,
  LN_TAU_COOL,
  LN_TAU_FIRST,
  LN_TAU_HEAT,
  LOGIT_RATIO,
  parameterCount,
  placeOfRamp,
  placeOfNode,
  placeOfSwitch,
  SHARED,
  solveLegs,
  type LegShape,
  type SolvedLegs,
} from './lagged-legs.ts';
import type { LocatedTurn, RoughTurn } from './locate-turns.ts';
import type { FitWindow } from './plan-windows.ts';

/** What is believed of the lags and legs before the fit, as shares of a usual leg; k = 1, in e-folds. */
const LAG_SHARE = 0.09;
const LAG_LOOSENESS = 1;
const TAU_SHARE = 1.1;
const TAU_LOOSENESS = 0.8;
/** How much of a leg's swing may be a steady ramp; k = 1. */
const RAMP_SHARE = 0.4;
/** The fit's own noise is not believed under this share of the readings' noise. */
const LEAST_NOISE_SHARE = 0.1;
/** A switch instant less certain than this share of the leg after it is not shown by the record. */
const MOST_SWITCH_U = 0.35;
/** A real machine has more than two lags, which shifts the switches found: widened by what that took in simulations. */
const SWITCH_WIDENING = 1.35;

/**
 * The problem of fitting a window's turns with first-order legs of their own.
 *
 * @param shared time constants of a window fitted before; null for the first
 * @returns null where values are too few
 */
export function firstOrderProblem(
  values: WindowValues,
  own: RoughTurn[],
  window: FitWindow,
  noiseK: number,
  shared: Float64Array | null,
): LegProblem | null {
  if (values.timesS.length < 2 * own.length + 3) return null;
  const shape: LegShape = {
    switches: own.length,
    heatsFirst: own[0]!.kind === 'peak',
    startS: window.startS,
    endS: window.endS,
  };
  const start = new Float64Array(parameterCount(shape));
  const looseness = new Float64Array(start.length);
  const cuts = [window.startS, ...own.map((turn) => turn.timeS), window.endS];
  const usualS = median(cuts.slice(1).map((cut, i) => cut - cuts[i]!));
  const lagS = shared ? Math.exp(shared[LN_LAG]!) : LAG_SHARE * usualS;
  const shareds = shared ?? [
    Math.log(TAU_SHARE * usualS),
    Math.log(TAU_SHARE * usualS),
    Math.log(TAU_SHARE * usualS),
    Math.log(lagS),
    0,
  ];
  for (let j = 0; j < SHARED; j++) start[j] = shareds[j]!;
  looseness[LN_TAU_HEAT] = shared ? 0.4 : TAU_LOOSENESS;
  looseness[LN_TAU_COOL] = shared ? 0.4 : TAU_LOOSENESS;
  looseness[LN_TAU_FIRST] = 1.2;
  looseness[LN_LAG] = shared ? 0.2 : LAG_LOOSENESS;
  looseness[LOGIT_RATIO] = shared ? 0.8 : 3;

  const nodes = [
    values.tempsC[0]!,
    ...own.map((turn) => turn.tempC),
    values.tempsC[values.tempsC.length - 1]!,
  ];
  const swings = nodes.slice(1).map((node, i) => Math.abs(node - nodes[i]!));
  const greatK = Math.max(...swings, 10 * noiseK, 0.01);
  own.forEach((turn, k) => {
    start[placeOfSwitch(k)] = Math.max(
      turn.timeS - 0.8 * lagS,
      cuts[k]! + 0.3 * (turn.timeS - cuts[k]!),
    );
    looseness[placeOfSwitch(k)] = 2 * usualS;
  });
  nodes.forEach((node, k) => {
    start[placeOfNode(shape, k)] = node;
    looseness[placeOfNode(shape, k)] = 3 * greatK;
  });
  swings.forEach((swing, leg) => {
    looseness[placeOfRamp(shape, leg)] = RAMP_SHARE * Math.max(swing, 0.3 * greatK);
  });
  const { timesS, tempsC, weights, averaged } = values;
  const leastNoiseK = Math.max((LEAST_NOISE_SHARE * noiseK) / Math.sqrt(averaged), 1e-3);
  return { shape, timesS, tempsC, weights, start, looseness, leastNoiseK };
}

/** Reads one turn off a fit, with the uncertainty that the parameters' covariance gives it. */
export function readTurn(fit: FittedLegs, k: number, kind: 'peak' | 'valley'): LocatedTurn | null {
  const { shape, parameters } = fit;
  const solved = solveLegs(parameters, shape);
  const switchS = parameters[placeOfSwitch(k)]!;
  const nextS = k + 1 < shape.switches ? parameters[placeOfSwitch(k + 1)]! : shape.endS;
  const { lagAS, lagBS } = lagsOf(parameters);
  const untilS = Math.min(nextS, switchS + 10 * (lagAS + lagBS));
  const timeS = extremeBetween(solved, k + 1, switchS, untilS, kind === 'peak' ? 1 : -1);
  const coverage = coverageFactor(fit.degrees);
  const uK = coverage * temperatureError(fit, k + 1, timeS);
  const error = new Float64Array(parameters.length);
  error[placeOfSwitch(k)] = 1;
  const switchCoverage = SWITCH_WIDENING * coverage;
  const uS = switchCoverage * gradientError(fit.factor, error, parameters.length);
  const tempC = legAt(solved, k + 1, timeS);
  if (!Number.isFinite(tempC + uK + timeS + uS)) return null;
  if (uS > MOST_SWITCH_U * (nextS - switchS)) return { timeS, tempC, uK, switched: null };
  const switchUK = switchCoverage * temperatureError(fit, k, switchS, placeOfSwitch(k));
  const switched = { timeS: switchS, tempC: legAt(solved, k, switchS), uS, uK: switchUK };
  return { timeS, tempC, uK, switched };
}

/** Two standard deviations of a normal variable cover 95.45 %; with few degrees of freedom it takes more. */
export function coverageFactor(degrees: number): number {
  return studentTQuantile(0.97725, Math.max(1.5, degrees));
}

/** Standard error of a leg's temperature at a time, or at the switch whose place is given. */
function temperatureError(
  fit: FittedLegs,
  leg: number,
  fixedS: number,
  switchPlace: number | null = null,
): number {
  const { parameters, shape } = fit;
  const gradient = new Float64Array(parameters.length);
  const at = () => {
    const timeS = switchPlace === null ? fixedS : parameters[switchPlace]!;
    return legAt(solveLegs(parameters, shape), leg, timeS);
  };
  for (let j = 0; j < parameters.length; j++) {
    const step = j < SHARED || j < placeOfNode(shape, 0) ? 1e-4 : 1e-2;
    const kept = parameters[j]!;
    parameters[j] = kept + step;
    const above = at();
    parameters[j] = kept - step;
    const below = at();
    parameters[j] = kept;
    gradient[j] = (above - below) / (2 * step);
  }
  return gradientError(fit.factor, gradient, parameters.length);
}

/** Time of a leg's greatest (sign 1) or least (sign −1) temperature between two times, s. */
function extremeBetween(
  solved: SolvedLegs,
  leg: number,
  fromS: number,
  toS: number,
  sign: 1 | -1,
): number {
  const places = 60;
  let best = 0;
  let bestC = -Infinity;
  for (let i = 0; i <= places; i++) {
    const tempC = sign * legAt(solved, leg, fromS + ((toS - fromS) * i) / places);
    if (tempC > bestC) {
      bestC = tempC;
      best = i;
    }
  }
  let lowS = fromS + ((toS - fromS) * Math.max(0, best - 1)) / places;
  let highS = fromS + ((toS - fromS) * Math.min(places, best + 1)) / places;
  for (let i = 0; i < 40; i++) {
    const aS = lowS + 0.382 * (highS - lowS);
    const bS = lowS + 0.618 * (highS - lowS);
    if (sign * legAt(solved, leg, aS) < sign * legAt(solved, leg, bS)) lowS = aS;
    else highS = bS;
  }
  return (lowS + highS) / 2;
}
