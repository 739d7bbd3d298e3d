import type { Finding } from '../analysis/analysis.ts';
import type { Rating } from '../analysis/rating.ts';
import type { DisplayUnit } from '../units.ts';

/**
 * What the words depend on beside the finding. `fuel` other than gas counts as electric; `control` is `thermistor`
 * where a board switches the heat, `thermostat` where a disc does; not told, the words leave room for both.
 */
export type About = {
  unit: DisplayUnit;
  judgedBy: Rating | null;
  fuel: string;
  control?: string;
  /** How the duct was in this run, and in the run of the machine that stands beside it; not told, it may be either. */
  ducts?: ('on' | 'off')[];
};

/** A cause that the readings would be consistent with, why, and the check that settles it. */
export type Cause = { cause: string; why: string; settles: string };

/** A finding in words for a technician. */
export type WordedFinding = {
  title: string;
  sentences: string[];
  evidence: { label: string; value: string }[];
  /** Likeliest first. */
  causes: Cause[];
  /** In the order in which to make them. */
  nextChecks: string[];
};

/** How one code is worded: plain functions of the finding. */
export type FindingWords = {
  title: (finding: Finding, about: About) => string;
  sentences: (finding: Finding, about: About) => string[];
  causes: (finding: Finding, about: About) => Cause[];
  nextChecks: (finding: Finding, about: About) => string[];
};

/** A check that asks for a run with the duct so: none where there is such a run already. */
export function unlessRun({ ducts = [] }: About, duct: 'on' | 'off', check: string): string[] {
  return ducts.includes(duct) ? [] : [check];
}

/** A number of the evidence, or null where the finding does not carry it. */
export function numberOf({ evidence }: Finding, key: string): number | null {
  const value = evidence[key];
  return typeof value === 'number' ? value : null;
}

/** Whether the finding was made on a gas machine. */
export function isGas({ fuel }: Pick<About, 'fuel'>): boolean {
  return fuel === 'gas';
}

/** Whether a board with a thermistor switches the heat. */
export function hasBoard({ control }: Pick<About, 'control'>): boolean {
  return control === 'thermistor';
}

/** `one cycle`, `4 cycles`: a count with its noun. */
export function counted(count: number, noun: string, plural = `${noun}s`): string {
  return count === 1 ? `one ${noun}` : `${count} ${plural}`;
}
