import { expect, test } from 'vitest';
import { paintShapes, tracePen, type Brush } from '#client/chart/paint-shapes.ts';
import { INKS, words, type Ink, type Shape } from '#client/chart/shapes.ts';
import { pathOf } from '#client/chart/svg-shapes.tsx';

const colours = Object.fromEntries(INKS.map((ink) => [ink, `the ${ink}`])) as Record<Ink, string>;

/** A brush that writes down what it is told. */
function recorder() {
  const strokes: string[] = [];
  const say =
    (name: string) =>
    (...told: unknown[]) =>
      void strokes.push([name, ...told].join(' '));
  const brush: Brush = {
    ...{ fillStyle: '', strokeStyle: '', lineWidth: 1, lineJoin: 'miter', lineCap: 'butt' },
    ...{ globalAlpha: 1, font: '', textAlign: 'left', fontStretch: 'normal' },
    save: say('save'),
    restore: say('restore'),
    beginPath: say('begin'),
    moveTo: say('move'),
    lineTo: say('line'),
    rect: say('rect'),
    arc: say('arc'),
    clip: say('clip'),
    fill: () => void strokes.push(`fill with ${String(brush.fillStyle)}`),
    stroke: () => void strokes.push(`stroke ${brush.lineWidth} with ${String(brush.strokeStyle)}`),
    fillRect: say('bar'),
    fillText: (text) => void strokes.push(`write ${text} with ${String(brush.fillStyle)}`),
    strokeText: (text) => void strokes.push(`halo ${text} with ${String(brush.strokeStyle)}`),
  };
  return { brush, strokes };
}

function painted(shape: Shape): string[] {
  const { brush, strokes } = recorder();
  paintShapes(brush, [shape], { colours });
  return strokes;
}

test('a line is clipped, stroked in its ink, and leaves the brush as it was', () => {
  const clip = { left: 1, top: 2, width: 3, height: 4 };

  expect(painted({ kind: 'line', path: [0, 1, 2, 3], ink: 'stop', widthPx: 1.75, clip })).toEqual([
    'save',
    'begin',
    'rect 1 2 3 4',
    'clip',
    'begin',
    'move 0 1',
    'line 2 3',
    'stroke 1.75 with the stop',
    'restore',
  ]);
});

test('words are written over their own halo of paper', () => {
  expect(painted(words('154.5', { x: 1, y: 2 }, { ink: 'ink', haloPx: 4 }))).toEqual([
    'halo 154.5 with the strip',
    'write 154.5 with the ink',
  ]);
});

test('a pair of NaN lifts the pen, on canvas and in SVG alike', () => {
  const path = [0, 0, 1, 1, NaN, NaN, 5, 5, 6, 6];
  const pen: string[] = [];

  tracePen({ moveTo: (x) => pen.push(`M${x}`), lineTo: (x) => pen.push(`L${x}`) }, path);

  expect(pen).toEqual(['M0', 'L1', 'M5', 'L6']);
  expect(pathOf(path)).toBe('M0 0L1 1M5 5L6 6');
});
