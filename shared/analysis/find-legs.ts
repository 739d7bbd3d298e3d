import type { Rating } from './rating.ts';
import { fitLeg } from './fit-response.ts';
import { findKnee } from './find-knee.ts';
import { isColdStart } from './find-room.ts';
import type { BinnedView, Extreme, Gap, RunLeg } from './run-facts.ts';

/** Shares of a leg left out of its fit: the rounded corner after a turn, and more where the whole drum is cold. */
const CORNER = 0.15;
const COLD_CORNER = 0.3;
/** Left out before a turn whose switch instant is not known. */
const LAST_CORNER = 0.08;

/**
 * The stretches between extremes, each fitted as a first-order response clear of the corners at its ends.
 *
 * @param extremes classified
 */
export function findLegs(
  view: BinnedView,
  extremes: Extreme[],
  gaps: Gap[],
  rating: Rating | null,
  noiseK: number,
): RunLeg[] {
  return extremes.slice(1).map((to, i) => {
    const from = extremes[i]!;
    const kind = to.kind === 'peak' ? 'heating' : 'cooling';
    const fromCold = kind === 'heating' && isColdStart(extremes, i, rating);
    const lengthS = to.timeS - from.timeS;
    const corner = fromCold ? COLD_CORNER : from.turnedBy === 'start' ? 0 : CORNER;
    const startS = from.timeS + corner * lengthS;
    const isEnd = to.turnedBy === 'end';
    const endS = isEnd ? to.timeS : (to.switched?.timeS ?? to.timeS - LAST_CORNER * lengthS);
    return {
      kind,
      from,
      to,
      fit: fitLeg(view.timesS, view.tempsC, startS, endS),
      knee: kind === 'heating' ? findKnee(view, startS, endS, noiseK) : null,
      fromCold,
      hasGap: gaps.some((gap) => gap.fromS < to.timeS && gap.toS > from.timeS),
    };
  });
}
