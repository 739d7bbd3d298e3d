/**
 * A plant that is switched: the heat's level is constant between switches, and the exhaust answers it linearly, through
 * a quick and a slow store of heat side by side with a share that passes straight on, then through three lags in a row
 * (heater, outlet, probe). One set of time constants and shares serves the whole window, so every cycle teaches them.
 *
 * In parallel form the answer is Σ A·x over five modes, each a first-order filter x' = (u − x)/τ of the level u; the A
 * are the partial fractions of the transfer function and sum to 1.
 *
 * Parameters, one flat array: ln of the quick store's τ (s); ln of the slow one's over that; ln of the longest lag (s);
 * logits of the second lag over the first and the third over the second; shares of the two stores; the switch times
 * (s); the level of each leg (°C); and how far each mode is from the first level at the window's start (K).
 */
export type PlantShape = { switches: number; startS: number; endS: number };

export const MODES = 5;
export const LN_QUICK = 0;
export const LN_SLOW_OVER_QUICK = 1;
export const LN_LAG = 2;
export const LOGIT_SECOND = 3;
export const LOGIT_THIRD = 4;
export const SHARE_QUICK = 5;
export const SHARE_SLOW = 6;
export const SHARED = 7;

export function placeOfSwitch(k: number): number {
  return SHARED + k;
}

export function placeOfLevel({ switches }: PlantShape, leg: number): number {
  return SHARED + switches + leg;
}

export function placeOfStart({ switches }: PlantShape, mode: number): number {
  return SHARED + 2 * switches + 1 + mode;
}

export function parameterCount({ switches }: PlantShape): number {
  return SHARED + 2 * switches + 1 + MODES;
}

/** Time constants of the modes, s, and their parts in the answer: two stores, then three lags. */
export type Modes = { tausS: Float64Array; parts: Float64Array };

/** Lags in a row are kept this far apart, since equal ones would divide by zero. */
const LEAST_RATIO = 0.02;
const RATIO_RANGE = 0.91;
const APART = 2e-3;

export function modesOf(parameters: Float64Array): Modes {
  const quickS = Math.exp(parameters[LN_QUICK]!);
  const slowS = quickS * (1 + Math.exp(parameters[LN_SLOW_OVER_QUICK]!));
  const lagS = Math.exp(parameters[LN_LAG]!);
  const secondS = lagS * ratioOf(parameters[LOGIT_SECOND]!);
  const thirdS = secondS * ratioOf(parameters[LOGIT_THIRD]!);
  const tausS = Float64Array.of(quickS, slowS, lagS, secondS, thirdS);
  for (let store = 0; store < 2; store++) {
    for (let lag = 2; lag < MODES; lag++) {
      if (Math.abs(tausS[store]! / tausS[lag]! - 1) < APART) tausS[store]! *= 1 + 2 * APART;
    }
  }
  return { tausS, parts: partsOf(tausS, parameters[SHARE_QUICK]!, parameters[SHARE_SLOW]!) };
}

function ratioOf(logit: number): number {
  return LEAST_RATIO + RATIO_RANGE / (1 + Math.exp(-logit));
}

/** Partial fractions of (q/(1 + sτq) + w/(1 + sτw) + 1 − q − w) / ((1 + sa)(1 + sb)(1 + sc)). */
function partsOf(tausS: Float64Array, quick: number, slow: number): Float64Array {
  const parts = new Float64Array(MODES);
  const [quickS, slowS] = [tausS[0]!, tausS[1]!];
  for (let mode = 0; mode < MODES; mode++) {
    const ownS = tausS[mode]!;
    let part = 1;
    for (let lag = 2; lag < MODES; lag++) {
      if (lag !== mode) part *= ownS / (ownS - tausS[lag]!);
    }
    if (mode === 0) part *= quick;
    else if (mode === 1) part *= slow;
    else
      part *= (quick * ownS) / (ownS - quickS) + (slow * ownS) / (ownS - slowS) + 1 - quick - slow;
    parts[mode] = part;
  }
  return parts;
}

/** The plant solved: its modes and their states where each leg starts. */
export type SolvedPlant = Modes & {
  shape: PlantShape;
  /** Times at which legs start, s, the window's start first. */
  fromsS: Float64Array;
  levels: Float64Array;
  /** MODES values a leg, °C. */
  states: Float64Array;
};

export function solvePlant(parameters: Float64Array, shape: PlantShape): SolvedPlant {
  const modes = modesOf(parameters);
  const legs = shape.switches + 1;
  const fromsS = new Float64Array(legs);
  fromsS[0] = shape.startS;
  for (let leg = 1; leg < legs; leg++) fromsS[leg] = parameters[placeOfSwitch(leg - 1)]!;
  const first = placeOfLevel(shape, 0);
  const levels = parameters.slice(first, first + legs);
  const states = new Float64Array(legs * MODES);
  for (let mode = 0; mode < MODES; mode++) {
    states[mode] = levels[0]! + parameters[placeOfStart(shape, mode)]!;
    for (let leg = 1; leg < legs; leg++) {
      const left = Math.exp((fromsS[leg - 1]! - fromsS[leg]!) / modes.tausS[mode]!);
      const level = levels[leg - 1]!;
      states[leg * MODES + mode] = level + (states[(leg - 1) * MODES + mode]! - level) * left;
    }
  }
  return { ...modes, shape, fromsS, levels, states };
}

/** Temperature at a time that lies in a leg, °C. */
export function plantAt(solved: SolvedPlant, leg: number, timeS: number): number {
  const { tausS, parts, fromsS, levels, states } = solved;
  const sinceS = fromsS[leg]! - timeS;
  let tempC = 0;
  for (let mode = 0; mode < MODES; mode++) {
    const offK = states[leg * MODES + mode]! - levels[leg]!;
    tempC += parts[mode]! * (levels[leg]! + offK * Math.exp(sinceS / tausS[mode]!));
  }
  return tempC;
}

/** Temperatures at rising times into `into`, °C. */
export function plantTemps(solved: SolvedPlant, timesS: Float64Array, into: Float64Array): void {
  let leg = 0;
  for (let i = 0; i < timesS.length; i++) {
    leg = legOf(solved, timesS[i]!, leg);
    into[i] = plantAt(solved, leg, timesS[i]!);
  }
}

function legOf({ fromsS }: SolvedPlant, timeS: number, from: number): number {
  let leg = from;
  while (leg + 1 < fromsS.length && timeS >= fromsS[leg + 1]!) leg++;
  return leg;
}

const STEP = 1e-5;
/** Less than this share of a start is taken as none. */
const FORGOTTEN = 1e-7;

/**
 * Slopes of the temperatures at rising times by each parameter, row by row; the shared parameters' by differences, all
 * others in closed form.
 */
export function plantSlopes(
  parameters: Float64Array,
  shape: PlantShape,
  timesS: Float64Array,
): Float64Array {
  const p = parameterCount(shape);
  const slopes = new Float64Array(timesS.length * p);
  const solved = solvePlant(parameters, shape);
  fillOwnSlopes(solved, timesS, slopes, p);
  const base = new Float64Array(timesS.length);
  const above = new Float64Array(timesS.length);
  plantTemps(solved, timesS, base);
  const pushed = Float64Array.from(parameters);
  for (let j = 0; j < SHARED; j++) {
    pushed[j] = parameters[j]! + STEP;
    plantTemps(solvePlant(pushed, shape), timesS, above);
    pushed[j] = parameters[j]!;
    for (let i = 0; i < timesS.length; i++) slopes[i * p + j] = (above[i]! - base[i]!) / STEP;
  }
  return slopes;
}

/** By the switch times, the levels and the modes' starts: sums over the modes of what is left since each switch. */
function fillOwnSlopes(
  solved: SolvedPlant,
  timesS: Float64Array,
  slopes: Float64Array,
  p: number,
): void {
  const { tausS, parts, fromsS, levels, shape } = solved;
  const legs = fromsS.length;
  const left = new Float64Array(MODES);
  // What is left of each mode at this leg's start since the start of each leg before it.
  const carried = new Float64Array(legs * MODES);
  let leg = -1;
  for (let i = 0; i < timesS.length; i++) {
    const timeS = timesS[i]!;
    const now = legOf(solved, timeS, Math.max(0, leg));
    if (now !== leg) {
      leg = now;
      for (let from = 0; from <= leg; from++) {
        for (let mode = 0; mode < MODES; mode++) {
          carried[from * MODES + mode] = Math.exp((fromsS[from]! - fromsS[leg]!) / tausS[mode]!);
        }
      }
    }
    for (let mode = 0; mode < MODES; mode++) {
      left[mode] = parts[mode]! * Math.exp((fromsS[leg]! - timeS) / tausS[mode]!);
    }
    const at = i * p;
    for (let mode = 0; mode < MODES; mode++) {
      const start = left[mode]! * carried[mode]!;
      slopes[at + placeOfStart(shape, mode)] = Math.abs(start) > FORGOTTEN ? start : 0;
    }
    let sinceNext = 1;
    for (let from = leg; from >= 0; from--) {
      let since = 0;
      let impulse = 0;
      for (let mode = 0; mode < MODES; mode++) {
        const value = left[mode]! * carried[from * MODES + mode]!;
        since += value;
        impulse += value / tausS[mode]!;
      }
      slopes[at + placeOfLevel(shape, from)] = from === 0 ? sinceNext : sinceNext - since;
      sinceNext = since;
      if (from > 0) {
        slopes[at + placeOfSwitch(from - 1)] = -(levels[from]! - levels[from - 1]!) * impulse;
      }
    }
  }
}
