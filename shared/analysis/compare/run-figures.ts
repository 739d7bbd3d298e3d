import type { Analysis, Point } from '../analysis.ts';
import { compareMeans, sampleOf, type MeanDifference, type Sample } from '../statistics/welch.ts';

/** One figure of two runs, and how far the second is from the first. */
export type FigureDifference = { first: Sample; second: Sample } & MeanDifference;

/** What two runs of a machine are compared by; null where a run has fewer than two of it. */
export type RunDifferences = {
  /** Judged cut-outs, K apart (means in °C). */
  cutOuts: FigureDifference | null;
  /** Peak over the switch temperature, K. */
  overshoots: FigureDifference | null;
  /** Complete cycles, s and K. */
  onTimes: FigureDifference | null;
  offTimes: FigureDifference | null;
  swings: FigureDifference | null;
};

/**
 * The figures of one run beside those of another, second less first, each by Welch's t.
 *
 * Assumes that the cycles of a run are independent of each other. With one probe in both, its accuracy moves both alike
 * and drops out; with two it does not, and `probesErrorK` is added to the cut-outs' difference.
 *
 * @param probesErrorK standard error (k = 1) of one probe against the other, K; 0 for the same probe
 */
export function compareRuns(
  first: Analysis,
  second: Analysis,
  probesErrorK: number,
): RunDifferences {
  const of = (figure: (analysis: Analysis) => Figure, common = 0) =>
    compareFigure(figure(first), figure(second), common);
  return {
    cutOuts: of(cutOutFigure, probesErrorK),
    overshoots: of(overshootFigure),
    onTimes: of(({ cycles }) => ({ values: cycles.map(({ onS }) => onS) })),
    offTimes: of(({ cycles }) => ({ values: cycles.map(({ offS }) => offS) })),
    swings: of(({ cycles }) => ({ values: cycles.map(({ swingK }) => swingK) })),
  };
}

type Figure = { values: number[]; expanded?: number[] };

function compareFigure(first: Figure, second: Figure, common: number): FigureDifference | null {
  if (first.values.length < 2 || second.values.length < 2) return null;
  const samples = {
    first: sampleOf(first.values, first.expanded),
    second: sampleOf(second.values, second.expanded),
  };
  const compared = compareMeans(samples.first, samples.second, common);
  return compared && { ...samples, ...compared };
}

function cutOutFigure({ cutOuts }: Analysis): Figure {
  const judged = cutOuts.filter((point) => point.judged);
  return { values: judged.map(({ tempC }) => tempC), expanded: judged.map(({ uK }) => uK) };
}

function overshootFigure({ cutOuts }: Analysis): Figure {
  const seen = cutOuts.filter((point) => point.judged).flatMap((point) => overshootOf(point) ?? []);
  return { values: seen.map(({ overK }) => overK), expanded: seen.map(({ uK }) => uK) };
}

function overshootOf({ tempC, switchTempC, uK }: Point): { overK: number; uK: number } | null {
  return switchTempC === null ? null : { overK: tempC - switchTempC, uK };
}
