import type { Finding } from '../analysis.ts';
import { bandOf } from '../judge-point.ts';
import type { RunFacts } from '../run-facts.ts';
import { median } from '../statistics/quantile.ts';
import { studentTQuantile } from '../statistics/student-t.ts';
import { mean } from './judged-points.ts';

/** Cut-outs that make "again and again". */
const LEAST_CUT_OUTS = 3;
/** Share of the cut-outs that must come before the band. */
const SHARE_BELOW = 0.75;
/** Share of the rated differential under which a swing is short. */
const SHORT_SWING = 0.7;
/** Share of the clean machine's on-time under which one is far shorter. */
const SHORT_ON = 0.5;
/** Of a one-sided bound. */
const BOUND = 0.95;

/**
 * Heat is cut again and again before the exhaust reaches the opens band, with swings well short of the rated
 * differential, or on-times far shorter than those of the machine's clean run: something upstream is cutting.
 *
 * Assumes that a thermostat with the rated differential swings the exhaust by at least 0.7 of it; the air swings
 * further than the disc (common practice), so short swings are not the thermostat's. A swing is short where the upper
 * 95 % bound of the cycles' median (Student's t, robust deviation) is under 0.7 of the rated one; on-times are short
 * where the same bound is under half the clean machine's. A thermostat near the limit keeps its own name.
 *
 * Evidence: cutOuts, meanCutOutC, bandLowC, meanSwingK, ratedDifferentialK, medianOnS, usualOnS (the clean run's), by
 * (swings, on-times).
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

  const ratedDifferentialK = rating.opensC - rating.closesC;
  const by = whatIsShort(facts, ratedDifferentialK);
  if (!by) return null;
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
      usualOnS: facts.input.reference?.onS ?? null,
      by,
    },
  };
}

function whatIsShort({ cycles, input }: RunFacts, ratedK: number): 'swings' | 'on-times' | null {
  const swingsK = cycles.map(({ swingK }) => swingK);
  if (Math.max(upperBound(swingsK), mean(swingsK)) < SHORT_SWING * ratedK) return 'swings';
  const usualS = input.reference?.onS;
  const isShort =
    usualS !== undefined && upperBound(cycles.map(({ onS }) => onS)) < SHORT_ON * usualS;
  return isShort ? 'on-times' : null;
}

/**
 * Upper 95 % bound of the median of like values, from their median deviation (a normal sample's standard deviation is
 * 1.4826 of it, and its median's error π/2 times the mean's in variance): one cycle counted double spoils neither.
 */
function upperBound(values: number[]): number {
  const n = values.length;
  const middle = median(values);
  if (n < 2) return middle;
  const deviation = 1.4826 * median(values.map((value) => Math.abs(value - middle)));
  return middle + studentTQuantile(BOUND, n - 1) * deviation * Math.sqrt(Math.PI / 2 / n);
}
