import fc from 'fast-check';
import { expect, test } from 'vitest';
import { foldColumns } from '#server/runs/fold-columns.ts';

const record = fc
  .array(fc.tuple(fc.integer({ min: 1, max: 50 }), fc.integer({ min: -20, max: 200 })), {
    minLength: 1,
    maxLength: 300,
  })
  .map((steps) => {
    let timeS = 0;
    const timesS = steps.map(([stepS], i) => (timeS += i === 0 ? 0 : stepS));
    return { timesS: Float64Array.from(timesS), temps: Float64Array.from(steps, ([, t]) => t) };
  });

function fold(most: number, timesS: Float64Array, temps: Float64Array, cut = 0) {
  const folder = foldColumns(most, { samples: timesS.length, durationS: timesS.at(-1) ?? 0 });
  folder.add(timesS.subarray(0, cut), temps.subarray(0, cut));
  folder.add(timesS.subarray(cut), temps.subarray(cut));
  return folder.columns();
}

test('each column tells the lowest and highest of exactly the readings it stands for', () => {
  fc.assert(
    fc.property(record, fc.integer({ min: 1, max: 40 }), ({ timesS, temps }, most) => {
      const columns = fold(most, timesS, temps);

      expect(columns.length).toBeLessThanOrEqual(most);
      for (const [k, [fromS, lowest, highest]] of columns.entries()) {
        const toS = columns[k + 1]?.[0] ?? Infinity;
        const within = [...temps].filter((_, i) => timesS[i]! >= fromS && timesS[i]! < toS);
        expect([lowest, highest]).toEqual([Math.min(...within), Math.max(...within)]);
      }
      expect(columns[0]?.[0]).toBe(0);
    }),
  );
});

test('it makes no difference in how many pieces the readings come', () => {
  fc.assert(
    fc.property(record, fc.nat(300), ({ timesS, temps }, cut) => {
      expect(fold(7, timesS, temps, cut)).toEqual(fold(7, timesS, temps));
    }),
  );
});

test('a stretch without readings has no column', () => {
  const timesS = Float64Array.of(0, 1, 2, 3, 100);
  const temps = Float64Array.of(20, Number.NaN, 21, 22, 30);

  expect(fold(4, timesS, temps)).toEqual([
    [0, 20, 22],
    [100, 30, 30],
  ]);
});

test('a run of few readings keeps one column each, however unevenly they lie', () => {
  const timesS = Float64Array.of(0, 1, 2, 100);
  const temps = Float64Array.of(20, 25, 21, 30);

  expect(fold(4, timesS, temps)).toEqual([
    [0, 20, 20],
    [1, 25, 25],
    [2, 21, 21],
    [100, 30, 30],
  ]);
});
