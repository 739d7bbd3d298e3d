import type { JobState } from '#shared/schemas/jobs.ts';

export const JOB_STATE_WORDS: Record<JobState, string> = {
  booked: 'Booked',
  'on-site': 'On site',
  'waiting-for-part': 'Waiting for part',
  'proof-run-due': 'Proof run due',
  fixed: 'Fixed',
  closed: 'Closed',
};

export const OUTCOME_WORDS = { stop: 'stop', proven: 'proven', 'not-proven': 'not proven' };

type PlateWords = { make: string; model: string; fuel: string };

/** "Calder D-60, electric". */
export function machineWords({ make, model, fuel }: PlateWords) {
  return `${[make, model].filter(Boolean).join(' ')}, ${fuel}`;
}

/** Words a customer said, in quotation marks, whether or not they were typed with them. */
export function quoted(words: string) {
  return `“${words.replace(/^["“”]+|["“”]+$/g, '')}”`;
}

/** "T. Birkett": a name short enough for a column. */
export function shortName(name: string) {
  const parts = name.trim().split(/\s+/);
  const last = parts.at(-1) ?? '';
  return parts.length < 2 ? last : `${parts[0]?.[0]}. ${last}`;
}
