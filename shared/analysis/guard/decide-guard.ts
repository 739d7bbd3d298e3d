import { DEFAULT_RATING, type Rating } from '../rating.ts';
import { foresee, tempAfter, type Course } from './forecast-exhaust.ts';
import type { GuardSays, GuardState, GuardWhy, Moment } from './guard-state.ts';
import type { ExhaustTrack, ReadingFit } from './track-exhaust.ts';

export type Decision = { says: GuardSays; why: GuardWhy | null };

/** How long before the high limit the heat must be cut at the latest, and a second for the hand, s (ENGINE: 20). */
export const LEAST_LEAD_S = 21;
/** Response of a probe that nobody stated, and the most that is made good, s. */
const USUAL_RESPONSE_S = 3;
const MOST_RESPONSE_S = 10;
/** Slower than this nothing climbs, K/s. */
const CLIMB_KPERS = 0.02;
/** The quick part of a leg, s: up to the end of the allowance it fades by itself and forecasts nothing (bench). */
const QUICK_PART_S = 40;
/** An exhaust under its earlier cut-outs and this is on a way that it came back from before, K. */
const KNOWN_WAY_K = 1.2;
/** A filter lags behind the reading by this at most where it follows well, K. */
const CEILING_SLACK_K = 0.25;
/** Watch: the ceiling within this, or the high limit within that, or above the allowance for so long, s. */
const WATCH_CEILING_S = 180;
const WATCH_LIMIT_S = 60;
const WATCH_ABOVE_S = 90;
/** Above all cut-outs of the run by this, and half-way through the allowance, K. */
const ABOVE_CUT_OUTS_K = 3;
/** Stored heat goes on warming the exhaust as if the heat were on for this long, beside the probe's lag, s. */
const STORED_HEAT_S = 18;
/** After this, and the probe's lag, stored heat is spent: heater 10 to 19 s, mixing 2 to 6 s (bench model), s. */
const STORED_HEAT_SPENT_S = 33;
/** Noise aside, a climb or a fall shows by this much, K. */
const SHOWS_K = 1;
/** An exhaust that falls, K/s. */
const FALL_KPERS = -0.03;

/** Said at nearly every reading: one object, so that a long replay makes none. */
const QUIET: Decision = { says: 'quiet', why: null };

/** The rules, in order of weight; a reading that waits for a second one decides nothing. */
export function decide(state: GuardState, tempC: number, fit: ReadingFit): Decision {
  const { track } = state;
  if (!track) return { says: state.says, why: state.why };
  const rating = state.setup.rating ?? DEFAULT_RATING;
  if (state.off)
    return decideAfterOff(state, state.off, track, isAtCeiling(track, rating, tempC, fit));
  if (isAtCeiling(track, rating, tempC, fit)) return { says: 'cut-heat', why: 'at-ceiling' };
  if (state.says === 'cut-heat' || state.says === 'unplug')
    return { says: 'cut-heat', why: state.why };
  return decideWhileOn(state, track, rating, fit);
}

/** At the ceiling whatever the forecast: the reading, borne out by the track or by a second one. */
function isAtCeiling(track: ExhaustTrack, { ceilingC }: Rating, tempC: number, fit: ReadingFit) {
  if (fit === 'doubted' || fit === 'off-trend' || tempC < ceilingC) return false;
  if (fit === 'confirmed') return true;
  return track.tempC >= ceilingC - CEILING_SLACK_K - Math.sqrt(track.ptt);
}

function decideWhileOn(
  state: GuardState,
  track: ExhaustTrack,
  rating: Rating,
  fit: ReadingFit,
): Decision {
  const bandEndC = rating.opensC + rating.opensTolK;
  if (track.tempC <= bandEndC) return QUIET;
  const isClimbing = track.slopeKPerS > CLIMB_KPERS;
  const ageS = track.timeS - state.turns.legFromS;
  const course = isClimbing ? foresee(track, ageS) : null;
  const { cutOutC } = state.turns;
  const onKnownWay =
    cutOutC !== null && cutOutC < rating.ceilingC && track.tempC < cutOutC + KNOWN_WAY_K;
  const isQuickPart = ageS < QUICK_PART_S && track.tempC < bandEndC + rating.overshootK;
  if (course && fit !== 'off-trend' && !onKnownWay && !isQuickPart) {
    const waitS = LEAST_LEAD_S + responseS(state) + track.spacingS;
    if (tempAfter(course, waitS) >= rating.highLimitC)
      return { says: 'cut-heat', why: 'limit-near' };
  }
  return watch(state, track, { rating, course, onKnownWay });
}

type Seen = { rating: Rating; course: Course | null; onKnownWay: boolean };

function watch(state: GuardState, track: ExhaustTrack, seen: Seen): Decision {
  const { rating, course, onKnownWay } = seen;
  const allowedC = rating.opensC + rating.opensTolK + rating.overshootK;
  if (track.tempC > allowedC) {
    const lastsS = track.timeS - (state.aboveSinceS ?? track.timeS);
    const comes = course !== null && tempAfter(course, WATCH_CEILING_S) >= rating.ceilingC;
    if (comes || (lastsS >= WATCH_ABOVE_S && track.slopeKPerS > FALL_KPERS)) {
      return { says: 'watch', why: 'above-band' };
    }
  }
  if (course && !onKnownWay && tempAfter(course, WATCH_LIMIT_S) >= rating.highLimitC) {
    return { says: 'watch', why: 'limit-near' };
  }
  const { cutOutC } = state.turns;
  const isInAllowance = track.tempC > allowedC - rating.overshootK / 2;
  if (course && cutOutC !== null && isInAllowance && track.tempC > cutOutC + ABOVE_CUT_OUTS_K) {
    return { says: 'watch', why: 'above-cut-outs' };
  }
  if (course && state.click && climbsOn(state, state.click, track)) {
    return { says: 'watch', why: 'after-click' };
  }
  const stays = state.says === 'watch' && track.slopeKPerS > FALL_KPERS;
  return stays ? { says: 'watch', why: state.why } : QUIET;
}

/** After heat off: what was called stays until the exhaust falls; what climbs on is fed past the selector. */
function decideAfterOff(
  state: GuardState,
  off: NonNullable<GuardState['off']>,
  track: ExhaustTrack,
  atCeiling: boolean,
): Decision {
  const spent = track.timeS - off.timeS > STORED_HEAT_SPENT_S + responseS(state);
  const risesAnew = spent && isClimbing(track) && track.tempC > off.lowestC + SHOWS_K;
  if (risesAnew || climbsOn(state, off, track)) return { says: 'unplug', why: 'climbs-after-off' };
  if (atCeiling && state.says !== 'unplug') return { says: 'cut-heat', why: 'at-ceiling' };
  const isFalling = track.slopeKPerS < FALL_KPERS && track.tempC < state.turns.highestC - SHOWS_K;
  if (isFalling || state.says === 'quiet' || state.says === 'watch') return QUIET;
  return state.says === 'unplug'
    ? { says: 'unplug', why: 'climbs-after-off' }
    : { says: 'cut-heat', why: 'not-falling-yet' };
}

/** Climbs, and has climbed since a moment by more than heater, air and probe still held at its slope. */
function climbsOn(state: GuardState, since: Moment, track: ExhaustTrack): boolean {
  const storedS = STORED_HEAT_S + responseS(state);
  const storedK = Math.max(0, since.slopeKPerS) * storedS;
  const shownC = track.tempC - 2 * Math.sqrt(track.ptt);
  const goesOn = track.slopeKPerS > 0.5 * Math.max(0, since.slopeKPerS);
  return (
    track.timeS - since.timeS > storedS &&
    isClimbing(track) &&
    goesOn &&
    shownC > since.tempC + storedK + SHOWS_K / 2
  );
}

function isClimbing({ slopeKPerS, pss }: ExhaustTrack): boolean {
  return slopeKPerS > CLIMB_KPERS && slopeKPerS > 2 * Math.sqrt(pss);
}

/** The exhaust runs ahead of a probe that climbs by the probe's response time, s. */
export function responseS({ setup }: GuardState): number {
  return Math.min(MOST_RESPONSE_S, setup.probe.responseS ?? USUAL_RESPONSE_S);
}
