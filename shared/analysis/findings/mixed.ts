import type { Finding } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';
import { allJudged, countCalls } from './undecided-counts.ts';

/**
 * Some judged points lie outside, and nothing with a name explains them. Tried only where no finding with a name holds.
 *
 * Evidence: judged, outside, tooClose, withinAllowance, inside.
 */
export function findMixed(facts: RunFacts): Finding | null {
  const judged = allJudged(facts);
  const outside = judged.filter(({ call }) => call === 'outside');
  if (outside.length === 0) return null;
  return {
    code: 'mixed',
    fromS: outside[0]?.timeS ?? 0,
    toS: outside.at(-1)?.timeS ?? facts.durationS,
    evidence: {
      judged: judged.length,
      outside: outside.length,
      tooClose: countCalls(facts, 'too-close'),
      withinAllowance: countCalls(facts, 'within-allowance'),
      inside: countCalls(facts, 'inside'),
    },
  };
}
