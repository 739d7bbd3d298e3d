import type { Probe, Rating } from '../rating.ts';
import type { ExhaustTrack } from './track-exhaust.ts';
import type { TurnTrack } from './track-turns.ts';

/** What the guard is told before a run. */
export type GuardSetup = {
  /** null: nothing is known of the machine; the usual ceiling and high limit hold. */
  rating: Rating | null;
  probe: Probe;
};

/** What the guard asks for, mildest first. */
export type GuardSays = 'quiet' | 'watch' | 'cut-heat' | 'unplug';

/** Why; the words live in shared/wording/word-guard.ts. */
export type GuardWhy =
  /** The exhaust is at the ceiling. */
  | 'at-ceiling'
  /** If the heat stays on, the high limit is reached too soon to wait. */
  | 'limit-near'
  /** Above the opens band and its allowance, with no cut-out yet. */
  | 'above-band'
  /** Well above every cut-out of this run, and still climbing. */
  | 'above-cut-outs'
  /** A click was heard, and the exhaust climbs on beyond what stored heat explains. */
  | 'after-click'
  /** Heat off was marked; the exhaust does not fall yet. */
  | 'not-falling-yet'
  /** Heat off was marked, and the exhaust climbs beyond what stored heat and the probe's lag explain. */
  | 'climbs-after-off';

/** When a temperature is reached if the heat stays on, s of the run: an interval of 95 %. */
export type Crossing = {
  earliestS: number;
  /** null: not within the next 600 s. */
  likelyS: number | null;
  latestS: number | null;
};

export type GuardForecast = {
  /** null: not even the earliest comes within the next 600 s. */
  ceiling: Crossing | null;
  highLimit: Crossing | null;
};

/** What a person is shown. */
export type GuardView = {
  says: GuardSays;
  /** null while it is quiet. */
  why: GuardWhy | null;
  /** null where the exhaust does not climb, or is far below. */
  forecast: GuardForecast | null;
  /** A reading far off the forecast: it counts once a second one agrees. */
  unconfirmed: { timeS: number; tempC: number } | null;
};

/** The exhaust when a mark was made: what may still come of stored heat is counted from here. */
export type Moment = { timeS: number; tempC: number; slopeKPerS: number };

/** The guard between two readings: plain data that JSON keeps. */
export type GuardState = GuardView & {
  setup: GuardSetup;
  /** null before the first reading. */
  track: ExhaustTrack | null;
  turns: TurnTrack;
  /** Heat off as marked; null while the heat is on. */
  off: (Moment & { lowestC: number }) | null;
  /** The last click of this leg. */
  click: Moment | null;
  /** Since when the exhaust is above the opens band and its allowance, s; null = it is not. */
  aboveSinceS: number | null;
};
