import { correctionAt } from '../correct-series.ts';
import { DEFAULT_RATING } from '../rating.ts';
import type { Mark } from '../series.ts';
import { decide } from './decide-guard.ts';
import type { GuardSetup, GuardState } from './guard-state.ts';
import { followReading, startTrack } from './track-exhaust.ts';
import { followTurns, startTurns } from './track-turns.ts';

/** A guard before the first reading. */
export function emptyState(setup: GuardSetup): GuardState {
  return {
    says: 'quiet',
    why: null,
    forecast: null,
    unconfirmed: null,
    setup,
    track: null,
    turns: startTurns(0, 0),
    off: null,
    click: null,
    aboveSinceS: null,
  };
}

/**
 * Takes a reading in, in place: constant work, and no forecast yet. Its time lies after the last one's.
 *
 * @param readC as read; what the probe's calibration puts right is put right here
 */
export function takeReading(state: GuardState, timeS: number, readC: number): void {
  const { track, turns, setup } = state;
  const { correction } = setup.probe;
  const tempC = correction ? readC + correctionAt(correction, readC) : readC;
  if (!track) {
    begin(state, timeS, tempC);
    return;
  }
  const fit = followReading(track, timeS, tempC);
  if (fit === 'doubted') {
    state.unconfirmed = { timeS, tempC: readC };
    return;
  }
  state.unconfirmed = null;
  const byItself = !state.off && (state.says === 'quiet' || state.says === 'watch');
  if (followTurns(turns, track, byItself)) state.click = null;
  noteHeights(state);
  const { says, why } = decide(state, tempC, fit);
  state.says = says;
  state.why = why;
}

/** A first reading at the ceiling waits for a second like any other that nothing bears out, but is watched. */
function begin(state: GuardState, timeS: number, tempC: number): void {
  const { ceilingC } = state.setup.rating ?? DEFAULT_RATING;
  state.track = startTrack(timeS, tempC);
  state.turns = startTurns(timeS, tempC);
  if (tempC >= ceilingC) {
    state.says = 'watch';
    state.why = 'at-ceiling';
    state.unconfirmed = { timeS, tempC };
  }
}

function noteHeights(state: GuardState): void {
  const { track, off } = state;
  if (!track) return;
  if (off && track.tempC < off.lowestC) off.lowestC = track.tempC;
  const { opensC, opensTolK, overshootK } = state.setup.rating ?? DEFAULT_RATING;
  if (track.tempC <= opensC + opensTolK + overshootK) state.aboveSinceS = null;
  else state.aboveSinceS ??= track.timeS;
}

/** Takes a mark in, in place. Marks that say nothing of the heat change nothing. */
export function takeMark(state: GuardState, { kind, timeS }: Mark): void {
  const { track } = state;
  const tempC = track ? track.tempC : -Infinity;
  const moment = { timeS, tempC, slopeKPerS: track ? track.slopeKPerS : 0 };
  if (kind === 'click' && track && isInOpensBand(state, tempC)) state.click = moment;
  if (kind === 'heat-off' && track && !state.off) {
    state.off = { ...moment, lowestC: tempC };
    if (state.says === 'cut-heat') state.why = 'not-falling-yet';
    if (state.says === 'watch') Object.assign(state, { says: 'quiet', why: null });
  }
  if (kind === 'heat-on') {
    state.off = null;
    state.click = null;
    if (state.says === 'unplug') Object.assign(state, { says: 'cut-heat', why: 'not-falling-yet' });
  }
}

function isInOpensBand({ setup }: GuardState, tempC: number): boolean {
  const { opensC, opensTolK } = setup.rating ?? DEFAULT_RATING;
  return tempC > opensC - 2 * opensTolK;
}
