import { describe, expect, test } from 'vitest';
import { classifyTurns } from '#shared/analysis/classify-turns.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import type { Extreme } from '#shared/analysis/run-facts.ts';
import type { Mark } from '#shared/analysis/series.ts';
import { toCelsius } from '#shared/units.ts';

/** Extremes from °F at times; the first and last are the record's ends. */
function extremesOf(points: [number, number][]): Extreme[] {
  return points.map(([timeS, tempF], i) => ({
    kind: (points[i + 1] ?? points[i - 1]!)[1] < tempF ? 'peak' : 'valley',
    turnedBy: i === 0 ? 'start' : i === points.length - 1 ? 'end' : 'machine',
    timeS,
    tempC: toCelsius(tempF, 'F'),
    uK: 0.1,
    index: timeS,
    switched: null,
  }));
}

function turnedBy(points: [number, number][], marks: Mark[] = [], rating = DEFAULT_RATING) {
  const classified = classifyTurns(extremesOf(points), marks, rating, 1);
  return classified.map((extreme) => extreme.turnedBy);
}

const CYCLING: [number, number][] = [
  [0, 70],
  [300, 156],
  [370, 129],
  [480, 155],
  [550, 130],
  [660, 155],
  [720, 135],
];

test('cut-outs and resets of a cycling thermostat are the machine’s', () => {
  const inner = Array.from({ length: 5 }, () => 'machine');

  expect(turnedBy(CYCLING)).toEqual(['start', ...inner, 'end']);
});

test('a valley before any cut-out is no reset', () => {
  expect(
    turnedBy([
      [0, 150],
      [60, 128],
      [170, 155],
      [240, 130],
      [300, 150],
    ]),
  ).toEqual(['start', 'before-cut-out', 'machine', 'machine', 'end']);
});

describe('a turn made by a person', () => {
  const heatOff = (timeS: number): Mark => ({ timeS, kind: 'heat-off' });

  test.each(['heat-off', 'stopped', 'door'] as const)('%s before the peak', (kind) => {
    const turned = turnedBy(
      [
        [0, 70],
        [400, 178],
        [700, 90],
      ],
      [{ timeS: 392, kind }],
    );

    expect(turned[1]).toBe('person');
  });

  test('a click before the mark leaves the cut-out to the thermostat', () => {
    const marks: Mark[] = [{ timeS: 296, kind: 'click' }, heatOff(299)];

    expect(turnedBy(CYCLING, marks)[1]).toBe('machine');
  });

  test('a click long before the mark does not: the heat went on until it was turned off', () => {
    const turned = turnedBy(
      [
        [0, 70],
        [400, 178],
        [700, 90],
      ],
      [{ timeS: 270, kind: 'click' }, heatOff(396)],
    );

    expect(turned[1]).toBe('person');
  });

  test('up past the allowance the highest moment of a level stretch may lie well before the mark', () => {
    const levelAt = (tempF: number) =>
      turnedBy(
        [
          [0, 70],
          [400, tempF],
          [700, 90],
        ],
        [heatOff(412)],
      )[1];

    expect(levelAt(173)).toBe('person');
    expect(levelAt(157)).toBe('machine');
  });

  test('a door that was shut again long before the peak made no turn', () => {
    const turned = turnedBy(CYCLING, [{ timeS: 410, kind: 'door' }]);

    expect(turned).toEqual(turnedBy(CYCLING));
  });

  test('heat off in the fall makes the next valley a person’s, not the cut-out before it', () => {
    const turned = turnedBy(CYCLING, [heatOff(330), { timeS: 368, kind: 'heat-on' }]);

    expect(turned.slice(0, 4)).toEqual(['start', 'machine', 'person', 'machine']);
  });

  test('a note or a click turns nothing', () => {
    const marks: Mark[] = [
      { timeS: 298, kind: 'note' },
      { timeS: 299, kind: 'click' },
    ];

    expect(turnedBy(CYCLING, marks)).toEqual(turnedBy(CYCLING));
  });
});

describe('a one-shot part that opens for good', () => {
  test('a last peak out of line, after which the exhaust falls past the reset band', () => {
    const turned = turnedBy([...CYCLING.slice(0, 5), [600, 142], [900, 95]]);

    expect(turned[5]).toBe('one-shot');
  });

  test('a lone peak at the high limit', () => {
    expect(
      turnedBy([
        [0, 70],
        [500, 199],
        [560, 180],
      ])[1],
    ).toBe('one-shot');
  });

  test('a last peak in line with the others stays a cut-out', () => {
    const turned = turnedBy([...CYCLING.slice(0, 5), [660, 155], [1000, 95]]);

    expect(turned[5]).toBe('machine');
  });

  test('a last cut-out that has only begun to fall stays a cut-out', () => {
    expect(
      turnedBy(
        CYCLING.slice(0, 3).concat([
          [480, 162],
          [500, 150],
        ]),
      )[3],
    ).toBe('machine');
  });
});

test('a door opened in a rise makes its dip a person’s at both ends: no thermostat cut that heat', () => {
  const dip: [number, number][] = [
    [0, 70],
    [300, 156],
    [370, 129],
    [420, 147],
    [450, 139],
    [500, 155],
    [570, 129],
    [600, 140],
  ];

  const machine = 'machine';
  expect(turnedBy(dip, [{ timeS: 412, kind: 'door' }])).toEqual([
    ...['start', machine, machine, 'person', 'person', machine, machine, 'end'],
  ]);
});
