import { describe, expect, test } from 'vitest';
import { buildPyramid } from '#client/chart/pyramid.ts';
import { xOf, yOf } from '#client/chart/frame.ts';
import { drawReadingDots, tracePath } from '#client/chart/trace-path.ts';
import { frameOf } from './frame-of.ts';

/** A path as lists of [x, y], one list a stroke. */
function strokesOf(path: number[]): [number, number][][] {
  const strokes: [number, number][][] = [[]];
  for (let i = 0; i < path.length; i += 2) {
    if (Number.isNaN(path[i])) strokes.push([]);
    else strokes.at(-1)!.push([path[i]!, path[i + 1]!]);
  }
  return strokes.filter((stroke) => stroke.length > 0);
}

function rampOf(count: number, gaps: { fromS: number; toS: number }[] = []) {
  const timesS = Float64Array.from({ length: count }, (_, i) => (i * 1080) / (count - 1));
  const tempsC = Float64Array.from(timesS, (timeS) => 20 + timeS / 20);
  return buildPyramid(timesS, tempsC, gaps);
}

describe('the trace', () => {
  test('goes through each reading where there are few', () => {
    const frame = frameOf();
    const pyramid = rampOf(10);

    const [stroke, ...others] = strokesOf(tracePath(pyramid, frame, 1206));

    expect(others).toEqual([]);
    expect(stroke).toEqual(
      [...pyramid.timesS].map((timeS, i) => [xOf(frame, timeS), yOf(frame, pyramid.tempsC[i]!)]),
    );
  });

  test('is not joined across a gap, with few readings or many', () => {
    const frame = frameOf();
    const fewTimes = [0, 100, 200, 600, 700];
    const few = buildPyramid(Float64Array.from(fewTimes), new Float64Array(5).fill(60), [
      { fromS: 200, toS: 600 },
    ]);
    const manyTimes = Array.from({ length: 50_000 }, (_, i) =>
      i < 25_000 ? i * 0.01 : 300 + i * 0.01,
    );
    const many = buildPyramid(Float64Array.from(manyTimes), new Float64Array(50_000).fill(60), [
      { fromS: 249.99, toS: 550 },
    ]);

    const fewStrokes = strokesOf(tracePath(few, frame, 1206));
    const manyStrokes = strokesOf(tracePath(many, frame, 1206));

    expect(fewStrokes.map((stroke) => stroke.length)).toEqual([3, 2]);
    expect(manyStrokes).toHaveLength(2);
    expect(manyStrokes[0]!.at(-1)![0]).toBeLessThan(xOf(frame, 251));
    expect(manyStrokes[1]![0]![0]).toBeGreaterThan(xOf(frame, 549));
  });

  test('reaches every extreme of a dense record to the pixel', () => {
    const frame = frameOf();
    const count = 200_000;
    const timesS = Float64Array.from({ length: count }, (_, i) => (i * 1080) / (count - 1));
    const tempsC = Float64Array.from(timesS, () => 60);
    tempsC[123_456] = 95;
    tempsC[123_499] = 22;

    const ys = strokesOf(tracePath(buildPyramid(timesS, tempsC, []), frame, 1206))
      .flat()
      .map(([, y]) => y);

    expect(Math.min(...ys)).toBeCloseTo(yOf(frame, 95), 9);
    expect(Math.max(...ys)).toBeCloseTo(yOf(frame, 22), 9);
    expect(ys.length).toBeLessThanOrEqual(4 * 1206);
  });

  test('runs off the paper at both sides of a window', () => {
    const frame = frameOf({ fromS: 300, toS: 500 });

    const [stroke] = strokesOf(tracePath(rampOf(50), frame, 1206));

    expect(stroke![0]![0]).toBeLessThan(frame.plot.left);
    expect(stroke!.at(-1)![0]).toBeGreaterThan(frame.plot.left + frame.plot.width);
  });
});

test('readings taken by hand are dotted, a probe’s are not', () => {
  expect(drawReadingDots(rampOf(60), frameOf())).toHaveLength(60);
  expect(drawReadingDots(rampOf(1081), frameOf())).toEqual([]);
});
