import type { Analysis, Call } from '../analysis/analysis.ts';

const CALLS: Record<Call, { word: string; sentence: string }> = {
  inside: { word: 'inside', sentence: 'It lies in the rated band, uncertainty included.' },
  outside: {
    word: 'outside',
    sentence: 'It lies beyond the band and its allowance, uncertainty included.',
  },
  'within-allowance': {
    word: 'within the allowance',
    sentence: 'It lies beyond the band, within what the air may run ahead of the thermostat.',
  },
  'too-close': {
    word: 'too close to call',
    sentence: 'With this uncertainty it cannot be told from the edge.',
  },
};

/** A call as a word for a table, and a sentence that says what the word means. */
export function wordCall(call: Call): { word: string; sentence: string } {
  return CALLS[call];
}

/** Why no point is called, as a sentence; null where they are called. */
export function wordNotJudged(notJudged: Analysis['notJudged']): string | null {
  if (notJudged === null) return null;
  return notJudged === 'no-rating'
    ? 'Not judged: no rating is known for this machine.'
    : 'Not judged: the probe is too slow for these cycles.';
}
