import { fitLine } from '../fit-line.ts';
import type { RunFacts } from '../run-facts.ts';
import { studentTProbability } from '../statistics/student-t.ts';
import { judgedPoints } from './judged-points.ts';

/** Judged cut-outs that a trend or a scatter needs. */
const LEAST_POINTS = 4;

/** A straight line through the judged cut-outs, one step a cycle. */
export type CutOutTrend = {
  cutOuts: number;
  fromS: number;
  toS: number;
  slopePerCycleK: number;
  /** Standard error (k = 1), with residuals and the points' own uncertainty counted, K. */
  slopeErrorK: number;
  /** Chance of such a slope with none there, two-sided. */
  pValue: number;
  /** First to last along the line, K. */
  totalK: number;
  /** Standard deviation about the line beyond the points' own uncertainty, K. */
  ownSdK: number;
};

/**
 * The trend of the judged cut-outs, or null where they are fewer than four.
 *
 * The variance of a point is the larger of what the residuals show and what its own uncertainty says: a fit that
 * happens to pass close to four points does not make them better known.
 */
export function cutOutTrend(facts: RunFacts): CutOutTrend | null {
  const judged = judgedPoints(facts, 'cut-out');
  if (!judged || judged.points.length < LEAST_POINTS) return null;
  const { points } = judged;
  const n = points.length;
  const line = fitLine(
    points.map((_, i) => i),
    points.map(({ tempC }) => tempC),
  );
  const residualVariance = line.residualSdC ** 2;
  const ownVariance = points.reduce((sum, { uK }) => sum + (uK / 2) ** 2, 0) / n;
  const stepSquares = (n * (n * n - 1)) / 12;
  const slopeErrorK = Math.sqrt(Math.max(residualVariance, ownVariance) / stepSquares);
  const t = slopeErrorK > 0 ? Math.abs(line.slopeCPerS) / slopeErrorK : Infinity;
  return {
    cutOuts: n,
    fromS: points[0]!.timeS,
    toS: points[n - 1]!.timeS,
    slopePerCycleK: line.slopeCPerS,
    slopeErrorK,
    pValue: Number.isFinite(t) ? 2 * (1 - studentTProbability(t, n - 2)) : 0,
    totalK: line.slopeCPerS * (n - 1),
    ownSdK: Math.sqrt(Math.max(0, residualVariance - ownVariance)),
  };
}
