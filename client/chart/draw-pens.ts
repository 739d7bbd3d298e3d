import { isInView, xOf, type Frame } from './frame.ts';
import { horizontal, vertical, words, type Shape } from './shapes.ts';
import type { PenMark, Span } from './strip.ts';

const STEP_PX = 8;
const TICK_PX = 9;

/** The pen that steps up while heat is on. */
export function drawHeatPen(frame: Frame, heat: Span[], y: number): Shape[] {
  const { left, width } = frame.plot;
  const path = [left, y];
  for (const { fromS, toS } of heat) {
    if (toS <= frame.fromS || fromS >= frame.toS) continue;
    const on = xOf(frame, Math.max(fromS, frame.fromS));
    const off = xOf(frame, Math.min(toS, frame.toS));
    path.push(on, y, on, y - STEP_PX, off, y - STEP_PX, off, y);
  }
  path.push(left + width, y);
  return [
    drawBase(frame, y),
    ...drawPenName(frame, 'heat', y),
    { kind: 'line', path, ink: 'ink', widthPx: 1.75 },
  ];
}

/** The pen that ticks at each mark, with its word where there is room. */
export function drawMarkPen(frame: Frame, marks: PenMark[], y: number): Shape[] {
  const shown = marks
    .filter(({ timeS }) => isInView(frame, timeS))
    .sort((a, b) => a.timeS - b.timeS);
  const shapes: Shape[] = [drawBase(frame, y), ...drawPenName(frame, 'marks', y)];
  shown.forEach((mark, i) => {
    const x = xOf(frame, mark.timeS);
    const ink = mark.isStop ? 'stop' : 'ink';
    shapes.push({ kind: 'line', path: vertical(x, y - TICK_PX, y), ink, widthPx: 1.75 });
    const next = shown[i + 1];
    const room = (next ? xOf(frame, next.timeS) : frame.plot.left + frame.plot.width + 60) - x;
    if (!frame.compact && room > mark.word.length * 6 + 10) {
      shapes.push(words(mark.word, { x: x + 4, y: y - 2 }, { sizePx: 12, ink }));
    }
  });
  return shapes;
}

function drawBase({ plot }: Frame, y: number): Shape {
  const path = horizontal(plot.left, plot.left + plot.width, y);
  return { kind: 'line', path, ink: 'grid-major', widthPx: 1 };
}

function drawPenName(frame: Frame, name: string, y: number): Shape[] {
  if (frame.compact) return [];
  const at = { x: frame.plot.left - 16, y: y + 1 };
  return [words(name, at, { sizePx: 12, stretch: 'semi-expanded', align: 'right' })];
}
