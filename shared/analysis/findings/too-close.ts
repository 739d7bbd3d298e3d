import type { Finding } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';
import { allJudged, countCalls } from './undecided-counts.ts';

/**
 * Nothing is outside, but too many judged points are too close, or only within the allowance, to say in band. Tried
 * only where in-band does not hold.
 *
 * Evidence: judged, tooClose, withinAllowance, inside.
 */
export function findTooClose(facts: RunFacts): Finding | null {
  if (facts.cutOuts.length < 2 || facts.resets.length < 1) return null;
  const judged = allJudged(facts);
  const tooClose = countCalls(facts, 'too-close');
  const withinAllowance = countCalls(facts, 'within-allowance');
  if (tooClose + withinAllowance === 0) return null;
  return {
    code: 'too-close',
    fromS: judged[0]?.timeS ?? 0,
    toS: judged.at(-1)?.timeS ?? facts.durationS,
    evidence: {
      judged: judged.length,
      tooClose,
      withinAllowance,
      inside: countCalls(facts, 'inside'),
    },
  };
}
