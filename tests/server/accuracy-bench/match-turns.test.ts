import { expect, test } from 'vitest';
import type { TrueTurn } from '#server/commands/heat-model/true-turning-points.ts';
import { matchTurns, type FoundTurn } from '#tests/bench/accuracy/match-turns.ts';

function turn(kind: TrueTurn['kind'], timeS: number, flat = 0): TrueTurn {
  const span = { flatFromS: timeS - flat, flatToS: timeS + flat };
  return { kind, timeS, tempC: 68, switchTimeS: timeS - 2, ...span };
}

function found(kind: FoundTurn['kind'], timeS: number): FoundTurn {
  return { kind, timeS, tempC: 68 };
}

test('a turn is found within the window, and missed beyond it', () => {
  const needed = [turn('cut-out', 100)];

  expect(matchTurns([found('cut-out', 108)], needed, needed, 8).hits).toBe(1);
  expect(matchTurns([found('cut-out', 108.1)], needed, needed, 8)).toMatchObject({
    hits: 0,
    missed: 1,
    invented: 1,
  });
});

test('a turn of the other kind does not count', () => {
  const needed = [turn('cut-out', 100)];

  expect(matchTurns([found('reset', 100)], needed, needed, 8)).toMatchObject({
    missed: 1,
    invented: 1,
  });
});

test('a found turn answers one true turn only, the nearest one', () => {
  const needed = [turn('cut-out', 100), turn('cut-out', 106)];

  const { hits, missed, invented } = matchTurns([found('cut-out', 104)], needed, needed, 8);

  expect({ hits, missed, invented }).toEqual({ hits: 1, missed: 1, invented: 0 });
});

test('a flat top may be found anywhere that the probe stays within a quarter degree of it', () => {
  const needed = [turn('cut-out', 100, 20)];

  expect(matchTurns([found('cut-out', 119)], needed, needed, 8).hits).toBe(1);
});

test('a turn that may be found is neither missed nor invented', () => {
  const accepted = [turn('cut-out', 100), turn('reset', 140)];

  const without = matchTurns([found('cut-out', 100)], accepted.slice(0, 1), accepted, 8);
  const withIt = matchTurns(
    [found('cut-out', 100), found('reset', 140)],
    accepted.slice(0, 1),
    accepted,
    8,
  );

  for (const { hits, missed, invented } of [without, withIt])
    expect({ hits, missed, invented }).toEqual({ hits: 1, missed: 0, invented: 0 });
});
