import { isInView, xOf, yOf, type Frame } from './frame.ts';
import {
  columnsInView,
  indexAtOrAfter,
  isGapBetween,
  reachOf,
  type Columns,
  type Pyramid,
} from './pyramid.ts';
import { PEN_UP, type Shape } from './shapes.ts';
import type { HotSpan, Span, Strip } from './strip.ts';
import type { Obstacles, TraceReach } from './draw-notes.ts';
import { boxOfSpan } from './draw-paper.ts';

/** Readings closer than this are drawn by what their column reaches. */
const READINGS_PER_COLUMN = 2;
/** Readings further apart than this are dotted, as hand readings are. */
const DOT_APART_PX = 9;

/**
 * The trace in view as x, y pairs with NaN pairs where the pen lifts. Few readings: each of them. Many: for every
 * pixel column its first, lowest, highest and last, which draws what all of them would.
 */
export function tracePath(pyramid: Pyramid, frame: Frame, columnCount: number): number[] {
  const { first, past } = readingsInView(pyramid, frame);
  if (past - first <= columnCount * READINGS_PER_COLUMN) {
    return pathOfReadings(pyramid, frame, first, past);
  }
  const columns = columnsInView(pyramid, frame.fromS, frame.toS, columnCount);
  return pathOfColumns(pyramid, frame, columns);
}

/** Those in view, with one neighbour at each side so that the line runs off the paper. */
function readingsInView({ timesS }: Pyramid, frame: Span): { first: number; past: number } {
  return {
    first: Math.max(0, indexAtOrAfter(timesS, frame.fromS) - 1),
    past: Math.min(timesS.length, indexAtOrAfter(timesS, frame.toS) + 1),
  };
}

function pathOfReadings(pyramid: Pyramid, frame: Frame, first: number, past: number): number[] {
  const { timesS, tempsC, gaps } = pyramid;
  const path: number[] = [];
  for (let i = first; i < past; i++) {
    if (i > first && isGapBetween(gaps, timesS[i - 1]!, timesS[i]!)) path.push(...PEN_UP);
    path.push(xOf(frame, timesS[i]!), yOf(frame, tempsC[i]!));
  }
  return path;
}

function pathOfColumns(pyramid: Pyramid, frame: Frame, columns: Columns): number[] {
  const { timesS, tempsC, gaps } = pyramid;
  const path: number[] = [];
  const columnPx = frame.plot.width / columns.first.length;
  let lastS: number | null = null;
  for (let c = 0; c < columns.first.length; c++) {
    const first = columns.first[c]!;
    const last = columns.past[c]! - 1;
    if (last < first) continue;
    if (lastS !== null && isGapBetween(gaps, lastS, timesS[first]!)) path.push(...PEN_UP);
    const x = frame.plot.left + (c + 0.5) * columnPx;
    path.push(x, yOf(frame, tempsC[first]!));
    if (last > first) {
      path.push(x, yOf(frame, columns.lowC[c]!), x, yOf(frame, columns.highC[c]!));
      path.push(x, yOf(frame, tempsC[last]!));
    }
    lastS = timesS[last]!;
  }
  return path;
}

/** The same trace within a hatched span, pressed harder and in red. */
export function drawHotTrace(
  pyramid: Pyramid,
  frame: Frame,
  span: HotSpan,
  columns: number,
): Shape[] {
  const fromS = Math.max(span.fromS, frame.fromS);
  const toS = Math.min(span.toS, frame.toS);
  if (!span.traceIsHot || toS <= fromS) return [];
  const left = xOf(frame, fromS);
  const width = xOf(frame, toS) - left;
  const part: Frame = { ...frame, fromS, toS, plot: { ...frame.plot, left, width } };
  const share = Math.max(2, Math.round((columns * width) / frame.plot.width));
  const path = tracePath(pyramid, part, share);
  const clip = { ...part.plot, top: frame.plot.top - 2, height: frame.plot.height + 4 };
  return [{ kind: 'line', path, ink: 'stop', widthPx: 3.25, round: true, clip }];
}

/** Dots on readings that stand well apart. */
export function drawReadingDots(pyramid: Pyramid, frame: Frame): Shape[] {
  const { first, past } = readingsInView(pyramid, frame);
  if ((past - first) * DOT_APART_PX > frame.plot.width) return [];
  const dots: Shape[] = [];
  for (let i = first; i < past; i++) {
    const timeS = pyramid.timesS[i]!;
    if (!isInView(frame, timeS)) continue;
    const x = xOf(frame, timeS);
    const y = yOf(frame, pyramid.tempsC[i]!);
    dots.push({ kind: 'disc', x, y, r: 2.1, fill: 'ink', rim: null, rimPx: 0 });
  }
  return dots;
}

/** What the trace reaches between two x, in pixels: where notes may not stand. */
export function traceReach(pyramid: Pyramid, frame: Frame): TraceReach {
  const pxPerS = frame.plot.width / (frame.toS - frame.fromS);
  const index = (x: number) =>
    indexAtOrAfter(pyramid.timesS, frame.fromS + (x - frame.plot.left) / pxPerS);
  return (fromX, toX) => {
    const reach = reachOf(pyramid, index(fromX), index(toX));
    return reach && { top: yOf(frame, reach.highC), foot: yOf(frame, reach.lowC) };
  };
}

/** What notes keep clear of. */
export function obstaclesOn(frame: Frame, strip: Strip, pyramid: Pyramid): Obstacles {
  const { left, width } = frame.plot;
  const walls = strip.bands
    ? [{ left, width, top: yOf(frame, strip.bands.highLimitC) - 8, height: 9 }]
    : [];
  const spans = strip.hotSpans.flatMap((span) => boxOfSpan(frame, span) ?? []);
  return { reach: traceReach(pyramid, frame), hatched: [...walls, ...spans] };
}
