import { scaleValues, timesInView, xOf, yOf, type Box, type Frame } from './frame.ts';
import type { GridSteps } from './grid-steps.ts';
import { hatching, horizontal, vertical, words, type Ink, type Shape } from './shapes.ts';
import type { Bands, HotSpan } from './strip.ts';

/** Paper, then the stripes, then the ruling over them, so that the rules stay readable on the stripes. */
export function drawPaper(frame: Frame, bands: Bands | null, steps: GridSteps): Shape[] {
  return [
    { kind: 'bar', box: frame.sheet, ink: 'strip' },
    ...(bands ? drawBands(frame, bands) : []),
    ...drawGrid(frame, steps),
    ...(bands ? [drawBandEdges(frame, bands)] : []),
  ];
}

function drawBands(frame: Frame, bands: Bands): Shape[] {
  const { plot } = frame;
  return stripes(bands).flatMap(({ lowC, highC, ink }) => {
    const top = yOf(frame, Math.min(highC, frame.highC));
    const height = yOf(frame, Math.max(lowC, frame.lowC)) - top;
    return height > 0
      ? [{ kind: 'bar', box: { left: plot.left, width: plot.width, top, height }, ink } as const]
      : [];
  });
}

function stripes(bands: Bands): { lowC: number; highC: number; ink: Ink }[] {
  const { opensC, opensTolK, closesC, closesTolK } = bands;
  return [
    { lowC: opensC - opensTolK, highC: opensC + opensTolK, ink: 'band-opens' },
    { lowC: closesC - closesTolK, highC: closesC + closesTolK, ink: 'band-closes' },
  ];
}

function drawGrid(frame: Frame, steps: GridSteps): Shape[] {
  const rule = (ink: Ink, path: number[]): Shape => ({ kind: 'line', path, ink, widthPx: 1 });
  const { top, height, left, width } = frame.plot;
  const across = (tempC: number) => horizontal(left, left + width, yOf(frame, tempC));
  const down = (timeS: number) => vertical(xOf(frame, timeS), top, top + height);
  const ruled = (stepS: number, stepDeg: number) => [
    ...timesInView(frame, stepS).flatMap(down),
    ...scaleValues(frame, stepDeg).flatMap(({ tempC }) => across(tempC)),
  ];
  return [
    rule('grid-minor', ruled(steps.minorS, steps.minorDeg)),
    rule('grid-major', ruled(steps.majorS, steps.majorDeg)),
  ];
}

function drawBandEdges(frame: Frame, bands: Bands): Shape {
  const { left, width } = frame.plot;
  const edges = stripes(bands).flatMap(({ lowC, highC }) => [lowC, highC]);
  const path = edges
    .filter((tempC) => tempC > frame.lowC && tempC < frame.highC)
    .flatMap((tempC) => horizontal(left, left + width, yOf(frame, tempC)));
  return { kind: 'line', path, ink: 'band-edge', widthPx: 1 };
}

/** A stop that cannot be passed: a line with strokes behind it. */
export function drawWall(frame: Frame, highLimitC: number): Shape[] {
  const { plot, compact } = frame;
  const y = yOf(frame, highLimitC);
  if (y < plot.top || y > plot.top + plot.height) return [];
  const strokePx = compact ? 6 : 8;
  const behind: Box = { left: plot.left, width: plot.width, top: y - strokePx, height: strokePx };
  return [
    { kind: 'line', path: hatching(behind, strokePx), ink: 'stop', widthPx: 1.1, clip: plot },
    {
      kind: 'line',
      path: [plot.left, y, plot.left + plot.width, y],
      ink: 'stop',
      widthPx: 1.75,
    },
  ];
}

/** Heat that kept coming: hatched over the whole height and closed by two uprights. */
export function drawHotSpan(frame: Frame, span: HotSpan): Shape[] {
  const box = boxOfSpan(frame, span);
  if (!box) return [];
  const { top, height } = frame.plot;
  return [
    {
      kind: 'line',
      path: hatching(box, frame.compact ? 6 : 8),
      ink: 'stop',
      widthPx: 1,
      opacity: 0.55,
      clip: box,
    },
    {
      kind: 'line',
      path: [
        ...vertical(box.left, top, top + height),
        ...vertical(box.left + box.width, top, top + height),
      ],
      ink: 'stop',
      widthPx: 1,
    },
  ];
}

/** Its name near the foot; left out where it is wider than the span. */
export function nameHotSpan(frame: Frame, span: HotSpan): Shape[] {
  const box = boxOfSpan(frame, span);
  if (!box || frame.compact) return [];
  const longest = Math.max(...span.words.map((line) => line.length));
  if (longest * 7 > box.width) return [];
  const foot = frame.plot.top + frame.plot.height;
  return span.words.map((line, i) =>
    words(
      line,
      { x: box.left + box.width / 2, y: foot - 16 - 17 * (span.words.length - 1 - i) },
      { sizePx: 14, weight: 600, stretch: 'normal', align: 'center', ink: 'stop', haloPx: 7 },
    ),
  );
}

/** The paper that a span takes up; null where it is out of sight. */
export function boxOfSpan(frame: Frame, { fromS, toS }: HotSpan): Box | null {
  const left = xOf(frame, Math.max(fromS, frame.fromS));
  const width = xOf(frame, Math.min(toS, frame.toS)) - left;
  if (width <= 0) return null;
  return { left, width, top: frame.plot.top, height: frame.plot.height };
}
