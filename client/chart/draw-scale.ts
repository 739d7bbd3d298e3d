import { fromCelsius, fromKelvinStep } from '#shared/units.ts';
import { formatMoment } from '#shared/wording/format.ts';

import { scaleValues, timesInView, xOf, yOf, type Frame } from './frame.ts';
import type { GridSteps } from './grid-steps.ts';
import { horizontal, PEN_UP, words, type Shape } from './shapes.ts';
import type { Bands } from './strip.ts';

/** The engraved scale at one side: a tick each minor step, a longer one with its figure each labelled step. */
export function drawScale(frame: Frame, steps: GridSteps, side: 'left' | 'right'): Shape[] {
  const { plot } = frame;
  const edge = side === 'left' ? plot.left : plot.left + plot.width;
  const out = side === 'left' ? -1 : 1;
  const ticks: number[] = [];
  const figures: Shape[] = [];
  for (const { value, tempC } of scaleValues(frame, steps.minorDeg)) {
    const y = yOf(frame, tempC);
    const isLabelled = isMultiple(value, steps.labelDeg);
    ticks.push(edge + out * 3, y, edge + out * (isLabelled ? 12 : 7), y, ...PEN_UP);
    if (!isLabelled || y < plot.top + 5 || y > plot.top + plot.height - 2) continue;
    const align = side === 'left' ? 'right' : 'left';
    figures.push(words(String(value), { x: edge + out * 16, y: y + 4.2 }, { align }));
  }
  return [{ kind: 'line', path: ticks, ink: 'print', widthPx: 1 }, ...figures];
}

/** The head and foot of the ruled paper. */
export function drawEdges({ plot }: Frame): Shape {
  const right = plot.left + plot.width;
  const path = [
    ...horizontal(plot.left, right, plot.top),
    ...horizontal(plot.left, right, plot.top + plot.height),
  ];
  return { kind: 'line', path, ink: 'print', widthPx: 1 };
}

/** Brackets at the right that name the stripes and the wall. */
export function drawBrackets(frame: Frame, bands: Bands): Shape[] {
  const x = frame.plot.left + frame.plot.width + (frame.compact ? 4 : 44);
  const textX = x + (frame.compact ? 9 : 13);
  const { opensC, opensTolK, closesC, closesTolK, highLimitC } = bands;
  return [
    ...drawBracket(frame, { x, textX, midC: opensC, tolK: opensTolK, name: 'opens' }),
    ...drawBracket(frame, { x, textX, midC: closesC, tolK: closesTolK, name: 'closes' }),
    ...drawLimitName(frame, textX, highLimitC),
  ];
}

type Bracket = { x: number; textX: number; midC: number; tolK: number; name: string };

function drawBracket(frame: Frame, { x, textX, midC, tolK, name }: Bracket): Shape[] {
  const top = yOf(frame, midC + tolK);
  const foot = yOf(frame, midC - tolK);
  const middle = (top + foot) / 2;
  if (middle < frame.plot.top || middle > frame.plot.top + frame.plot.height) return [];
  const mid = plain(fromCelsius(midC, frame.unit));
  const tol = plain(fromKelvinStep(tolK, frame.unit));
  return [
    { kind: 'line', path: [x, top, x + 6, top, x + 6, foot, x, foot], ink: 'print', widthPx: 1 },
    words(name, { x: textX, y: middle - 2 }, { weight: 600, stretch: 'normal' }),
    words(`${mid} ± ${tol}`, { x: textX, y: middle + 13 }),
  ];
}

function drawLimitName(frame: Frame, x: number, highLimitC: number): Shape[] {
  const y = yOf(frame, highLimitC);
  if (y < frame.plot.top || y > frame.plot.top + frame.plot.height) return [];
  const name = frame.compact ? 'limit' : 'high limit';
  return [
    words(name, { x, y: y - 3 }, { weight: 600, stretch: 'normal', ink: 'stop' }),
    words(plain(fromCelsius(highLimitC, frame.unit)), { x, y: y + 12 }, { ink: 'stop' }),
  ];
}

/** Minute figures under the paper. Under a minute a step they are written m:ss. */
export function drawMinutes(frame: Frame, steps: GridSteps): Shape[] {
  const y = frame.plot.top + frame.plot.height + 15;
  const figures = timesInView(frame, steps.labelS).map((timeS) =>
    words(minuteFigure(timeS, steps.labelS), { x: xOf(frame, timeS), y }, { align: 'center' }),
  );
  if (frame.compact) return figures;
  const name = words(
    'min',
    { x: frame.plot.left - 16, y },
    { sizePx: 12, stretch: 'semi-expanded', align: 'right' },
  );
  return [...figures, name];
}

function minuteFigure(timeS: number, stepS: number): string {
  return stepS < 60 ? formatMoment(timeS) : String(Math.round(timeS / 60));
}

/** Feed holes: one a minute (or the next round step where they would touch), on both edges of a desk's paper. */
export function drawHoles(frame: Frame, steps: GridSteps, footY: number): Shape[] {
  const r = frame.compact ? 2.6 : 3.4;
  const rows = frame.compact ? [footY] : [frame.plot.top - 11, footY];
  return timesInView(frame, steps.holeS).flatMap((timeS) =>
    rows.map((y): Shape => ({
      kind: 'disc',
      x: xOf(frame, timeS),
      y,
      r,
      fill: 'paper',
      rim: 'grid-major',
      rimPx: 1,
    })),
  );
}

function isMultiple(value: number, step: number): boolean {
  return Math.abs(value / step - Math.round(value / step)) < 1e-6;
}

/** 155, not 155.00; 68.3 where the unit makes it so. */
function plain(value: number): string {
  const rounded = Math.round(value * 10) / 10;
  return Number.isInteger(rounded) ? String(rounded) : rounded.toFixed(1);
}
