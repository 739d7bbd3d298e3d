import type { TemperatureUnit } from '../../units.ts';
import { medianStepS } from '../find-parts.ts';
import type { Clock } from '../layout/layout.ts';
import type { ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';
import { rangeOf } from './choose-unit.ts';

/** An exhaust in °C stays under this, past every link in its stream; one in kelvin lies over the other. */
const HOTTEST_C = 130;
const COLDEST_K = 250;
const HOTTEST_K = 450;
/** Loggers of temperature write no faster and, during a run, no slower than this, s. */
const FASTEST_S = 0.01;
const SLOWEST_S = 900;

/**
 * What the file states and its numbers speak against: a unit under which no dryer has such readings, or a clock
 * under which no logger has such steps. The file's word is taken, and the doubt is told.
 */
export function findDoubts(
  timesS: Float64Array,
  temps: Float64Array,
  { unit, clock, column }: { unit: TemperatureUnit; clock: Clock; column: string },
): ReadWarning[] {
  const doubts: ReadWarning[] = [];
  const likelier = likelierUnit(temps, unit);
  if (likelier) doubts.push(warning('unit-doubtful', { column, value: unit, say: likelier }));
  const stepS = medianStepS(timesS);
  const isElapsed = clock.kind === 'elapsed' || clock.kind === 'minutes';
  if (isElapsed && stepS > 0 && (stepS < FASTEST_S || stepS > SLOWEST_S)) {
    doubts.push(warning('clock-doubtful', { say: `${Number(stepS.toPrecision(3))} s` }));
  }
  return doubts;
}

function likelierUnit(temps: Float64Array, unit: TemperatureUnit): string | null {
  const { lowest, highest, median } = rangeOf(temps);
  if (unit === 'C' && median > HOTTEST_C / 2 && highest > HOTTEST_C) return '°F';
  if (unit !== 'F') return null;
  if (lowest >= COLDEST_K && highest <= HOTTEST_K) return 'K';
  // from a room near 20 to a cut-out near 70: the span of a dryer, in °C
  return lowest < 40 && highest > 55 && highest < 90 && highest - lowest > 25 ? '°C' : null;
}
