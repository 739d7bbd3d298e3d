import type { Finding } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';

/** Why a record ends before anything can be said. */
export const TOO_SHORT_REASONS = [
  'no-rating',
  'probe-too-slow',
  'few-readings',
  'damp-load',
  'ended-before-cut-out',
  'too-few-cut-outs',
  'no-reset',
] as const;
export type TooShortReason = (typeof TOO_SHORT_REASONS)[number];

/** Under this many readings there is nothing to follow. */
const LEAST_READINGS = 5;

/**
 * The record ends before anything else can be said. Tried last, so it always holds.
 *
 * Evidence: reason (see TOO_SHORT_REASONS), cutOuts, resets.
 */
export function findTooShort(facts: RunFacts): Finding {
  return {
    code: 'too-short',
    fromS: 0,
    toS: facts.durationS,
    evidence: {
      reason: reasonOf(facts),
      cutOuts: facts.cutOuts.length,
      resets: facts.resets.length,
    },
  };
}

function reasonOf({ input, probeTooSlow, series, cutOuts }: RunFacts): TooShortReason {
  if (!input.rating) return 'no-rating';
  if (probeTooSlow) return 'probe-too-slow';
  if (series.timesS.length < LEAST_READINGS) return 'few-readings';
  if (cutOuts.length === 0) return input.load === 'damp' ? 'damp-load' : 'ended-before-cut-out';
  return cutOuts.length === 1 ? 'too-few-cut-outs' : 'no-reset';
}
