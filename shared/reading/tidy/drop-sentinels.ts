import { fromKelvinStep, toKelvinStep, type TemperatureUnit } from '../../units.ts';
import { isPlausible } from './choose-scale.ts';

/**
 * Numbers that loggers and sensors write for "no reading" (common practice): all nines, ends of 16-bit
 * and 12-bit ranges and their tenths, power-on and fault codes of digital sensors, ends of scale.
 */
const KNOWN = new Set([
  -9999, -9999.9, -999.9, -999, -99.9, -99, 999, 999.9, 9999, 9999.9, 99999, 32767, 32768, -32768,
  3276.7, 3276.8, -3276.8, 327.67, -327.68, 6553.5, 655.35, 65535, 2047, 2047.9, 4095, 85, 127,
  -127, -128, 127.9, 128, -45, -40, -46.85, -242.02, 988.79, -200, 850, 1372, 0, -1, 1e9,
]);

/** A reading stands out where both neighbours are further off than an exhaust moves in one step, K. */
const STANDS_OUT_K = 15;
/** ... and by this many times the usual step. */
const STANDS_OUT_STEPS = 10;
const NEIGHBOURS = 20_000;

export type Sentinel = { place: number; value: number };

/** Where more readings than this share are impossible, they are in another unit or scale. */
const MOST_IMPOSSIBLE = 0.2;

/**
 * Places of readings that stand for "no reading": a known number, alone or in a run of its own, that
 * jumps away from the readings before and after, or any number that no probe can read among many that
 * one can. 85.0 in the middle of a plausible curve is a reading.
 *
 * @param temps readings in `unit`, finite
 */
export function findSentinels(temps: Float64Array, unit: TemperatureUnit): Sentinel[] {
  const found: Sentinel[] = [];
  const stepK = Math.max(
    STANDS_OUT_K,
    STANDS_OUT_STEPS * toKelvinStep(medianMove(temps, unit), unit),
  );
  const step = fromKelvinStep(stepK, unit);
  const odd = oddValues(temps, unit, step);
  if (odd.impossible > temps.length * MOST_IMPOSSIBLE) return [];
  for (const { from, to } of odd.runs) {
    if (!standsOut(temps, from, to, unit, step)) continue;
    for (let place = from; place < to; place++) found.push({ place, value: temps[place]! });
  }
  return found.length < temps.length ? found : [];
}

type Run = { from: number; to: number };

/** Runs of one value that is known for "no reading" or impossible, each begun by a jump. */
function oddValues(
  temps: Float64Array,
  unit: TemperatureUnit,
  step: number,
): { runs: Run[]; impossible: number } {
  const runs: Run[] = [];
  let impossible = 0;
  let i = 0;
  while (i < temps.length) {
    const value = temps[i]!;
    const isJump = i === 0 || Math.abs(value - temps[i - 1]!) >= step;
    if (!isJump || !isOdd(value, unit)) {
      i++;
      continue;
    }
    let to = i + 1;
    while (to < temps.length && temps[to] === value) to++;
    if (!KNOWN.has(value)) impossible += to - i;
    runs.push({ from: i, to });
    i = to;
  }
  return { runs, impossible };
}

function isOdd(value: number, unit: TemperatureUnit): boolean {
  return KNOWN.has(value) || !isPlausible(value, unit);
}

function standsOut(
  temps: Float64Array,
  from: number,
  to: number,
  unit: TemperatureUnit,
  step: number,
): boolean {
  const value = temps[from]!;
  const before = nearest(temps, from - 1, -1, unit);
  const after = nearest(temps, to, 1, unit);
  if (before === null && after === null) return false;
  if (!isPlausible(value, unit)) return true;
  const farBefore = before === null || Math.abs(before - value) >= step;
  const farAfter = after === null || Math.abs(after - value) >= step;
  if (!farBefore || !farAfter) return false;
  // a jump up and a jump on up is a fast rise, not an isolated reading
  return before === null || after === null || before > value === after > value;
}

/** The nearest reading that is not odd itself. */
function nearest(
  temps: Float64Array,
  from: number,
  direction: 1 | -1,
  unit: TemperatureUnit,
): number | null {
  for (let i = from; i >= 0 && i < temps.length; i += direction) {
    if (!isOdd(temps[i]!, unit)) return temps[i]!;
  }
  return null;
}

/** Of the readings that are not odd themselves: in a short log, what is odd is no small share. */
function medianMove(temps: Float64Array, unit: TemperatureUnit): number {
  const stride = Math.max(1, Math.floor(temps.length / NEIGHBOURS));
  const moves: number[] = [];
  for (let i = stride; i < temps.length; i += stride) {
    const isOwn = isPlausible(temps[i]!, unit) && isPlausible(temps[i - 1]!, unit);
    if (isOwn) moves.push(Math.abs(temps[i]! - temps[i - 1]!));
  }
  const sorted = Float64Array.from(moves).sort();
  return sorted[sorted.length >> 1] ?? 0;
}
