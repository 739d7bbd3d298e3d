import { describe, expect, test } from 'vitest';
import type { AnalysisInput } from '#shared/analysis/analysis.ts';
import { findCycles } from '#shared/analysis/find-cycles.ts';
import { findPoints } from '#shared/analysis/find-points.ts';
import { findRoom, isColdStart } from '#shared/analysis/find-room.ts';
import { isProbeTooSlow } from '#shared/analysis/is-probe-too-slow.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import type { Extreme, RunLeg, TurnedBy } from '#shared/analysis/run-facts.ts';
import { toCelsius } from '#shared/units.ts';

const INPUT: AnalysisInput = {
  rating: DEFAULT_RATING,
  probe: { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null },
  marks: [],
  load: null,
  roomC: null,
  minCycles: 3,
  swingK: 4 / 1.8,
  reference: null,
};

function extremesOf(points: [number, number, TurnedBy][]): Extreme[] {
  return points.map(([timeS, tempF, turnedBy], i) => ({
    kind: (points[i + 1] ?? points[i - 1]!)[1] < tempF ? 'peak' : 'valley',
    turnedBy,
    timeS,
    tempC: toCelsius(tempF, 'F'),
    uK: 0.3,
    index: timeS,
    switched: null,
  }));
}

const COLD = extremesOf([
  [0, 70, 'start'],
  [300, 158, 'machine'],
  [370, 129, 'machine'],
  [480, 155, 'machine'],
  [550, 130, 'machine'],
  [660, 155, 'machine'],
  [720, 133, 'end'],
]);

describe('which points are judged', () => {
  test('all but the first cut-out after a cold start', () => {
    const { cutOuts, resets } = findPoints(COLD, INPUT, true);

    expect(cutOuts.map(({ judged }) => judged)).toEqual([false, true, true]);
    expect(resets.map(({ judged }) => judged)).toEqual([true, true]);
    expect(cutOuts.map(({ call }) => call)).toEqual([null, 'inside', 'inside']);
  });

  test('the first one too where the record starts warm', () => {
    const warm = extremesOf([
      [0, 140, 'start'],
      [60, 155, 'machine'],
      [130, 130, 'machine'],
      [240, 155, 'machine'],
      [280, 140, 'end'],
    ]);

    expect(findPoints(warm, INPUT, true).cutOuts.map(({ judged }) => judged)).toEqual([true, true]);
  });

  test('a lone cut-out is', () => {
    const lone = findPoints(COLD.slice(0, 3), INPUT, true).cutOuts;

    expect(lone.map(({ judged, call }) => [judged, call])).toEqual([[true, 'inside']]);
  });

  test('with no rating, or a probe too slow, there are points but no calls', () => {
    for (const found of [
      findPoints(COLD, { ...INPUT, rating: null }, true),
      findPoints(COLD, INPUT, false),
    ]) {
      expect(found.cutOuts).toHaveLength(3);
      for (const { call, probability } of [...found.cutOuts, ...found.resets]) {
        expect([call, probability]).toEqual([null, null]);
      }
    }
  });
});

test('a cycle runs from cut-out to cut-out, and the first heat belongs to none', () => {
  const cycles = findCycles(COLD);

  expect(cycles.map(({ offS, onS }) => [offS, onS])).toEqual([
    [70, 110],
    [70, 110],
  ]);
  expect(cycles[0]!.swingK).toBeCloseTo(29 / 1.8, 9);
});

test('a cycle that a person broke into is none', () => {
  const broken = COLD.map((extreme, i): Extreme =>
    i === 2 ? { ...extreme, turnedBy: 'person' } : extreme,
  );

  expect(findCycles(broken)).toHaveLength(1);
});

describe('cold start and room', () => {
  const series = {
    timesS: Float64Array.from([0, 5, 10, 15, 20, 25]),
    tempsC: Float64Array.from([22, 22.1, 21.9, 22.3, 24, 27]),
  };

  test('a record that starts far under its resets starts cold', () => {
    expect(isColdStart(COLD, 0, DEFAULT_RATING)).toBe(true);
    expect(isColdStart(COLD, 2, DEFAULT_RATING)).toBe(false);
  });

  test('the room is as given, else the first readings of a cold start, else unknown', () => {
    expect(findRoom(series, 19, true)).toBe(19);
    expect(findRoom(series, null, true)).toBeCloseTo(22, 1);
    expect(findRoom(series, null, false)).toBeNull();
  });
});

describe('a slow probe', () => {
  const legs = COLD.slice(1).map((to, i): RunLeg => ({
    kind: to.kind === 'peak' ? 'heating' : 'cooling',
    from: COLD[i]!,
    to,
    fit: null,
    knee: null,
    fromCold: i === 0,
    hasGap: false,
  }));

  test('is too slow where its response takes over a quarter of the on-time', () => {
    // On-times are 110 s: a quarter is 27.5 s.
    expect(isProbeTooSlow({ ...INPUT.probe, responseS: 27 }, legs)).toBe(false);
    expect(isProbeTooSlow({ ...INPUT.probe, responseS: 28 }, legs)).toBe(true);
    expect(isProbeTooSlow({ ...INPUT.probe, responseS: null }, legs)).toBe(false);
  });
});
