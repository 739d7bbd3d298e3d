import type { FigureDifference, RunDifferences } from '../analysis/compare/run-figures.ts';
import type { DisplayUnit } from '../units.ts';
import type { Cause } from './finding-words.ts';
import { formatSpan, formatStep, formatTemp } from './format.ts';

/** Two runs set beside each other, in words for a technician. */
export type WordedPair = {
  title: string;
  sentences: string[];
  /** What was measured in the first and the second run, and how far apart, with half its 95 % interval. */
  rows: { label: string; first: string; second: string; apart: string }[];
  /** Likeliest first; empty where nothing points anywhere. */
  causes: Cause[];
  nextChecks: string[];
};

/** The figures of two runs as rows of a table; what a run has too little of is left out. */
export function figureRows(differences: RunDifferences, unit: DisplayUnit): WordedPair['rows'] {
  const temp = (tempC: number) => formatTemp(tempC, unit);
  const step = (stepK: number) => formatStep(stepK, unit);
  const rows = [
    rowOf('Cut-outs, mean', differences.cutOuts, temp, step),
    rowOf('Overshoot, mean', differences.overshoots, step, step),
    rowOf('Heat on, mean', differences.onTimes, formatSpan, formatSeconds),
    rowOf('Heat off, mean', differences.offTimes, formatSpan, formatSeconds),
    rowOf('Swing, mean', differences.swings, step, step),
  ];
  return rows.filter((row) => row !== null);
}

function rowOf(
  label: string,
  figure: FigureDifference | null,
  formatMean: (value: number) => string,
  formatApart: (value: number) => string,
): WordedPair['rows'][number] | null {
  if (!figure) return null;
  const size = formatApart(Math.abs(figure.difference));
  // What rounds to nothing has no side.
  const sign = size === formatApart(0) ? '' : figure.difference < 0 ? '−' : '+';
  return {
    label,
    first: formatMean(figure.first.mean),
    second: formatMean(figure.second.mean),
    apart: `${sign}${size}, give or take ${formatApart(figure.within)}`,
  };
}

/** A difference of times; whole seconds, but a tenth where it is under ten. */
function formatSeconds(spanS: number): string {
  return `${spanS < 9.95 ? spanS.toFixed(1) : Math.round(spanS)}\u00a0s`;
}
