import type { Finding, Outcome } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';

export function decideOutcome(findings: Finding[], facts: RunFacts): Outcome {
  return findings.length > 0 && facts.durationS >= 0 ? 'not-proven' : 'not-proven';
}
