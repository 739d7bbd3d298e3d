import { medianStepS } from '../find-parts.ts';
import type { ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';

/** A pause of more than this many usual steps is a gap ... */
const GAP_STEPS = 5;
/** ... unless more steps than this share are: then readings simply come irregularly. */
const IRREGULAR = 0.05;
const MOST_TOLD = 20;

/**
 * A warning for each span without readings.
 *
 * @param timesS s, strictly rising
 * @param rows the row of each reading
 */
export function findGaps(timesS: Float64Array, rows: Int32Array): ReadWarning[] {
  const longS = GAP_STEPS * medianStepS(timesS);
  const places: number[] = [];
  for (let i = 1; i < timesS.length; i++) {
    if (timesS[i]! - timesS[i - 1]! > longS) places.push(i);
  }
  if (places.length > Math.max(MOST_TOLD, timesS.length * IRREGULAR)) return [];
  const told = places
    .slice(0, MOST_TOLD)
    .map((i) => warning('gap', { row: rows[i]!, say: inWords(timesS[i]! - timesS[i - 1]!) }));
  const more = places.length - MOST_TOLD;
  return more > 0 ? [...told, warning('more-gaps', { say: more })] : told;
}

function inWords(durationS: number): string {
  if (durationS < 120) return `${Number(durationS.toFixed(1))} s`;
  if (durationS < 7200) return `${Math.round(durationS / 60)} min`;
  return `${Number((durationS / 3600).toFixed(1))} h`;
}
