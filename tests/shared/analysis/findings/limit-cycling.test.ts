import { describe, expect, test } from 'vitest';
import type { ReferenceRun } from '#shared/analysis/analysis.ts';
import { findLimitCycling } from '#shared/analysis/findings/limit-cycling.ts';
import { toCelsius } from '#shared/units.ts';
import { buildFacts, turnsAt } from './build-facts.ts';

const FIVE = (tempF: number) => Array.from({ length: 5 }, () => tempF);
const clean = (onS: number): ReferenceRun => ({
  cycles: 5,
  onS,
  offS: 45,
  swingK: 25 / 1.8,
  fall: null,
});

describe('cut-outs at 125 °F, far under a band from 150', () => {
  // The rated differential is 25 °F; 0.7 of it is 17.5 °F.
  test.each([
    [17, 'limit-cycling'],
    [18, undefined],
  ])('with swings of %s °F: %s', (swingF, code) => {
    const found = findLimitCycling(buildFacts(turnsAt(FIVE(125), 125 - swingF)));

    expect(found?.code).toBe(code);
  });

  test.each([
    [44, 'on-times'],
    [46, undefined],
  ])('with whole swings and heats of %s s where the clean run has 90: %s', (onS, by) => {
    const turns = turnsAt(FIVE(125), 103, { onS, offS: 30 });

    const found = findLimitCycling(buildFacts(turns, { reference: clean(90) }));

    expect(found?.evidence.by).toBe(by);
  });

  test('with whole swings and no clean run to go by is a thermostat’s own', () => {
    expect(findLimitCycling(buildFacts(turnsAt(FIVE(125), 103, { onS: 10 })))).toBeNull();
  });

  test('twice only is not again and again', () => {
    expect(findLimitCycling(buildFacts(turnsAt([125, 125], 115)))).toBeNull();
  });

  test('four short swings and a long one still name the limit: the middle swing counts', () => {
    const turns = turnsAt(FIVE(125), 115);
    const long = turns.map((turn, i) => (i === 6 ? { ...turn, tempF: 106 } : turn));

    expect(findLimitCycling(buildFacts(long))?.code).toBe('limit-cycling');
  });
});

test('cut-outs that a poor probe cannot tell from the band do not name a limit', () => {
  const turns = turnsAt(FIVE(148), 138).map((turn) => ({ ...turn, uF: 3 }));

  expect(findLimitCycling(buildFacts(turns))).toBeNull();
});

test('short swings within the band are no limit upstream', () => {
  expect(findLimitCycling(buildFacts(turnsAt(FIVE(155), 145)))).toBeNull();
});

test('the evidence tells swing, rated differential and heats as they were put in', () => {
  const turns = turnsAt(FIVE(125), 115, { onS: 20, offS: 30 });
  const { evidence } = findLimitCycling(buildFacts(turns))!;

  expect(evidence).toMatchObject({ cutOuts: 5, medianOnS: 20, usualOnS: null, by: 'swings' });
  // 10 °F and 25 °F as steps in K (NIST SP 811, B.8).
  expect(evidence.meanSwingK).toBeCloseTo(10 / 1.8, 9);
  expect(evidence.ratedDifferentialK).toBeCloseTo(25 / 1.8, 9);
  expect(evidence.meanCutOutC).toBeCloseTo(toCelsius(125, 'F'), 9);
});
