import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { pyramidOfColumns } from '#client/chart/pyramid-of-columns.ts';
import {
  buildPyramid,
  columnsInView,
  columnStart,
  indexAtOrAfter,
  isGapBetween,
  nearestReading,
  reachOf,
} from '#client/chart/pyramid.ts';

/** Readings at uneven steps, with plateaus and single wild values among them. */
const readings = fc
  .array(
    fc.record({
      stepS: fc.double({ min: 0.01, max: 30, noNaN: true }),
      tempC: fc.oneof(
        fc.double({ min: -40, max: 150, noNaN: true }),
        fc.constantFrom(20, 85, 127, -0.1),
      ),
    }),
    { minLength: 1, maxLength: 700 },
  )
  .map((steps) => {
    let timeS = 0;
    const timesS = steps.map(({ stepS }, i) => (i === 0 ? 0 : (timeS += stepS)));
    return {
      timesS: Float64Array.from(timesS),
      tempsC: Float64Array.from(steps, ({ tempC }) => tempC),
    };
  });

/** Reads every reading of the window: what the pyramid has to agree with. */
function bruteColumns(
  { timesS, tempsC }: { timesS: Float64Array; tempsC: Float64Array },
  fromS: number,
  toS: number,
  columns: number,
) {
  return Array.from({ length: columns }, (_, c) => {
    const startS = columnStart(fromS, toS, columns, c);
    const endS = columnStart(fromS, toS, columns, c + 1);
    const isLast = c === columns - 1;
    const inside = [...tempsC].filter((_, i) => {
      const timeS = timesS[i]!;
      return timeS >= startS && (isLast ? timeS <= toS : timeS < endS) && timeS <= toS;
    });
    return inside.length === 0
      ? { low: NaN, high: NaN, count: 0 }
      : { low: Math.min(...inside), high: Math.max(...inside), count: inside.length };
  });
}

describe('the pyramid', () => {
  test('every column of any window reaches exactly what its readings reach', () => {
    fc.assert(
      fc.property(
        readings,
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.integer({ min: 1, max: 160 }),
        (series, a, b, columns) => {
          const durationS = series.timesS.at(-1)!;
          const fromS = Math.min(a, b) * durationS;
          const toS = Math.max(a, b) * durationS + 0.001;

          const shown = columnsInView(
            buildPyramid(series.timesS, series.tempsC, []),
            fromS,
            toS,
            columns,
          );

          const told = bruteColumns(series, fromS, toS, columns);
          expect([...shown.lowC]).toEqual(told.map(({ low }) => low));
          expect([...shown.highC]).toEqual(told.map(({ high }) => high));
          expect([...shown.past].map((past, c) => past - shown.first[c]!)).toEqual(
            told.map(({ count }) => count),
          );
        },
      ),
      { numRuns: 500 },
    );
  });

  test('any range of readings reaches exactly what it holds', () => {
    fc.assert(
      fc.property(readings, fc.nat(700), fc.nat(700), ({ timesS, tempsC }, a, b) => {
        const first = Math.min(a, b, tempsC.length);
        const past = Math.min(Math.max(a, b), tempsC.length);

        const reach = reachOf(buildPyramid(timesS, tempsC, []), first, past);

        const part = [...tempsC.subarray(first, past)];
        expect(reach).toEqual(
          part.length === 0 ? null : { lowC: Math.min(...part), highC: Math.max(...part) },
        );
      }),
      { numRuns: 500 },
    );
  });

  test('one wild reading among a million stands in the column that holds it', () => {
    const timesS = Float64Array.from({ length: 1_000_000 }, (_, i) => i);
    const tempsC = new Float64Array(1_000_000).fill(60);
    tempsC[654_321] = 91.4;

    const { highC } = columnsInView(buildPyramid(timesS, tempsC, []), 0, 999_999, 1000);

    expect(Math.max(...highC)).toBe(91.4);
    expect(highC.indexOf(91.4)).toBe(654);
  });

  test('times and temperatures of different number are refused', () => {
    expect(() => buildPyramid(new Float64Array(3), new Float64Array(2), [])).toThrow(RangeError);
  });
});

describe('finding readings', () => {
  const timesS = Float64Array.from([0, 10, 20, 40]);

  test('the first reading at or after a time is found', () => {
    expect([-1, 0, 0.1, 20, 20.1, 41].map((timeS) => indexAtOrAfter(timesS, timeS))).toEqual([
      0, 0, 1, 2, 3, 4,
    ]);
  });

  test('the nearest reading is found on either side and beyond the ends', () => {
    const pyramid = buildPyramid(timesS, new Float64Array(4), []);

    expect([-5, 4, 6, 29, 31, 99].map((timeS) => nearestReading(pyramid, timeS))).toEqual([
      0, 0, 1, 2, 3, 3,
    ]);
  });

  test('a gap lies between its two readings and between no others', () => {
    const gaps = [
      { fromS: 20, toS: 40 },
      { fromS: 90, toS: 95 },
    ];

    expect(isGapBetween(gaps, 10, 20)).toBe(false);
    expect(isGapBetween(gaps, 20, 40)).toBe(true);
    expect(isGapBetween(gaps, 40, 41)).toBe(false);
    expect(isGapBetween(gaps, 89, 90)).toBe(false);
    expect(isGapBetween(gaps, 90, 95)).toBe(true);
  });
});

test('columns told by a server keep their lowest and their highest', () => {
  const pyramid = pyramidOfColumns(
    [
      [0, 20, 21],
      [10, 30, 30],
      [20, 25, 41],
    ],
    [],
  );

  expect(reachOf(pyramid, 0, pyramid.tempsC.length)).toEqual({ lowC: 20, highC: 41 });
  expect([...pyramid.timesS]).toEqual([0, 0, 10, 20, 20]);
});
