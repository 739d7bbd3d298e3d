import type { Series } from './series.ts';

/** How many noise deviations a reading must stand out by. */
const DEVIATIONS = 7;
/** Common practice: nothing below 1.5 K (2.7 °F) is worth setting aside; robust fits take care of it. */
const LEAST_K = 1.5;
/** At the record's ends there is one side only to go by: an exhaust moves no faster than this (common practice). */
const END_RATE_K_PER_S = 1.5;

export type Despiked = { series: Series; spikes: number };

/**
 * Sets single wild readings aside.
 *
 * A reading is wild where it lies beyond all that its neighbours allow: above (or below) the line between
 * them *and* the lines carried on from the two before and from the two after. A real peak, however sharp
 * and however coarse the sampling, lies under the lines carried on from its own two flanks, so it is
 * never touched; two readings that agree vouch for each other.
 *
 * @param noiseK standard deviation of a reading, K
 * @returns the series without them (the same arrays where there is none) and their number
 */
export function despike(series: Series, noiseK: number): Despiked {
  const leastK = Math.max(DEVIATIONS * noiseK, LEAST_K);
  const once = setAside(series, leastK);
  // A second look: beside one wild reading another can hide.
  const twice = once.spikes > 0 ? setAside(once.series, leastK) : once;
  const spikes = series.timesS.length - twice.series.timesS.length;
  return { series: twice.series, spikes };
}

function setAside(series: Series, leastK: number): Despiked {
  const { timesS, tempsC } = series;
  const wild: number[] = [];
  for (let i = 0; i < tempsC.length; i++) {
    if (!isFarOff(tempsC, i, leastK)) continue;
    if (standsOut(timesS, tempsC, i) > leastK && wild.at(-1) !== i - 1) wild.push(i);
  }
  return { series: wild.length > 0 ? without(series, wild) : series, spikes: wild.length };
}

/** A cheap first look that lets nearly every reading pass. */
function isFarOff(tempsC: Float64Array, i: number, leastK: number): boolean {
  const n = tempsC.length;
  if (n < 5) return false;
  const before = i > 0 ? tempsC[i - 1]! : tempsC[i + 1]!;
  const after = i < n - 1 ? tempsC[i + 1]! : before;
  return Math.abs(tempsC[i]! - before) > leastK || Math.abs(tempsC[i]! - after) > leastK;
}

/** How far a reading lies beyond everything that its neighbours allow, K. */
function standsOut(timesS: Float64Array, tempsC: Float64Array, i: number): number {
  const n = tempsC.length;
  const timeS = timesS[i]!;
  const tempC = tempsC[i]!;
  if (i === 0) return Math.abs(tempC - tempsC[1]!) - END_RATE_K_PER_S * (timesS[1]! - timeS);
  if (i === n - 1) {
    return Math.abs(tempC - tempsC[n - 2]!) - END_RATE_K_PER_S * (timeS - timesS[n - 2]!);
  }
  const between = lineAt(timesS, tempsC, i - 1, i + 1, timeS);
  const fromBefore = i >= 2 ? lineAt(timesS, tempsC, i - 2, i - 1, timeS) : between;
  const fromAfter = i < n - 2 ? lineAt(timesS, tempsC, i + 1, i + 2, timeS) : between;
  const above = tempC - Math.max(between, fromBefore, fromAfter, tempsC[i - 1]!, tempsC[i + 1]!);
  const below = Math.min(between, fromBefore, fromAfter, tempsC[i - 1]!, tempsC[i + 1]!) - tempC;
  return Math.max(above, below);
}

function lineAt(
  timesS: Float64Array,
  tempsC: Float64Array,
  a: number,
  b: number,
  timeS: number,
): number {
  const slope = (tempsC[b]! - tempsC[a]!) / (timesS[b]! - timesS[a]!);
  return tempsC[a]! + slope * (timeS - timesS[a]!);
}

function without({ timesS, tempsC }: Series, wild: number[]): Series {
  const kept = timesS.length - wild.length;
  const times = new Float64Array(kept);
  const temps = new Float64Array(kept);
  let to = 0;
  let next = 0;
  for (let i = 0; i < timesS.length; i++) {
    if (wild[next] === i) {
      next++;
      continue;
    }
    times[to] = timesS[i]!;
    temps[to++] = tempsC[i]!;
  }
  return { timesS: times, tempsC: temps };
}
