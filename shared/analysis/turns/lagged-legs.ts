/**
 * The shape of a heat/cool record as the turns are fitted: between switches the exhaust follows first-order legs,
 * and two lags in a row (heater box, probe) round every corner.
 *
 * Parameters, one flat array: ln τ heating, ln τ cooling, ln τ of the window's first leg (s; cold metal makes it another); ln of the sum of the two lags (s); logit of their
 * ratio; then the switch times (s); the unlagged temperature at the window's start, at each switch and at the
 * window's end (°C); and what each leg gains by a steady ramp from end to end (K): the slow
 * drum under the quick heater.
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
export const LN_TAU_FIRST = 2;
export const LN_LAG = 3;
export const LOGIT_RATIO = 4;
export const SHARED = 5;

export function placeOfSwitch(k: number): number {
  return SHARED + k;
}

export function placeOfNode(shape: LegShape, k: number): number {
  return SHARED + shape.switches + k;
}

export function placeOfRamp(shape: LegShape, leg: number): number {
  return SHARED + 2 * shape.switches + 2 + leg;
}

export function parameterCount(shape: LegShape): number {
  return SHARED + 3 * shape.switches + 3;
}

/** Coefficients of one leg in closed form, 8 numbers: see `legAt`. */
const WIDTH = 8;

/** The legs in closed form, ready to be evaluated at any time. */
export type SolvedLegs = { coefficients: Float64Array; lagAS: number; lagBS: number; legs: number };

/** The two lags, s, the longer first; kept apart since equal ones would divide by zero. */
export function lagsOf(parameters: Float64Array): { lagAS: number; lagBS: number } {
  const sumS = Math.exp(parameters[LN_LAG]!);
  const ratio = 0.02 + 0.93 / (1 + Math.exp(-parameters[LOGIT_RATIO]!));
  return { lagAS: sumS / (1 + ratio), lagBS: (sumS * ratio) / (1 + ratio) };
}

/**
 * Solves the two lags over the legs, each analytically: an exponential plus a ramp goes through a first-order lag
 * as an exponential plus a ramp plus the lag's own decaying exponential.
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
    let tauS = Math.exp(parameters[leg === 0 ? LN_TAU_FIRST : heats ? LN_TAU_HEAT : LN_TAU_COOL]!);
    if (Math.abs(tauS - lagAS) < 1e-3 * tauS || Math.abs(tauS - lagBS) < 1e-3 * tauS) tauS *= 1.003;
    const fromC = parameters[placeOfNode(shape, leg)]!;
    const toC = parameters[placeOfNode(shape, leg + 1)]!;
    const end = Math.exp(-lengthS / tauS);
    const rampC = parameters[placeOfRamp(shape, leg)]!;
    const ramp = rampC / lengthS;
    const swing = (fromC - toC + rampC) / (1 - end);
    const level = fromC - swing;
    const onceLagged = (swing * tauS) / (tauS - lagAS);
    const twiceLagged = (onceLagged * tauS) / (tauS - lagBS);
    const constant = level - ramp * (lagAS + lagBS);
    // One lag alone, needed to carry its state from leg to leg.
    const constantA = level - ramp * lagAS;
    const decayA = leg === 0 ? 0 : afterA - onceLagged - constantA;
    const decayAThroughB = (decayA * lagAS) / (lagAS - lagBS);
    const decayB = leg === 0 ? 0 : afterB - twiceLagged - constant - decayAThroughB;
    const at = leg * WIDTH;
    coefficients[at] = fromS;
    coefficients[at + 1] = toS;
    coefficients[at + 2] = constant;
    coefficients[at + 3] = ramp;
    coefficients[at + 4] = twiceLagged;
    coefficients[at + 5] = tauS;
    coefficients[at + 6] = decayAThroughB;
    coefficients[at + 7] = decayB;
    const endA = Math.exp(-lengthS / lagAS);
    afterA = constantA + rampC + onceLagged * end + decayA * endA;
    afterB =
      constant +
      rampC +
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
  let tempC = c[at + 2]! + c[at + 3]! * sinceS + c[at + 4]! * Math.exp(-sinceS / c[at + 5]!);
  // After ten time constants a lag's start is forgotten to 1 part in 20,000; the first leg has none.
  if (leg > 0 && sinceS < 10 * solved.lagAS) {
    tempC += c[at + 6]! * Math.exp(-sinceS / solved.lagAS);
    if (sinceS < 10 * solved.lagBS) tempC += c[at + 7]! * Math.exp(-sinceS / solved.lagBS);
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
