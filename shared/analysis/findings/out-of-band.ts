import type { Finding, Point } from '../analysis.ts';
import { bandOf } from '../judge-point.ts';
import type { Rating } from '../rating.ts';
import type { RunFacts, SwitchInstant } from '../run-facts.ts';
import { totalUncertainty } from '../judge-point.ts';
import { judgedPoints, mean, type JudgedPoints } from './judged-points.ts';

/**
 * opens-high, opens-low, closes-high, closes-low: the judged points of a kind together lie outside their band, its
 * allowance included, on one side; or their switch instants do by more than the allowance could explain.
 *
 * Assumes that the run's points are of one thermostat, so that their mean speaks for it. The bound is mean ± U with
 * the probe's part, which does not average out (JCGM 100).
 *
 * Evidence: points, meanC, meanUK, bandLowC, bandHighC, allowanceK, by (points, switches), firstOnly.
 */
export function findOutOfBand(facts: RunFacts): Finding[] {
  const { rating } = facts.input;
  if (!rating) return [];
  return (['cut-out', 'reset'] as const).flatMap((kind) => {
    const found = sideOf(kind, facts, rating);
    return found ? [found] : [];
  });
}

type Place = { meanC: number; meanUK: number; side: 'high' | 'low'; by: 'points' | 'switches' };

function sideOf(kind: Point['kind'], facts: RunFacts, rating: Rating): Finding | null {
  const judged = judgedPoints(facts, kind);
  const place =
    judged && (byPoints(kind, judged, rating) ?? bySwitches(kind, judged, facts, rating));
  if (!judged || !place) return null;
  const { lowC, highC } = bandOf(kind, rating);
  const allowed = (kind === 'cut-out') === (place.side === 'high');
  const verb = kind === 'cut-out' ? 'opens' : 'closes';
  return {
    code: `${verb}-${place.side}`,
    fromS: judged.points[0]?.timeS ?? 0,
    toS: judged.points.at(-1)?.timeS ?? 0,
    evidence: {
      points: judged.points.length,
      meanC: place.meanC,
      meanUK: place.meanUK,
      bandLowC: lowC,
      bandHighC: highC,
      allowanceK: allowed ? (kind === 'cut-out' ? rating.overshootK : rating.undershootK) : 0,
      by: place.by,
      firstOnly: kind === 'cut-out' && facts.cutOuts.length < 2,
    },
  };
}

function byPoints(kind: Point['kind'], judged: JudgedPoints, rating: Rating): Place | null {
  const { lowEndC, highEndC } = bandOf(kind, rating);
  const { meanC, meanUTotalK: meanUK } = judged;
  if (meanC - meanUK > highEndC) return { meanC, meanUK, side: 'high', by: 'points' };
  if (meanC + meanUK < lowEndC) return { meanC, meanUK, side: 'low', by: 'points' };
  return null;
}

/**
 * The disc feels the air late by no more than the allowance, so a switch that far outside is not its lag. Taken only
 * where the instants are known to better than half the tolerance, as for a call; what is unknown of them may be common
 * to all (the machine's lags), so that it does not average out.
 */
function bySwitches(
  kind: Point['kind'],
  judged: JudgedPoints,
  facts: RunFacts,
  rating: Rating,
): Place | null {
  const switches = switchesOf(judged, facts);
  if (switches.length < judged.points.length) return null;
  const ownUK = mean(switches.map(({ uK }) => uK));
  const { lowC, highC } = bandOf(kind, rating);
  if (ownUK >= (highC - lowC) / 4) return null;
  const meanC = mean(switches.map(({ tempC }) => tempC));
  // A switch instant is no better known than the turn that it leads to.
  const uK = Math.max(ownUK, 2 * judged.meanUK);
  const meanUK = totalUncertainty(uK, facts.input.probe, meanC);
  const allowanceK = kind === 'cut-out' ? rating.overshootK : rating.undershootK;
  if (meanC - meanUK > highC + allowanceK) return { meanC, meanUK, side: 'high', by: 'switches' };
  if (meanC + meanUK < lowC - allowanceK) return { meanC, meanUK, side: 'low', by: 'switches' };
  return null;
}

/** A switch further before its turn than this share of the leg between is not that turn's. */
const MOST_LEAD = 0.5;

/** The switch instants of the points, where the record shows them. */
function switchesOf({ points }: JudgedPoints, { extremes }: RunFacts): SwitchInstant[] {
  const own = new Map<number, SwitchInstant>();
  extremes.forEach(({ timeS, switched }, i) => {
    const lengthS = timeS - (extremes[i - 1]?.timeS ?? -Infinity);
    if (switched && timeS - switched.timeS < MOST_LEAD * lengthS) own.set(timeS, switched);
  });
  return points.flatMap(({ timeS }) => own.get(timeS) ?? []);
}
