import type { DisplayUnit } from '#shared/units.ts';
import type { Frame } from './frame.ts';

/** How the paper is ruled: steps in seconds and in the frame's own degrees. */
export type GridSteps = {
  minorS: number;
  majorS: number;
  labelS: number;
  holeS: number;
  minorDeg: number;
  majorDeg: number;
  labelDeg: number;
};

const MINUTE = 60;
const HOUR = 3600;

/** Minor and major rules of time, finest first. */
const TIME_RULES: readonly (readonly [number, number])[] = [
  [1, 10],
  [2, 10],
  [5, 30],
  [10, MINUTE],
  [30, MINUTE],
  [MINUTE, 5 * MINUTE],
  [5 * MINUTE, 30 * MINUTE],
  [10 * MINUTE, HOUR],
  [30 * MINUTE, 2 * HOUR],
  [HOUR, 6 * HOUR],
  [6 * HOUR, 24 * HOUR],
];
const TIME_LABELS = [
  1,
  2,
  5,
  10,
  30,
  MINUTE,
  2 * MINUTE,
  5 * MINUTE,
  10 * MINUTE,
  15 * MINUTE,
  30 * MINUTE,
  HOUR,
  2 * HOUR,
  6 * HOUR,
  12 * HOUR,
  24 * HOUR,
];
const HOLES = [MINUTE, 5 * MINUTE, 10 * MINUTE, 30 * MINUTE, HOUR, 6 * HOUR, 24 * HOUR];

const DEGREE_RULES: Record<DisplayUnit, readonly (readonly [number, number])[]> = {
  F: [
    [2, 10],
    [5, 10],
    [10, 50],
  ],
  C: [
    [1, 5],
    [2, 10],
    [5, 10],
    [10, 50],
  ],
};
const DEGREE_LABELS = [5, 10, 20, 50, 100];

/** Minor lines never fall closer than this. */
const MINOR_APART_PX = 4;
/** Rules finer than the paper's own ten seconds come only where they stand this far apart. */
const FINE_APART_PX = 8;
const PAPER_S = 10;
const HOLE_APART_PX = 8;
const FIGURE_HEIGHT_PX = 16;
/** A phone's scale has half as many figures. */
const COMPACT_FIGURE_HEIGHT_PX = 24;

export function chooseGridSteps(frame: Frame): GridSteps {
  const pxPerS = frame.plot.width / (frame.toS - frame.fromS);
  const degreesPerK = frame.unit === 'F' ? 1.8 : 1;
  const pxPerDeg = frame.plot.height / ((frame.highC - frame.lowC) * degreesPerK);
  const figurePx = frame.compact ? COMPACT_FIGURE_HEIGHT_PX : FIGURE_HEIGHT_PX;
  const [minorS, majorS] = firstRule(timeRulesAt(pxPerS), pxPerS);
  const [minorDeg, majorDeg] = firstRule(DEGREE_RULES[frame.unit], pxPerDeg);
  return {
    minorS,
    majorS,
    labelS: firstWide(TIME_LABELS, (stepS) => stepS * pxPerS >= figureWidthPx(stepS)),
    holeS: firstWide(HOLES, (stepS) => stepS * pxPerS >= HOLE_APART_PX),
    minorDeg,
    majorDeg,
    labelDeg: firstWide(DEGREE_LABELS, (step) => step * pxPerDeg >= figurePx),
  };
}

/** Steps under a minute are written m:ss, which takes more room. */
function figureWidthPx(stepS: number): number {
  return stepS < MINUTE ? 76 : 28;
}

function timeRulesAt(pxPerS: number): readonly (readonly [number, number])[] {
  return TIME_RULES.filter(([minorS]) => minorS >= PAPER_S || minorS * pxPerS >= FINE_APART_PX);
}

function firstRule(
  rules: readonly (readonly [number, number])[],
  pxPerStep: number,
): readonly [number, number] {
  const coarsest: readonly [number, number] = rules.at(-1) ?? [1, 10];
  return rules.find(([minor]) => minor * pxPerStep >= MINOR_APART_PX) ?? coarsest;
}

function firstWide(steps: readonly number[], isWide: (step: number) => boolean): number {
  return steps.find(isWide) ?? steps.at(-1) ?? 1;
}
