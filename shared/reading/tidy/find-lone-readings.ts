import { fromKelvinStep, type TemperatureUnit } from '../../units.ts';
import type { ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';
import { robustScale } from './robust-scale.ts';

/** A lone reading is off by more than this many standard deviations of the usual bend, and by this much, K. */
const STRAY = 8;
const LEAST_K = 2.5;
/** The first and the last reading have one neighbour only: twice as much, and a quiet one. */
const AT_END = 2;
const FEWEST = 10;

/**
 * Single readings far from both neighbours: a wild sample, or a digit that was damaged. They are kept, since the
 * file says so, and told; the analysis sets spikes aside by itself.
 *
 * @param temps readings in `unit`
 * @param rows the row of each reading
 */
export function findLoneReadings(
  temps: Float64Array,
  unit: TemperatureUnit,
  rows: Int32Array,
): ReadWarning[] {
  const n = temps.length;
  if (n < FEWEST) return [];
  const bend = robustScale(n - 2, (i) => temps[i + 1]! - (temps[i]! + temps[i + 2]!) / 2);
  const limit = Math.max(STRAY * bend, fromKelvinStep(LEAST_K, unit));
  const lone: number[] = [];
  if (isLoneEnd(temps[0]!, temps[1]!, temps[2]!, limit)) lone.push(0);
  for (let i = 1; i < n - 1; i++) {
    const rise = temps[i]! - temps[i - 1]!;
    const fall = temps[i]! - temps[i + 1]!;
    if ((rise > limit && fall > limit) || (rise < -limit && fall < -limit)) lone.push(i);
  }
  if (isLoneEnd(temps[n - 1]!, temps[n - 2]!, temps[n - 3]!, limit)) lone.push(n - 1);
  if (lone.length === 0) return [];
  const first = lone[0]!;
  const value = String(temps[first]);
  return [warning('stands-out', { row: rows[first]!, value, say: lone.length })];
}

function isLoneEnd(end: number, next: number, second: number, limit: number): boolean {
  return Math.abs(end - next) > AT_END * limit && Math.abs(next - second) < limit / AT_END;
}
