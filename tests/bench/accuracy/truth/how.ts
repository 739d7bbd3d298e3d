import type { FindingCode } from '#shared/analysis/analysis.ts';

/** Whether something holds, so surely that only one answer is right; or lies so near a limit that either is. */
export type How = 'certain' | 'possible' | 'no';

export type Sign = { code: FindingCode; how: How };

const RANK: Record<How, number> = { no: 0, possible: 1, certain: 2 };

/** A value over a limit by this much, where a record may be wrong by the slack either way. */
export function over(by: number, slack: number): How {
  if (by > slack) return 'certain';
  return by > -slack ? 'possible' : 'no';
}

/** All of these hold. */
export function all(...hows: How[]): How {
  return hows.reduce((least, how) => (RANK[how] < RANK[least] ? how : least), 'certain');
}

/** One of these holds. */
export function any(...hows: How[]): How {
  return hows.reduce((most, how) => (RANK[how] > RANK[most] ? how : most), 'no');
}

export function not(how: How): How {
  if (how === 'possible') return how;
  return how === 'certain' ? 'no' : 'certain';
}

/** No surer than possible. */
export function atMostPossible(how: How): How {
  return how === 'no' ? 'no' : 'possible';
}
