import type { Point } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';
import { totalUncertainty } from '../judge-point.ts';

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
  const points = (kind === 'cut-out' ? facts.cutOuts : facts.resets).filter(({ judged }) => judged);
  if (points.length === 0) return null;
  const meanUK = Math.sqrt(points.reduce((sum, { uK }) => sum + uK * uK, 0)) / points.length;
  return {
    points,
    meanC: mean(points.map(({ tempC }) => tempC)),
    meanUK,
    meanUTotalK: totalUncertainty(meanUK, facts.input.probe),
  };
}

/** Arithmetic mean of at least one value. */
export function mean(values: number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
