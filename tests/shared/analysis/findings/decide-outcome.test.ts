import { describe, expect, test } from 'vitest';
import { FINDING_CODES, type Finding, type FindingCode } from '#shared/analysis/analysis.ts';
import { decideOutcome } from '#shared/analysis/findings/decide-outcome.ts';
import { buildFacts, turnsAt, type Turn } from './build-facts.ts';

const say = (...codes: FindingCode[]): Finding[] =>
  codes.map((code) => ({ code, fromS: 0, toS: 60, evidence: {} }));
/** So many complete cycles: a cut-out more. */
const withCycles = (cycles: number) =>
  buildFacts(
    turnsAt(
      Array.from({ length: cycles + 1 }, () => 155),
      130,
    ),
  );

describe('a run of three complete cycles', () => {
  test('in band alone is proven', () => {
    expect(decideOutcome(say('in-band'), withCycles(3))).toBe('proven');
  });

  test.each(['runaway', 'heat-stays-on'] as const)('with %s means stop', (code) => {
    expect(decideOutcome(say(code), withCycles(3))).toBe('stop');
    expect(decideOutcome(say('limit-cycling', code), withCycles(3))).toBe('stop');
  });

  const others = FINDING_CODES.filter(
    (code) => !['runaway', 'heat-stays-on', 'in-band'].includes(code),
  );

  test.each(others)('with %s is not proven', (code) => {
    expect(decideOutcome(say(code), withCycles(3))).toBe('not-proven');
  });
});

test('two cycles where three are asked are not proven, and are where two are asked', () => {
  const facts = withCycles(2);

  expect(decideOutcome(say('in-band'), facts)).toBe('not-proven');
  expect(decideOutcome(say('in-band'), { ...facts, input: { ...facts.input, minCycles: 2 } })).toBe(
    'proven',
  );
});

// The high limit is 196 °F and the heat is to be cut 6 °F under it: the ceiling is 190.
test.each([
  [189.4, 0.5, 'not-proven'],
  [189.6, 0.5, 'stop'],
  [180, 9.9, 'not-proven'],
  [180, 10.1, 'stop'],
] as const)('a cut-out at %s ± %s °F with a ceiling of 190 is %s', (tempF, uF, outcome) => {
  const hot: Turn[] = turnsAt([155, tempF, 155], 130).map((turn) =>
    turn.tempF === tempF ? { ...turn, uF } : turn,
  );

  expect(decideOutcome(say('mixed'), buildFacts(hot))).toBe(outcome);
});

test('the probe’s own error counts towards the ceiling', () => {
  const hot = turnsAt([155, 186, 155], 130);
  // Rectangular ±4 °F: 2 · 4/√3 = 4.62 °F expanded (JCGM 100:2008, 4.3.7), and 186 + 4.62 > 190.
  const probe = { accuracyK: 4 / 1.8, calibrationUK: 0, correction: null, responseS: null };

  expect(decideOutcome(say('mixed'), buildFacts(hot))).toBe('not-proven');
  expect(decideOutcome(say('mixed'), buildFacts(hot, { probe }))).toBe('stop');
});
