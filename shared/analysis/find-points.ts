import type { AnalysisInput, Point } from './analysis.ts';
import { isColdStart } from './find-room.ts';
import { bandProbability, callPoint, totalUncertainty, type PointToJudge } from './judge-point.ts';
import type { Extreme } from './run-facts.ts';

/**
 * Cut-outs and resets of a run with their calls.
 *
 * All are judged but the first cut-out after a cold start (cold metal overshoots); with fewer than two cut-outs that
 * one is.
 *
 * @param extremes classified
 * @param judgeable false where the probe is too slow: points, but no calls
 */
export function findPoints(extremes: Extreme[], input: AnalysisInput, judgeable: boolean) {
  const isCutOut = ({ kind, turnedBy }: Extreme) => kind === 'peak' && turnedBy === 'machine';
  const lone = extremes.filter(isCutOut).length < 2;
  const cutOuts: Point[] = [];
  const resets: Point[] = [];
  extremes.forEach((extreme, i) => {
    if (extreme.turnedBy !== 'machine') return;
    if (extreme.kind === 'valley') resets.push(toPoint(extreme, true, input, judgeable));
    else {
      const judged = lone || !isColdStart(extremes, i - 1, input.rating);
      cutOuts.push(toPoint(extreme, judged, input, judgeable));
    }
  });
  return { cutOuts, resets };
}

/** An extreme as a point, called and weighed where there is a rating to judge by. */
export function toPoint(
  { kind, timeS, tempC, uK, switched }: Extreme,
  judged: boolean,
  { rating, probe }: Pick<AnalysisInput, 'rating' | 'probe'>,
  judgeable: boolean,
): Point {
  const point: PointToJudge = {
    kind: kind === 'peak' ? 'cut-out' : 'reset',
    tempC,
    uTotalK: totalUncertainty(uK, probe, tempC),
    switchTempC: switched?.tempC ?? null,
    switchUTotalK: switched && totalUncertainty(switched.uK, probe, switched.tempC),
  };
  const by = judgeable ? rating : null;
  return {
    kind: point.kind,
    timeS,
    tempC,
    uK,
    uTotalK: point.uTotalK,
    judged,
    call: by && judged ? callPoint(point, by) : null,
    probability: by && bandProbability(point, by),
    switchTimeS: switched?.timeS ?? null,
    switchTempC: switched?.tempC ?? null,
    switchUS: switched?.uS ?? null,
  };
}
