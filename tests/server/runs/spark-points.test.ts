import { expect, test } from 'vitest';
import { sparkPoints } from '#server/runs/spark-points.ts';

test('a short run is drawn as it is', () => {
  expect(sparkPoints(Float64Array.of(0, 10), Float64Array.of(20, 21.5))).toEqual([
    [0, 20],
    [10, 21.5],
  ]);
});

test('a long run keeps its one wild reading in at most 66 points, in order of time', () => {
  const timesS = Float64Array.from({ length: 100_000 }, (_, i) => i);
  const tempsC = Float64Array.from(timesS, (i) => (i === 54_321 ? 90.5 : 60 + (i % 7) / 10));

  const points = sparkPoints(timesS, tempsC);

  expect(points.length).toBeLessThanOrEqual(66);
  expect(points).toContainEqual([54_321, 90.5]);
  expect(points.map(([timeS]) => timeS)).toEqual(
    points.map(([timeS]) => timeS).sort((a, b) => a - b),
  );
});
