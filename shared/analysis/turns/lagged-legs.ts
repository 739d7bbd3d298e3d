/**
 * The shape of a heat/cool record as the turns are fitted: between switches the exhaust follows first-order legs,
 * and two lags in a row (heater box, probe) round every corner.
 *
 * Parameters, one flat array: ln τ heating, ln τ cooling (s); ln of the sum of the two lags (s); logit of their
 * ratio; then the switch times (s); the unlagged temperature at the window's start, at each switch and at the
 * window's end (°C); and each leg's departure from first order at its middle (K).
 */
export type LegShape = {
  /** Number of switches in the window; legs are one more. */
  switches: number;
  /** Whether the window's first leg heats. */
  heatsFirst: boolean;
  startS: number;
  endS: number;
};

/** Places of the parameters in the flat array. */
export const LN_TAU_HEAT = 0;
export const LN_TAU_COOL = 1;
export const LN_LAG = 2;
export const LOGIT_RATIO = 3;
export const SHARED = 4;

export function placeOfSwitch(k: number): number {
  return SHARED + k;
}

export function placeOfNode(shape: LegShape, k: number): number {
  return SHARED + shape.switches + k;
}

export function placeOfBend(shape: LegShape, leg: number): number {
  return SHARED + 2 * shape.switches + 2 + leg;
}

export function parameterCount(shape: LegShape): number {
  return SHARED + 3 * shape.switches + 3;
}

/** Coefficients of one leg in closed form, 9 numbers: see `legAt`. */
const WIDTH = 9;

/** The legs in closed form, ready to be evaluated at any time. */
export type SolvedLegs = { coefficients: Float64Array; lagAS: number; lagBS: number; legs: number };

/** The two lags, s, the longer first; kept apart since equal ones would divide by zero. */
export function lagsOf(parameters: Float64Array): { lagAS: number; lagBS: number } {
  const sumS = Math.exp(parameters[LN_LAG]!);
  const ratio = 0.02 + 0.93 / (1 + Math.exp(-parameters[LOGIT_RATIO]!));
  return { lagAS: sumS / (1 + ratio), lagBS: (sumS * ratio) / (1 + ratio) };
}

/**
 * Solves the two lags over the legs, each analytically: an exponential plus a parabola goes through a first-order
 * lag as an exponential plus a parabola plus the lag's own decaying exponential.
 */
export function solveLegs(parameters: Float64Array, shape: LegShape): SolvedLegs {
  const { lagAS, lagBS } = lagsOf(parameters);
  const legs = shape.switches + 1;
  const coefficients = new Float64Array(legs * WIDTH);
  let afterA = NaN;
  let afterB = NaN;
  for (let leg = 0; leg < legs; leg++) {
    const heats = (leg % 2 === 0) === shape.heatsFirst;
    const fromS = leg === 0 ? shape.startS : parameters[placeOfSwitch(leg - 1)]!;
    const toS = leg === legs - 1 ? shape.endS : parameters[placeOfSwitch(leg)]!;
    const lengthS = Math.max(toS - fromS, 1e-3);
    let tauS = Math.exp(parameters[heats ? LN_TAU_HEAT : LN_TAU_COOL]!);
    if (Math.abs(tauS - lagAS) < 1e-3 * tauS || Math.abs(tauS - lagBS) < 1e-3 * tauS) tauS *= 1.003;
    const fromC = parameters[placeOfNode(shape, leg)]!;
    const toC = parameters[placeOfNode(shape, leg + 1)]!;
    const end = Math.exp(-lengthS / tauS);
    const swing = (fromC - toC) / (1 - end);
    const level = fromC - swing;
    const onceLagged = (swing * tauS) / (tauS - lagAS);
    const twiceLagged = (onceLagged * tauS) / (tauS - lagBS);
    const bend = (4 * parameters[placeOfBend(shape, leg)]!) / (lengthS * lengthS);
    const sumS = lagAS + lagBS;
    const constant = -bend * (sumS * lengthS + 2 * (lagAS * lagAS + lagAS * lagBS + lagBS * lagBS));
    const linear = bend * (lengthS + 2 * sumS);
    // One lag alone, needed to carry its state from leg to leg.
    const constantA = -bend * (lagAS * lengthS + 2 * lagAS * lagAS);
    const linearA = bend * (lengthS + 2 * lagAS);
    const startA = level + onceLagged + constantA;
    const decayA = leg === 0 ? 0 : afterA - startA;
    const decayAThroughB = (decayA * lagAS) / (lagAS - lagBS);
    const decayB = leg === 0 ? 0 : afterB - (level + twiceLagged + constant) - decayAThroughB;
    const at = leg * WIDTH;
    coefficients[at] = fromS;
    coefficients[at + 1] = toS;
    coefficients[at + 2] = level + constant;
    coefficients[at + 3] = linear;
    coefficients[at + 4] = -bend;
    coefficients[at + 5] = twiceLagged;
    coefficients[at + 6] = tauS;
    coefficients[at + 7] = decayAThroughB;
    coefficients[at + 8] = decayB;
    const endA = Math.exp(-lengthS / lagAS);
    afterA =
      level +
      onceLagged * end +
      constantA +
      linearA * lengthS -
      bend * lengthS * lengthS +
      decayA * endA;
    afterB =
      level +
      constant +
      (linear - bend * lengthS) * lengthS +
      twiceLagged * end +
      decayAThroughB * endA +
      decayB * Math.exp(-lengthS / lagBS);
  }
  return { coefficients, lagAS, lagBS, legs };
}

/** Temperature of one leg at a time, °C. */
export function legAt(solved: SolvedLegs, leg: number, timeS: number): number {
  const c = solved.coefficients;
  const at = leg * WIDTH;
  const sinceS = timeS - c[at]!;
  let tempC =
    c[at + 2]! +
    (c[at + 3]! + c[at + 4]! * sinceS) * sinceS +
    c[at + 5]! * Math.exp(-sinceS / c[at + 6]!);
  // After ten time constants a lag's start is forgotten to 1 part in 20,000; the first leg has none.
  if (leg > 0 && sinceS < 10 * solved.lagAS) {
    tempC += c[at + 7]! * Math.exp(-sinceS / solved.lagAS);
    if (sinceS < 10 * solved.lagBS) tempC += c[at + 8]! * Math.exp(-sinceS / solved.lagBS);
  }
  return tempC;
}

/** Temperatures at rising times `from` ≤ i < `to` into `into`, °C. */
export function legsAt(
  solved: SolvedLegs,
  timesS: Float64Array,
  into: Float64Array,
  from = 0,
  to = timesS.length,
): void {
  let leg = 0;
  for (let i = from; i < to; i++) {
    const timeS = timesS[i]!;
    while (leg < solved.legs - 1 && timeS >= solved.coefficients[leg * WIDTH + 1]!) leg++;
    into[i] = legAt(solved, leg, timeS);
  }
}
