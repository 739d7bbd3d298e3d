import type { Finding, Outcome } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';

/**
 * What a run amounts to: *stop* where heat did not go off or a point may have reached the ceiling; *proven* where
 * enough complete cycles are in band and nothing else was found (simple acceptance, ILAC-G8:09/2019, 4.2.1); else
 * *not-proven*.
 *
 * @param findings of the same facts, not empty
 */
export function decideOutcome(findings: Finding[], facts: RunFacts): Outcome {
  if (findings.some(({ code }) => code === 'runaway' || code === 'heat-stays-on')) return 'stop';
  if (reachesCeiling(facts)) return 'stop';
  const inBand = findings.length === 1 && findings[0]?.code === 'in-band';
  return inBand && facts.cycles.length >= facts.input.minCycles ? 'proven' : 'not-proven';
}

function reachesCeiling({ input, cutOuts, resets }: RunFacts): boolean {
  const { rating } = input;
  if (!rating) return false;
  return [...cutOuts, ...resets].some(({ tempC, uTotalK }) => tempC + uTotalK >= rating.ceilingC);
}
