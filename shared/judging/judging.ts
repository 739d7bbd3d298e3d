import type { AnalysisInput, ReferenceRun } from '../analysis/analysis.ts';
import type { Load, Probe, Rating } from '../analysis/rating.ts';
import { toKelvinStep } from '../units.ts';
import type { MarkKind } from '../analysis/series.ts';

/** Swing threshold of a turning point: 4 °F (common practice). */
const SWING_K = toKelvinStep(4, 'F');

/** A mark as it is stored and as it crosses the wire. */
export type JudgingMark = { timeS: number; kind: MarkKind; text?: string | undefined };

/** What an analysis needs beside the readings; plain values, so that it crosses to the worker. */
export type Judging = {
  rating: Rating | null;
  probe: Probe;
  /** Times in s of the whole record. */
  marks: JudgingMark[];
  load: Load | null;
  roomC: number | null;
  minCycles: number;
  /** A clean run of the machine; null where none is known. */
  reference: ReferenceRun | null;
};

/** The same, for the part of a record from `fromS` to `toS`, its times counted from `fromS`. */
export function judgingOfSpan(judging: Judging, fromS: number, toS: number): AnalysisInput {
  const marks = judging.marks
    .filter((mark) => mark.timeS >= fromS && mark.timeS <= toS)
    .map(({ kind, timeS }) => ({ kind, timeS: timeS - fromS }));
  return { ...judging, marks, swingK: SWING_K };
}
