import type { Finding } from '../analysis.ts';
import { bandOf } from '../judge-point.ts';
import type { RunFacts } from '../run-facts.ts';
import { median } from '../statistics/quantile.ts';
import { mean } from './judged-points.ts';

/** Cut-outs that make "again and again". */
const LEAST_CUT_OUTS = 3;
/** Share of the cut-outs that must come before the band. */
const SHARE_BELOW = 0.75;
/** Share of the rated differential under which a swing is short. */
const SHORT_SWING = 0.7;

/**
 * Heat is cut again and again before the exhaust reaches the opens band, with swings well short of the rated
 * differential: something upstream is cutting.
 *
 * Assumes that a thermostat with the rated differential swings the exhaust by at least 0.7 of it; the air swings
 * further than the disc (common practice), so short swings are not the thermostat's.
 *
 * Evidence: cutOuts, meanCutOutC, bandLowC, meanSwingK, ratedDifferentialK, medianOnS.
 */
export function findLimitCycling(facts: RunFacts): Finding | null {
  const { rating } = facts.input;
  const { cutOuts, resets, cycles } = facts;
  const first = cutOuts[0];
  const last = cutOuts.at(-1);
  if (!rating || !first || !last || cutOuts.length < LEAST_CUT_OUTS || cycles.length === 0)
    return null;
  const { lowC } = bandOf('cut-out', rating);
  const below = cutOuts.filter(({ tempC, uTotalK }) => tempC + uTotalK < lowC);
  if (below.length < SHARE_BELOW * cutOuts.length || resets.length < LEAST_CUT_OUTS - 1)
    return null;

  const swingK = median(cycles.map((cycle) => cycle.swingK));
  const ratedDifferentialK = rating.opensC - rating.closesC;
  if (swingK >= SHORT_SWING * ratedDifferentialK) return null;
  return {
    code: 'limit-cycling',
    fromS: first.timeS,
    toS: last.timeS,
    evidence: {
      cutOuts: cutOuts.length,
      meanCutOutC: mean(cutOuts.map(({ tempC }) => tempC)),
      bandLowC: lowC,
      meanSwingK: mean(cycles.map((cycle) => cycle.swingK)),
      ratedDifferentialK,
      medianOnS: median(cycles.map(({ onS }) => onS)),
    },
  };
}
