import type { Call, Point } from '#shared/analysis/analysis.ts';
import { fromCelsius } from '#shared/units.ts';
import { isInView, xOf, yOf, type Frame } from './frame.ts';
import { PEN_UP, words, type Ink, type Shape } from './shapes.ts';

/** One glyph a call: solid disc, open ring, disc half open, struck ring; a point that is not judged is a small ring. */
export function drawCall(
  call: Call | null,
  kind: Point['kind'],
  at: { x: number; y: number; r: number },
): Shape[] {
  const { x, y, r } = at;
  const ring = (rim: Ink, radius = r): Shape => ({
    kind: 'disc',
    x,
    y,
    r: radius,
    fill: 'strip',
    rim,
    rimPx: 2,
  });
  switch (call) {
    case 'inside':
      return [{ kind: 'disc', x, y, r, fill: 'ink', rim: 'strip', rimPx: 1.5 }];
    case 'too-close':
      return [ring('ink')];
    case 'within-allowance':
      // The open half faces away from the band: up for a cut-out, down for a reset.
      return [
        ring('ink'),
        { kind: 'half-disc', x, y, r, side: kind === 'cut-out' ? 'lower' : 'upper', fill: 'ink' },
      ];
    case 'outside':
      return [ring('stop'), struck(x, y, r * 1.55)];
    case null:
      return [{ kind: 'disc', x, y, r: r * 0.6, fill: 'strip', rim: 'ink', rimPx: 1.5 }];
  }
}

function struck(x: number, y: number, reach: number): Shape {
  const path = [x - reach, y + reach, x + reach, y - reach];
  return { kind: 'line', path, ink: 'stop', widthPx: 2.25 };
}

/** Turning points in view with their uncertainty and, where there is room, their value. */
export function drawMarks(frame: Frame, points: Point[]): Shape[] {
  const shown = points
    .filter((point) => isInView(frame, point.timeS))
    .sort((a, b) => a.timeS - b.timeS);
  const values = frame.compact ? [] : drawValues(frame, shown);
  const r = markRadius(frame, shown);
  return [...shown.flatMap((point) => drawMark(frame, point, r)), ...values];
}

const LEAST_R = 2.4;

/** 6 px, on a phone 5.2; smaller where marks would stand on each other. */
function markRadius(frame: Frame, shown: Point[]): number {
  const xs = shown.map((point) => xOf(frame, point.timeS));
  const apart = xs.slice(1).map((x, i) => x - xs[i]!);
  const middle = apart.sort((a, b) => a - b)[Math.floor(apart.length / 2)] ?? Infinity;
  return Math.max(LEAST_R, Math.min(frame.compact ? 5.2 : 6, middle / 2.2));
}

function drawMark(frame: Frame, point: Point, r: number): Shape[] {
  const x = xOf(frame, point.timeS);
  const y = yOf(frame, point.tempC);
  return [...drawWhisker(frame, point, x, r), ...drawCall(point.call, point.kind, { x, y, r })];
}

/** Value ± U, where it reaches past the mark; else the close-up shows it. */
function drawWhisker(frame: Frame, point: Point, x: number, r: number): Shape[] {
  const top = yOf(frame, point.tempC + point.uTotalK);
  const foot = yOf(frame, point.tempC - point.uTotalK);
  if ((foot - top) / 2 <= r + 2) return [];
  const cap = 4.5;
  const path = [
    ...[x - cap, top, x + cap, top, ...PEN_UP],
    ...[x - cap, foot, x + cap, foot, ...PEN_UP],
    ...[x, top, x, foot],
  ];
  return [{ kind: 'line', path, ink: inkOfCall(point.call), widthPx: 1.1 }];
}

const VALUE_WIDTH_PX = 40;

/** Above a cut-out, below a reset. Where they would run into each other the outside ones are kept first. */
function drawValues(frame: Frame, points: Point[]): Shape[] {
  const placed: { x: number; kind: Point['kind'] }[] = [];
  const byUrgency = [...points].sort((a, b) => urgency(b) - urgency(a));
  return byUrgency.flatMap((point) => {
    const x = xOf(frame, point.timeS);
    const isCrowded = placed.some(
      (other) => other.kind === point.kind && Math.abs(other.x - x) < VALUE_WIDTH_PX,
    );
    if (isCrowded) return [];
    placed.push({ x, kind: point.kind });
    const y = yOf(frame, point.tempC) + (point.kind === 'cut-out' ? -14 : 25);
    const value = fromCelsius(point.tempC, frame.unit).toFixed(1);
    const ink = inkOfCall(point.call);
    return [words(value, { x, y }, { sizePx: 15, weight: 600, align: 'center', ink, haloPx: 4 })];
  });
}

function urgency(point: Point): number {
  if (point.call === 'outside') return 2;
  return point.judged ? 1 : 0;
}

function inkOfCall(call: Call | null): Ink {
  return call === 'outside' ? 'stop' : 'ink';
}
