import { expect, test } from 'vitest';
import { drawLive } from '#client/chart/draw-live.ts';
import { liveFrame, liveSheet } from '#client/chart/live-frame.ts';
import { xOf } from '#client/chart/frame.ts';
import type { PenMark } from '#client/chart/strip.ts';

const timesS = Float64Array.from({ length: 30 }, (_, i) => i * 10);
const tempsC = timesS.map((timeS) => 25 + timeS / 8);
const sheet = liveSheet(390, 260);
const frame = liveFrame(sheet, 290, { lowC: 25, highC: 62 }, null, 'F');

function drawn(marks: PenMark[]) {
  const strip = { timesS, tempsC, marks, wallAtS: null };
  const plain = { bands: null, points: [], hotSpans: [], gaps: [] };
  const shapes = drawLive(frame, { ...plain, ...strip }, false);
  const ticks = shapes.flatMap((shape) =>
    shape.kind === 'line' && shape.widthPx === 2.25
      ? [{ ink: shape.ink, x: shape.path[0] ?? NaN }]
      : [],
  );
  const said = shapes.flatMap((shape) => (shape.kind === 'words' ? [shape.text] : []));
  return { ticks, said };
}

test('what was marked ticks at its moment, with its word, and what stops in the ink of stop', () => {
  const { ticks, said } = drawn([
    { timeS: 120, word: 'click', isStop: false },
    { timeS: 250, word: 'cut the heat', isStop: true },
  ]);

  expect(ticks.map(({ ink }) => ink)).toEqual(['ink', 'stop']);
  expect(ticks[0]?.x).toBeCloseTo(xOf(frame, 120), 0);
  expect(said).toEqual(expect.arrayContaining(['click', 'cut the heat']));
});

test('a mark off the paper is not drawn, and words that would meet give way to the tick', () => {
  const { ticks, said } = drawn([
    { timeS: -40, word: 'door', isStop: false },
    { timeS: 100, word: 'heat off', isStop: false },
    { timeS: 104, word: 'click', isStop: false },
  ]);

  expect(ticks).toHaveLength(2);
  expect(said).not.toContain('heat off');
  expect(said).toContain('click');
});
