import type { Analysis, Point } from '../analysis/analysis.ts';
import type { DisplayUnit } from '../units.ts';
import { formatMoment, formatWithin } from './format.ts';

/** What two answers on one run say differently. */
export type Apart = 'outcome' | 'findings' | 'points' | 'calls' | 'figures';

export type Compared = {
  /** Both were made by one version of the engine. */
  isSameVersion: boolean;
  /** In the order in which they weigh; empty where nothing that is printed differs. */
  apart: Apart[];
};

/**
 * Two answers on the same run, held against each other as they are printed.
 *
 * @param unit of the reader: figures count as alike where they are printed alike
 */
export function compareJudgements(one: Analysis, other: Analysis, unit: DisplayUnit): Compared {
  const differs = (say: (analysis: Analysis) => unknown) =>
    JSON.stringify(say(one)) !== JSON.stringify(say(other));
  const apart: Apart[] = [];
  if (differs(({ outcome }) => outcome)) apart.push('outcome');
  if (differs(({ findings }) => findings.map(({ code }) => code))) apart.push('findings');
  if (differs((analysis) => pointsOf(analysis).map(({ kind }) => kind))) apart.push('points');
  else if (differs((analysis) => pointsOf(analysis).map(({ call }) => call))) apart.push('calls');
  if (apart.length === 0 && differs((analysis) => pointsOf(analysis).map(printed(unit)))) {
    apart.push('figures');
  }
  return { isSameVersion: one.version === other.version, apart };
}

function pointsOf({ cutOuts, resets }: Analysis): Point[] {
  return [...cutOuts, ...resets].sort((a, b) => a.timeS - b.timeS);
}

const printed =
  (unit: DisplayUnit) =>
  ({ timeS, tempC, uTotalK }: Point) =>
    `${formatMoment(timeS)} ${formatWithin(tempC, uTotalK, unit)}`;
