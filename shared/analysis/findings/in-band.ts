import type { Finding, Point } from '../analysis.ts';
import { bandOf } from '../judge-point.ts';
import type { Rating } from '../rating.ts';
import type { RunFacts } from '../run-facts.ts';
import { probabilityBetween } from '../statistics/normal-probability.ts';
import { judgedPoints } from './judged-points.ts';
import { countCalls } from './undecided-counts.ts';

const LEAST_PROBABILITY = 0.95;

/**
 * At least two cut-outs and one reset, none outside; the mean of the judged cut-outs lies in its band with at least
 * 95 % probability as to the readings' own uncertainty, or each of them is inside; the same for the resets. Tried only
 * where nothing else holds.
 *
 * Assumes normal errors of the mean. Simple acceptance as to the probe, ILAC-G8:09/2019, 4.2.1: its accuracy is in
 * the calls and in the probabilities printed.
 *
 * Evidence: cutOuts, resets (judged ones), cycles, meanCutOutC, meanCutOutUK, cutOutProbability, meanResetC,
 * meanResetUK, resetProbability; the probabilities count the probe's accuracy too.
 */
export function findInBand(facts: RunFacts): Finding | null {
  const { rating } = facts.input;
  if (!rating || facts.cutOuts.length < 2 || facts.resets.length < 1) return null;
  if (countCalls(facts, 'outside') > 0) return null;
  const opens = placeInBand('cut-out', facts, rating);
  const closes = placeInBand('reset', facts, rating);
  if (!opens?.lies || !closes?.lies) return null;
  return {
    code: 'in-band',
    fromS: 0,
    toS: facts.durationS,
    evidence: {
      cutOuts: opens.points,
      resets: closes.points,
      cycles: facts.cycles.length,
      meanCutOutC: opens.meanC,
      meanCutOutUK: opens.meanUTotalK,
      cutOutProbability: opens.probability,
      meanResetC: closes.meanC,
      meanResetUK: closes.meanUTotalK,
      resetProbability: closes.probability,
    },
  };
}

function placeInBand(kind: Point['kind'], facts: RunFacts, rating: Rating) {
  const judged = judgedPoints(facts, kind);
  if (!judged) return null;
  const { lowC, highC } = bandOf(kind, rating);
  const { meanC, meanUK, meanUTotalK, points } = judged;
  const likely = probabilityBetween(meanC, meanUK / 2, lowC, highC) >= LEAST_PROBABILITY;
  return {
    lies: likely || points.every(({ call }) => call === 'inside'),
    points: points.length,
    meanC,
    meanUTotalK,
    probability: probabilityBetween(meanC, meanUTotalK / 2, lowC, highC),
  };
}
