import type { Call, Point } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';

/** The judged points of both kinds, in time order. */
export function allJudged({ cutOuts, resets }: RunFacts): Point[] {
  return [...cutOuts, ...resets].filter(({ judged }) => judged).sort((a, b) => a.timeS - b.timeS);
}

/** How many judged points have a call. */
export function countCalls(facts: RunFacts, call: Call): number {
  return allJudged(facts).filter((point) => point.call === call).length;
}
