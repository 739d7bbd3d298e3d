import type { Point } from '#shared/analysis/analysis.ts';
import type { TrueTurn } from '#server/commands/heat-model/true-turning-points.ts';

export type FoundTurn = Pick<Point, 'kind' | 'timeS' | 'tempC'> & Partial<Point>;

/**
 * True turns against found ones of their kind, each used once. `needed` must be found; `accepted` (which holds the
 * needed ones and those within 0.6 °F of the threshold) may be.
 */
export function matchTurns(
  found: FoundTurn[],
  needed: TrueTurn[],
  accepted: TrueTurn[],
  withinS: number,
) {
  const left = [...found];
  const pairs: { truth: TrueTurn; point: FoundTurn; needed: boolean }[] = [];
  for (const truth of accepted) {
    const near = left
      .filter((point) => point.kind === truth.kind && lies(point, truth, withinS))
      .sort((a, b) => Math.abs(a.timeS - truth.timeS) - Math.abs(b.timeS - truth.timeS))[0];
    if (!near) continue;
    left.splice(left.indexOf(near), 1);
    pairs.push({ truth, point: near, needed: isNeeded(truth, needed) });
  }
  const hits = pairs.filter((pair) => pair.needed).length;
  return { pairs, hits, missed: needed.length - hits, invented: left.length };
}

function isNeeded(truth: TrueTurn, needed: TrueTurn[]): boolean {
  return needed.some(({ timeS, kind }) => timeS === truth.timeS && kind === truth.kind);
}

function lies(point: FoundTurn, truth: TrueTurn, withinS: number): boolean {
  if (Math.abs(point.timeS - truth.timeS) <= withinS) return true;
  return point.timeS >= truth.flatFromS && point.timeS <= truth.flatToS;
}
