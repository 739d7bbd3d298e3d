import type { Noise } from '../estimate-noise.ts';
import type { BinnedView, Extreme } from '../run-facts.ts';
import { median } from '../statistics/quantile.ts';
import { LEAST_AT_ONCE, locateTurns, type LocatedTurn } from './locate-turns.ts';
import { LEFT_OUT } from './plan-windows.ts';

/** A last leg that ends within this share of its swing of where the like turns lie may have turned. */
const NEAR_SHARE = 0.35;
/** The turn is believed within this share of the swing of the like ones, … */
const LIKE_SHARE = 0.15;
/** … and where it is known to this share of it. */
const SURE_SHARE = 0.12;
/** The last reading itself lies this share of the threshold on the way back: else nothing but the fit tells of a turn. */
const BACK_SHARE = 0.4;
/** The fitted leg passes the record's last reading within this share of the threshold, and its noise. */
const END_SHARE = 0.5;
const END_DEVIATIONS = 4;
/** Like turns to go by. */
const LEAST_LIKE = 1;

/**
 * A record may end so soon after its last turn that only a reading or two show the way back. Where the last leg
 * ends near the temperature at which the earlier ones turned, it is fitted with one switch more; the turn counts where
 * that fit knows it well, it is like the earlier ones, and its leg, carried on for half the usual spacing after the last
 * reading (which is when the record ends on average), reaches the threshold.
 *
 * @param extremes located; the last belongs to the record's end
 * @returns the extremes with that turn and the record's end after it, or as they were
 */
export function withLastTurn(
  extremes: Extreme[],
  view: BinnedView,
  noise: Noise,
  swingK: number,
): Extreme[] {
  const last = extremes[extremes.length - 1];
  const before = extremes[extremes.length - 2];
  if (!last || !before) return extremes;
  const greatK = Math.abs(last.tempC - before.tempC);
  const likes = extremes.filter(
    ({ kind, turnedBy }) => kind === last.kind && turnedBy === 'machine',
  );
  if (likes.length < LEAST_LIKE) return extremes;
  const likeC = median(likes.map(({ tempC }) => tempC));
  if (Math.abs(last.tempC - likeC) > NEAR_SHARE * greatK) return extremes;

  const endS = view.timesS[view.timesS.length - 1]!;
  const turnS = Math.min(last.timeS, endS - 0.25 * view.widthS);
  // Those before teach no more than a window holds.
  const from = Math.max(1, extremes.length - LEAST_AT_ONCE);
  const turns = [...extremes.slice(from, -1), { ...last, timeS: turnS }];
  const task = {
    turns,
    startS: extremes[from - 1]!.timeS,
    // What is left out at a record's end is made up for: here the last readings matter.
    endS: turnS + (endS + 1e-6 - turnS) / (1 - LEFT_OUT),
  };
  const located = locateTurns(view, task, noise);
  const found = located.turns[turns.length - 1];
  const aheadC = located.aheadC(endS + 0.5 * view.widthS);
  const nowC = located.aheadC(endS);
  if (!found || aheadC === null || nowC === null) return extremes;
  const lastC = view.tempsC[view.tempsC.length - 1]!;
  const missesK = Math.abs(nowC - lastC);
  if (missesK > END_SHARE * swingK + END_DEVIATIONS * noise.noiseK) return extremes;
  const sign = last.kind === 'valley' ? 1 : -1;
  if (sign * (lastC - found.tempC) < BACK_SHARE * swingK) return extremes;
  const isWhole = sign * (aheadC - found.tempC) >= swingK;
  if (!isWhole || !isLike(found, likeC, greatK)) return extremes;
  return [...extremes.slice(0, -1), ...endedBy(last, found, view, nowC)];
}

function isLike({ tempC, uK }: LocatedTurn, likeC: number, greatK: number): boolean {
  return uK <= SURE_SHARE * greatK && Math.abs(tempC - likeC) <= LIKE_SHARE * greatK;
}

/** The turn, and the record's end after it where its leg is by then. */
function endedBy(
  last: Extreme,
  found: LocatedTurn,
  { timesS }: BinnedView,
  endC: number,
): [Extreme, Extreme] {
  const endS = timesS[timesS.length - 1]!;
  const kind = last.kind === 'valley' ? 'peak' : 'valley';
  return [
    { ...last, turnedBy: 'machine', ...found, timeS: Math.min(found.timeS, endS) },
    { ...last, kind, turnedBy: 'end', timeS: endS, tempC: endC, switched: null },
  ];
}
