import { formatBand, formatRated } from '#shared/wording/format.ts';
import { drawMarks } from './draw-marks.ts';
import { drawHotSpan, drawPaper, drawWall } from './draw-paper.ts';
import { drawEdges, drawHoles, drawMinutes, drawScale } from './draw-scale.ts';
import { isInView, xOf, yOf, type Frame } from './frame.ts';
import { chooseGridSteps } from './grid-steps.ts';
import { buildPyramid } from './pyramid.ts';
import { vertical, words, type Shape } from './shapes.ts';
import type { Bands, PenMark, Strip } from './strip.ts';
import { drawReadingDots, tracePath } from './trace-path.ts';

export type LiveStrip = Pick<Strip, 'bands' | 'points' | 'hotSpans' | 'gaps' | 'marks'> & {
  timesS: Float64Array;
  tempsC: Float64Array;
  /** When the exhaust reaches the wall if nothing changes; null where that is not drawn. */
  wallAtS: number | null;
};

/** The strip while it is being written: paper, wall, trace, marks; the pen itself is the page's. */
export function drawLive(frame: Frame, strip: LiveStrip, withHoles: boolean): Shape[] {
  const { bands, timesS, tempsC, hotSpans } = strip;
  const steps = chooseGridSteps(frame);
  const pyramid = buildPyramid(timesS, tempsC, strip.gaps);
  const trace = tracePath(pyramid, frame, Math.round(frame.plot.width));
  const clip = frame.plot;
  return [
    ...drawPaper(frame, bands, steps),
    ...(bands ? drawWall(frame, bands.highLimitC) : []),
    ...hotSpans.flatMap((span) => drawHotSpan(frame, span)),
    { kind: 'line', path: trace, ink: 'strip', widthPx: 5, opacity: 0.85, round: true, clip },
    { kind: 'line', path: trace, ink: 'ink', widthPx: 2, round: true, clip },
    ...drawReadingDots(pyramid, frame),
    ...drawForecast(frame, strip),
    drawEdges(frame),
    ...drawScale(frame, steps, 'right'),
    ...drawMinutes(frame, steps),
    ...(withHoles ? drawHoles(frame, steps, frame.sheet.height - 8) : []),
    ...drawHairline(frame, strip),
    ...(bands ? nameBands(frame, bands) : []),
    ...drawMarks(frame, strip.points),
    ...drawLiveMarks(frame, strip.marks),
  ];
}

const TICK_PX = 12;

/** Ticks at the foot of the plot, each with its word where there is room: the sheet has none for a pen of its own. */
function drawLiveMarks(frame: Frame, marks: PenMark[]): Shape[] {
  const foot = frame.plot.top + frame.plot.height;
  const shown = marks.filter(({ timeS }) => isInView(frame, timeS));
  return shown.flatMap((mark, i) => {
    const x = xOf(frame, mark.timeS);
    const ink = mark.isStop ? 'stop' : 'ink';
    const next = shown[i + 1];
    const right = next ? xOf(frame, next.timeS) : frame.plot.left + frame.plot.width;
    const tick: Shape = {
      ...{ kind: 'line', path: vertical(x, foot - TICK_PX, foot), ink, widthPx: 2.25 },
    };
    if (right - x < mark.word.length * 7 + 10) return [tick];
    const style = { sizePx: 13, weight: 600, ink, haloPx: 4 } as const;
    return [tick, words(mark.word, { x: x + 5, y: foot - 4 }, style)];
  });
}

/** From the pen to the scale; under the bands' names, which it would strike through. */
function drawHairline(frame: Frame, { timesS, tempsC }: LiveStrip): Shape[] {
  const lastS = timesS.at(-1);
  const lastC = tempsC.at(-1);
  if (lastS === undefined || lastC === undefined) return [];
  const y = yOf(frame, lastC);
  const path = [xOf(frame, lastS), y, frame.plot.left + frame.plot.width + 4, y];
  return [{ kind: 'line', path, ink: 'ink', widthPx: 1 }];
}

/** Dots to the wall, and a cross where they meet it. */
function drawForecast(frame: Frame, { bands, wallAtS, timesS, tempsC }: LiveStrip): Shape[] {
  const lastS = timesS.at(-1);
  const lastC = tempsC.at(-1);
  if (!bands || wallAtS === null) return [];
  if (lastS === undefined || lastC === undefined || wallAtS <= lastS) return [];
  const from = { x: xOf(frame, lastS), y: yOf(frame, lastC) };
  const to = { x: xOf(frame, wallAtS), y: yOf(frame, bands.highLimitC) };
  const lengthPx = Math.hypot(to.x - from.x, to.y - from.y);
  const dots = Math.min(60, Math.floor(lengthPx / 6));
  const right = frame.plot.left + frame.plot.width;
  const shapes: Shape[] = [];
  for (let i = 1; i < dots; i++) {
    const x = from.x + ((to.x - from.x) * i) / dots;
    if (x > right) break;
    const y = from.y + ((to.y - from.y) * i) / dots;
    shapes.push({ kind: 'disc', x, y, r: 1.1, fill: 'stop', rim: null, rimPx: 0 });
  }
  if (to.x > right) return shapes;
  return [...shapes, cross(to.x, to.y)];
}

function cross(x: number, y: number): Shape {
  const path = [x - 6, y - 6, x + 6, y + 6, NaN, NaN, x + 6, y - 6, x - 6, y + 6];
  return { kind: 'line', path, ink: 'stop', widthPx: 2 };
}

/** Stripes are named at the right, before the scale; the wall at the left, under it. */
function nameBands(frame: Frame, bands: Bands): Shape[] {
  const { plot, unit } = frame;
  const right = plot.left + plot.width - 8;
  const name = (text: string, tempC: number): Shape[] => {
    const y = yOf(frame, tempC) - 2;
    if (y < plot.top + 12 || y > plot.top + plot.height) return [];
    const style = { weight: 600, stretch: 'normal', align: 'right', haloPx: 4 } as const;
    return [words(text, { x: right, y }, style)];
  };
  const bare = (text: string) => text.replace(/\s*°.$/, '');
  return [
    ...name(
      `opens ${bare(formatBand(bands.opensC, bands.opensTolK, unit))}`,
      bands.opensC - bands.opensTolK,
    ),
    ...name(
      `closes ${bare(formatBand(bands.closesC, bands.closesTolK, unit))}`,
      bands.closesC - bands.closesTolK,
    ),
    words(
      `high limit ${bare(formatRated(bands.highLimitC, unit))}`,
      { x: plot.left + 8, y: yOf(frame, bands.highLimitC) + 14 },
      { weight: 600, stretch: 'normal', ink: 'stop', haloPx: 4 },
    ),
  ];
}
