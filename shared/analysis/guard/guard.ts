import { DEFAULT_RATING } from '../rating.ts';
import type { Mark } from '../series.ts';
import { LEAST_LEAD_S, responseS } from './decide-guard.ts';
import { emptyState, takeMark, takeReading } from './follow-guard.ts';
import { foresee, spreadAfter, tempAfter, timeTo, type TimeTo } from './forecast-exhaust.ts';
import type { Crossing, GuardForecast, GuardSetup, GuardState, GuardView } from './guard-state.ts';

/** Under the opens band by this, nothing is foreseen: the thermostat has yet to have its turn, K. */
const FORESEEN_FROM_K = 10;
/** Slower than this nothing is foreseen, K/s. */
const LEAST_CLIMB_KPERS = 0.01;

/** A guard before the first reading. */
export function startGuard(setup: GuardSetup): GuardState {
  return emptyState(setup);
}

/**
 * The guard after one more reading: the same work whatever came before, from the past alone.
 *
 * @param reading seconds of the run and °C, as read
 * @throws {RangeError} a value is not finite, or the time does not lie after the last reading's
 */
export function guardReading(
  before: GuardState,
  { timeS, tempC }: { timeS: number; tempC: number },
): GuardState {
  if (!Number.isFinite(timeS) || !Number.isFinite(tempC)) {
    throw new RangeError('a reading must be finite');
  }
  const lastS = before.track ? (before.track.doubted?.timeS ?? before.track.timeS) : -Infinity;
  if (timeS <= lastS) throw new RangeError(`time does not rise: ${timeS} s after ${lastS} s`);
  const state = copy(before);
  takeReading(state, timeS, tempC);
  state.forecast = forecastOf(state);
  return state;
}

/** The guard after a mark; a mark is told when it is made, between the readings around it. */
export function guardMark(before: GuardState, mark: Mark): GuardState {
  const state = copy(before);
  takeMark(state, mark);
  state.forecast = forecastOf(state);
  return state;
}

/**
 * What the guard says as the clock runs on with no reading: where the next one is late and the high limit near, it does
 * not wait for it.
 *
 * @param nowS seconds of the run
 */
export function guardAt(state: GuardState, nowS: number): GuardView {
  const { says, why, forecast, unconfirmed } = state;
  const limitS = forecast?.highLimit?.likelyS ?? null;
  const isLate = limitS !== null && nowS >= limitS - LEAST_LEAD_S - responseS(state);
  const { cutOutC } = state.turns;
  const isNew = state.track !== null && (cutOutC === null || state.track.tempC > cutOutC);
  if (says === 'watch' && isLate && isNew) {
    return { says: 'cut-heat', why: 'limit-near', forecast, unconfirmed };
  }
  return { says, why, forecast, unconfirmed };
}

/** What the next reading will show if nothing changes, with its standard deviation; null before the first. */
export function expectReading(
  { track, turns }: GuardState,
  atS: number,
): { tempC: number; errorK: number } | null {
  if (!track) return null;
  const course = foresee(track, track.timeS - turns.legFromS);
  const afterS = Math.max(0, atS - track.timeS);
  return {
    tempC: tempAfter(course, afterS),
    errorK: Math.hypot(spreadAfter(course, afterS), Math.sqrt(track.noiseK2)),
  };
}

function copy(state: GuardState): GuardState {
  const { track, turns, off } = state;
  return { ...state, track: track && { ...track }, turns: { ...turns }, off: off && { ...off } };
}

function forecastOf({ track, turns, off, setup }: GuardState): GuardForecast | null {
  const { opensC, ceilingC, highLimitC } = setup.rating ?? DEFAULT_RATING;
  if (!track || off || track.slopeKPerS < LEAST_CLIMB_KPERS) return null;
  if (track.tempC < opensC - FORESEEN_FROM_K) return null;
  const course = foresee(track, track.timeS - turns.legFromS);
  const { timeS } = track;
  return {
    ceiling: atTime(timeTo(course, ceilingC), timeS),
    highLimit: atTime(timeTo(course, highLimitC), timeS),
  };
}

function atTime(time: TimeTo | null, fromS: number): Crossing | null {
  if (!time) return null;
  const { earliestS, likelyS, latestS } = time;
  return {
    earliestS: fromS + earliestS,
    likelyS: likelyS === null ? null : fromS + likelyS,
    latestS: latestS === null ? null : fromS + latestS,
  };
}
