import type { Rating } from './rating.ts';
import { gapsWithin } from './find-gaps.ts';
import { fitLeg } from './fit-leg.ts';
import { findKnee } from './find-knee.ts';
import { isColdStart } from './find-room.ts';
import type { BinnedView, Extreme, Gap, RunLeg } from './run-facts.ts';

/** Shares of a leg left out of its fit: the rounded corner after a turn, and more where the whole drum is cold. */
const CORNER = 0.15;
const COLD_CORNER = 0.3;
const DELAYS = 8;
const MOST_CORNER = 0.35;
/** Left out before a turn whose switch instant is not known. */
const LAST_CORNER = 0.08;
/** A record with more legs than this has its legs fitted quickly. */
const MANY_LEGS = 200;

/**
 * How long the corner after a turn is rounded, s: some eight times what the turn came after its switch, by which four
 * lags have passed.
 */
function cornerAfter(from: Extreme, lengthS: number, fromCold: boolean): number {
  if (fromCold) return COLD_CORNER * lengthS;
  if (from.turnedBy === 'start') return 0;
  const delayS = from.switched ? from.timeS - from.switched.timeS : 0;
  return Math.max(CORNER * lengthS, Math.min(DELAYS * delayS, MOST_CORNER * lengthS));
}

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
  const quickly = extremes.length > MANY_LEGS;
  const lastTauS = new Map<string, number | null>();
  return extremes.slice(1).map((to, i) => {
    const from = extremes[i]!;
    const kind = to.kind === 'peak' ? 'heating' : 'cooling';
    const fromCold = kind === 'heating' && isColdStart(extremes, i, rating);
    const lengthS = to.timeS - from.timeS;
    const startS = from.timeS + cornerAfter(from, lengthS, fromCold);
    const isEnd = to.turnedBy === 'end';
    const endS = isEnd ? to.timeS : (to.switched?.timeS ?? to.timeS - LAST_CORNER * lengthS);
    const span = { fromS: startS, toS: endS, guessTauS: lastTauS.get(kind) ?? null };
    const fit = fitLeg(view.timesS, view.tempsC, span, quickly);
    lastTauS.set(kind, fit && fit.tauS);
    return {
      kind,
      from,
      to,
      fit,
      knee: kind === 'heating' ? findKnee(view, startS, endS, noiseK) : null,
      fromCold,
      hasGap: gapsWithin(gaps, from.timeS, to.timeS).length > 0,
    };
  });
}
