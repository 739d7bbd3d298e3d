import { expect, test } from 'vitest';
import type { MarkKind } from '#shared/analysis/series.ts';
import { findHeatLost } from '#shared/analysis/findings/heat-lost.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { buildFacts, type Turn } from './build-facts.ts';

/** Three rounds that come back at 132 °F, then a last fall to `lastF`. */
const rounds = (lastF: number, turnedBy: Turn['turnedBy'] = 'machine'): Turn[] => [
  { timeS: 0, tempF: 72 },
  { timeS: 300, tempF: 155 },
  { timeS: 345, tempF: 132 },
  { timeS: 435, tempF: 155 },
  { timeS: 480, tempF: 132 },
  { timeS: 570, tempF: 155, turnedBy },
  { timeS: 800, tempF: lastF },
];

// Its own resets lie at 132; lost is 8 °F under them: 124 °F, less what the last reading is uncertain by.
test.each([
  [123, 'heat-lost'],
  [124, undefined],
])('after returns at 132 °F, a last fall to %s is %s', (lastF, code) => {
  expect(findHeatLost(buildFacts(rounds(lastF)))?.code).toBe(code);
});

test('returns that come late, at 115 °F, leave a fall to 112 open: it may yet come back', () => {
  const late = rounds(112).map((turn) => (turn.tempF === 132 ? { ...turn, tempF: 115 } : turn));

  expect(findHeatLost(buildFacts(late))).toBeNull();
});

// With no return to go by: 0.4 of the way from 125 °F, where the reset band ends, down to a room of 72, is 103.8.
test.each([
  [103, 'heat-lost'],
  [105, undefined],
])('with no return at all in the record, a fall to %s °F is %s', (lastF, code) => {
  const once: Turn[] = [
    { timeS: 0, tempF: 72 },
    { timeS: 300, tempF: 155 },
    { timeS: 600, tempF: lastF },
  ];

  expect(findHeatLost(buildFacts(once))?.code).toBe(code);
});

test('a fall that a person made is no heat lost', () => {
  expect(findHeatLost(buildFacts(rounds(90, 'person')))).toBeNull();
});

test.each<[MarkKind, string | undefined]>([
  ['heat-off', undefined],
  ['stopped', undefined],
  ['click', 'heat-lost'],
  ['note', 'heat-lost'],
])('with a mark of %s in the last fall it is %s', (kind, code) => {
  const facts = buildFacts(rounds(90), { marks: [{ timeS: 600, kind }] });

  expect(findHeatLost(facts)?.code).toBe(code);
});

test('a record that begins in a fall says nothing of heat that was lost', () => {
  const falling: Turn[] = [
    { timeS: 0, tempF: 150 },
    { timeS: 600, tempF: 80 },
  ];

  expect(findHeatLost(buildFacts(falling))).toBeNull();
});

test('the moment below the reset band is where the line passes 125 °F', () => {
  const { evidence } = findHeatLost(buildFacts(rounds(109)))!;

  // From 155 at 570 s to 109 at 800 s the line falls 0.2 °F a second: 125 after 150 s.
  expect(evidence.belowResetAtS).toBeCloseTo(720, 6);
  expect(evidence.cutOutsBefore).toBe(3);
});

test('without a rating nothing is lost', () => {
  expect(findHeatLost(buildFacts(rounds(90), { rating: null }))).toBeNull();
  expect(findHeatLost(buildFacts(rounds(90), { rating: DEFAULT_RATING }))).not.toBeNull();
});
