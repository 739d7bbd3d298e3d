import { expect, test } from 'vitest';
import type { LocatedTurn } from '#shared/analysis/turns/locate-turns.ts';
import { mixed } from '#shared/analysis/turns/mix-turns.ts';

function turn(tempC: number, uK: number, switchS: number | null): LocatedTurn {
  const switched = switchS === null ? null : { timeS: switchS, tempC: tempC - 1, uS: 1, uK: 0.2 };
  return { timeS: 100, tempC, uK, switched };
}

test('fits that lie apart give their mean and an uncertainty that holds them both', () => {
  const found = mixed([
    { turn: turn(68, 0.2, 95), share: 0.5 },
    { turn: turn(69, 0.2, 97), share: 0.5 },
  ])!;

  // Variance of a mixture: mean of the variances and variance of the means, 0.1² + 0.5²; k = 2.
  expect(found.tempC).toBeCloseTo(68.5, 10);
  expect(found.uK).toBeCloseTo(2 * Math.sqrt(0.01 + 0.25), 10);
  expect(found.switched!.timeS).toBeCloseTo(96, 10);
  expect(found.switched!.uS).toBeCloseTo(2 * Math.sqrt(0.25 + 1), 10);
});

test('a fit that is all but certain outweighs the rest', () => {
  const found = mixed([
    { turn: turn(68, 0.2, 95), share: 0.999 },
    { turn: turn(80, 0.2, 95), share: 0.001 },
  ])!;

  expect(Math.abs(found.tempC - 68)).toBeLessThan(0.02);
});

test('a switch that one of the fits does not show is not shown', () => {
  const readings = [
    { turn: turn(68, 0.2, 95), share: 0.5 },
    { turn: turn(68, 0.2, null), share: 0.5 },
  ];

  expect(mixed(readings)!.switched).toBeNull();
});

test('where no fit reads the turn there is none', () => {
  expect(mixed([{ turn: null, share: 1 }])).toBeNull();
});
