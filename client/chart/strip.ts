import type { Point } from '#shared/analysis/analysis.ts';

/** The stripes and the wall of a strip, in °C. */
export type Bands = {
  opensC: number;
  opensTolK: number;
  closesC: number;
  closesTolK: number;
  highLimitC: number;
};

/** A stretch hatched over its whole height, named near the foot. */
export type HotSpan = { fromS: number; toS: number; words: string[]; traceIsHot: boolean };

export type StripNote = { letter: string; timeS: number; tempC: number; text: string };

export type PenMark = { timeS: number; word: string; isStop: boolean };

export type Span = { fromS: number; toS: number };

/** All that is printed or written on a strip, beside the trace itself. */
export type Strip = {
  bands: Bands | null;
  points: Point[];
  hotSpans: HotSpan[];
  notes: StripNote[];
  /** Where heat was on, for the pen that steps. */
  heat: Span[];
  marks: PenMark[];
  /** Spans without readings: the trace is not joined across them. */
  gaps: Span[];
};

export const EMPTY_STRIP: Strip = {
  bands: null,
  points: [],
  hotSpans: [],
  notes: [],
  heat: [],
  marks: [],
  gaps: [],
};
