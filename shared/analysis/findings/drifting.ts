import type { Finding } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';
import { cutOutTrend } from './cut-out-trend.ts';

/** A slope stands out over this many standard errors … */
const ERRORS = 4;
/** … or at this p-value of Student's t test. */
const LEAST_P = 0.001;

/**
 * The judged cut-outs climb or sink by more than the rated tolerance in all, by a slope that stands out.
 *
 * Assumes cycles of the same kind, so that a sound thermostat has no trend. Statistic: t test of a least-squares slope.
 *
 * Evidence: cutOuts, slopePerCycleK, slopePerCycleUK (expanded), totalK, toleranceK, pValue.
 */
export function findDrifting(facts: RunFacts): Finding | null {
  const { rating } = facts.input;
  const trend = cutOutTrend(facts);
  if (!rating || !trend) return null;
  const standsOut =
    Math.abs(trend.slopePerCycleK) > ERRORS * trend.slopeErrorK || trend.pValue < LEAST_P;
  if (!standsOut || Math.abs(trend.totalK) <= rating.opensTolK) return null;
  return {
    code: 'drifting',
    fromS: trend.fromS,
    toS: trend.toS,
    evidence: {
      cutOuts: trend.cutOuts,
      slopePerCycleK: trend.slopePerCycleK,
      slopePerCycleUK: 2 * trend.slopeErrorK,
      totalK: trend.totalK,
      toleranceK: rating.opensTolK,
      pValue: trend.pValue,
    },
  };
}
