import type { GuardSays, GuardView, GuardWhy } from '../analysis/guard/guard-state.ts';
import type { Rating } from '../analysis/rating.ts';
import type { DisplayUnit } from '../units.ts';
import { formatRated, formatTemp } from './format.ts';

/** What the guard's words need to know beside its state. */
export type AboutGuard = {
  unit: DisplayUnit;
  fuel: 'electric' | 'gas';
  rating: Pick<Rating, 'ceilingC' | 'highLimitC'>;
  /** Seconds of the run, for the countdown. */
  nowS: number;
};

/** The guard for a person: a few words, why, and what to do, in order. */
export type WordedGuard = {
  words: string;
  why: string | null;
  /** The forecast as a sentence; null where nothing is foreseen or the heat is off. */
  forecast: string | null;
  /** A reading that waits for a second one. */
  doubt: string | null;
  instructions: string[];
};

const WORDS: Record<GuardSays, string> = {
  quiet: 'Guard is watching',
  watch: 'Watch',
  'cut-heat': 'Turn the heat off now',
  unplug: 'Pull the plug or open the breaker now',
};

const STORED_HEAT = 'Stored heat carries the exhaust on for a while.';

/** A view of the guard in words for the technician beside the machine. */
export function wordGuard(view: GuardView, about: AboutGuard): WordedGuard {
  const { says, why, unconfirmed } = view;
  return {
    words: WORDS[says],
    why: why && sentenceOf(why, about),
    forecast: says === 'unplug' ? null : wordForecast(view, about),
    doubt:
      unconfirmed &&
      `${formatTemp(unconfirmed.tempC, about.unit)} is far off the forecast. Read again now.`,
    instructions: instructionsOf(says, about.fuel === 'gas'),
  };
}

function sentenceOf(why: GuardWhy, { unit, rating }: AboutGuard): string {
  const limit = formatRated(rating.highLimitC, unit);
  const sentences: Record<GuardWhy, string> = {
    'at-ceiling': `The exhaust is at ${formatRated(rating.ceilingC, unit)}, where the heat must be off.`,
    'limit-near': `The fuse’s rating of ${limit} is near, and the heat is still on.`,
    'above-band': 'The exhaust is above the opens band and its allowance, with no cut-out.',
    'above-cut-outs': 'The exhaust is above every cut-out of this run and still climbs.',
    'after-click': 'A click was heard, and the exhaust climbs on.',
    'not-falling-yet': `Heat off is marked; the exhaust does not fall yet. ${STORED_HEAT}`,
    'climbs-after-off':
      'Heat off is marked, and the exhaust climbs on. That is consistent with heat that does not obey the selector.',
  };
  return sentences[why];
}

/** "At this rate 196 °F is reached in 1 min 40 s, between 1 min 20 s and 2 min 10 s from now." */
function wordForecast({ forecast }: GuardView, about: AboutGuard): string | null {
  const limit = forecast?.highLimit;
  if (!limit || limit.likelyS === null) return null;
  const rated = formatRated(about.rating.highLimitC, about.unit);
  const from = (timeS: number) => inMinutes(Math.max(0, timeS - about.nowS));
  const until = limit.latestS === null ? 'or later' : `at the latest in ${from(limit.latestS)}`;
  return `At this rate the fuse’s rating of ${rated} is reached in ${from(limit.likelyS)}: at the earliest in ${from(limit.earliestS)}, ${until}.`;
}

function inMinutes(spanS: number): string {
  const wholeS = Math.round(spanS);
  const minutes = Math.floor(wholeS / 60);
  const seconds = `${wholeS % 60}\u00a0s`;
  return minutes === 0 ? seconds : `${minutes}\u00a0min ${seconds}`;
}

function instructionsOf(says: GuardSays, gas: boolean): string[] {
  if (says === 'quiet') return [];
  if (says === 'watch') return ['Keep a hand on the heat selector and read on.'];
  if (says === 'cut-heat') {
    return [
      'Turn the selector to no-heat and let the drum turn. Then press Heat off.',
      'Stay with the machine until the exhaust falls and goes on falling.',
      'If it still climbs, pull the plug or open the breaker.',
    ];
  }
  return [
    'Pull the plug or open the breaker now. A path to the frame does not obey the selector.',
    ...(gas
      ? [
          'Shut off the gas. On a smell of gas: touch no switch, air the room, get people out and call the gas emergency line.',
        ]
      : []),
    'On smoke or a burning smell: people out, call the fire service.',
    'Stay with the machine until the exhaust falls. Do not leave it usable.',
  ];
}
