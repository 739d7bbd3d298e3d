import type { Point } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';
import { totalUncertainty } from '../judge-point.ts';
import { median } from '../statistics/quantile.ts';

/**
 * How far sound points differ anyway, expanded, K (2 °F). Points known to better than this weigh alike in a mean, and
 * one that the record hardly shows does not spoil it.
 */
const OWN_SPREAD_K = 2 / 1.8;

/** A point this many times less certain than the usual one, and than this many K (4 °F), is hardly shown. */
const HARDLY_TIMES = 4;
const HARDLY_SHOWN_K = 4 / 1.8;

/** Judged points of a kind taken together. */
export type JudgedPoints = {
  points: Point[];
  meanC: number;
  /** Expanded, k = 2: each point's own uncertainty, which averages out; K. */
  meanUK: number;
  /** With the probe's part, which does not average out, K. */
  meanUTotalK: number;
};

/** The judged cut-outs or resets of a run, or null where there is none. */
export function judgedPoints(facts: RunFacts, kind: Point['kind']): JudgedPoints | null {
  const all = (kind === 'cut-out' ? facts.cutOuts : facts.resets).filter(({ judged }) => judged);
  if (all.length === 0) return null;
  const points = shownPoints(all);
  const weights = points.map(({ uK }) => 1 / (uK * uK + OWN_SPREAD_K * OWN_SPREAD_K));
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const shares = weights.map((weight) => weight / total);
  const meanUK = Math.sqrt(points.reduce((sum, { uK }, i) => sum + (shares[i]! * uK) ** 2, 0));
  const meanC = points.reduce((sum, { tempC }, i) => sum + shares[i]! * tempC, 0);
  return {
    points,
    meanC,
    meanUK,
    meanUTotalK: totalUncertainty(meanUK, facts.input.probe, meanC),
  };
}

/** Without those that the record hardly shows: far less certain than the others, and than a few degrees. */
function shownPoints(points: Point[]): Point[] {
  const usualUK = median(points.map(({ uK }) => uK));
  return points.filter(({ uK }) => uK <= Math.max(HARDLY_TIMES * usualUK, HARDLY_SHOWN_K));
}

/** Arithmetic mean of at least one value. */
export function mean(values: number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
