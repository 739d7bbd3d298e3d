import fc from 'fast-check';
import { expect, test } from 'vitest';
import { traceColumns } from '#shared/reading/preview-trace.ts';

test('a short series is shown reading by reading', () => {
  const trace = traceColumns(Float64Array.of(0, 5, 12), Float64Array.of(70, 75, 71), 600);

  expect(trace).toEqual([
    [0, 70, 70],
    [5, 75, 75],
    [12, 71, 71],
  ]);
});

test('each column has its lowest and its highest reading, and begins at its first', () => {
  const timesS = Float64Array.from({ length: 9 }, (_, i) => i);
  const temps = Float64Array.of(10, 14, 12, 20, 26, 21, 30, 35, 31);

  expect(traceColumns(timesS, temps, 2)).toEqual([
    [0, 10, 20],
    [4, 21, 35],
  ]);
});

test('a pause leaves its columns out', () => {
  const timesS = Float64Array.of(0, 1, 2, 3, 97, 98, 99, 100);
  const temps = Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8);

  expect(traceColumns(timesS, temps, 4)).toEqual([
    [0, 1, 4],
    [97, 5, 8],
  ]);
});

test('no peak is lost, however few the columns', () => {
  const temps = fc.array(fc.double({ min: -50, max: 500, noNaN: true }), {
    minLength: 1,
    maxLength: 300,
  });
  fc.assert(
    fc.property(temps, fc.integer({ min: 1, max: 50 }), (list, columns) => {
      const timesS = Float64Array.from(list, (_, i) => i * 2);
      const trace = traceColumns(timesS, Float64Array.from(list), columns);

      expect(trace.length).toBeLessThanOrEqual(columns);
      expect(Math.max(...trace.map(([, , highest]) => highest))).toBe(Math.max(...list));
      expect(Math.min(...trace.map(([, lowest]) => lowest))).toBe(Math.min(...list));
    }),
    { seed: 20260504 },
  );
});
