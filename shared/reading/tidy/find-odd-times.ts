import { medianStepS } from '../find-parts.ts';
import type { ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';
import { robustScale } from './robust-scale.ts';

/** Times stray by less than this many of their own standard deviations. */
const STRAY = 10;
/** ... and clocks that keep their step exactly are told by less than this share of it. */
const EXACT = 0.001;
/** Times that stray by more than this share of the step keep none. */
const EVEN = 0.05;
/** A pause of more than this many steps is told as a gap. */
const GAP_STEPS = 5;
const FEWEST = 10;
/** One time off is two steps off. */
const FEW = 2;

/**
 * Where a record that keeps an even step has a time off it: one digit of a stamp that was damaged leaves the order
 * of the rows as it was. Of a record without an even step, nothing can be known.
 *
 * @param timesS s, strictly rising
 * @param rows the row of each reading
 */
export function findOddTimes(timesS: Float64Array, rows: Int32Array): ReadWarning[] {
  const n = timesS.length;
  if (n < FEWEST) return [];
  const stepS = medianStepS(timesS);
  const strayS = robustScale(n - 1, (i) => timesS[i + 1]! - timesS[i]! - stepS);
  if (strayS > EVEN * stepS) return [];
  const limitS = STRAY * strayS + EXACT * stepS;
  const off: number[] = [];
  const missing: number[] = [];
  for (let i = 1; i < n; i++) {
    const stepsGone = (timesS[i]! - timesS[i - 1]!) / stepS;
    const whole = Math.round(stepsGone);
    if (Math.abs(stepsGone - whole) * stepS > limitS) off.push(i);
    else if (whole > 1 && whole <= GAP_STEPS && rows[i]! - rows[i - 1]! === 1) missing.push(i);
  }
  return [...told('uneven-step', off), ...told('readings-missing', missing)];

  function told(code: 'uneven-step' | 'readings-missing', places: number[]): ReadWarning[] {
    // many of them are the logger's own way of keeping time
    if (places.length === 0 || places.length > Math.max(FEW, n * EVEN)) return [];
    const say = `${Number(stepS.toPrecision(4))} s`;
    const value = String(places.length);
    return [warning(code, { row: rows[places[0]!]!, say, value })];
  }
}
