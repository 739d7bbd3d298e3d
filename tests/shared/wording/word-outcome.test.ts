import { expect, test } from 'vitest';
import type { Finding } from '#shared/analysis/analysis.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { CHECK_CAUTIONS, RUN_CAUTIONS, SAFETY_LINE } from '#shared/wording/safety-lines.ts';
import { wordCall, wordNotJudged } from '#shared/wording/word-call.ts';
import { wordOutcome } from '#shared/wording/word-outcome.ts';

const runaway: Finding = { code: 'runaway', fromS: 0, toS: 60, evidence: { afterTrip: true } };
const inBand: Finding = { code: 'in-band', fromS: 0, toS: 60, evidence: {} };
const about = (fuel: string) => ({ unit: 'F' as const, judgedBy: DEFAULT_RATING, fuel });

test('after stop the first step cuts the heat and the next pulls the plug', () => {
  const { afterStop, sentence, heading } = wordOutcome('stop', runaway, about('electric'));

  expect(heading).toBe('Heat kept coming after the thermostat opened');
  expect(sentence).toBe('Stop. Do not leave this machine heating.');
  expect(afterStop[0]).toMatch(/^Cut the heat/);
  expect(afterStop[1]).toMatch(/pull the plug or open the breaker/);
  expect(afterStop.at(-1)).toMatch(/Do not leave it usable/);
});

test('on a gas machine the steps close the gas and air the room, on an electric one they do not speak of it', () => {
  const gas = wordOutcome('stop', runaway, about('gas')).afterStop.join(' ');
  const electric = wordOutcome('stop', runaway, about('electric')).afterStop.join(' ');

  expect(gas).toMatch(/Close the gas/);
  expect(gas).toMatch(/air the room/);
  expect(electric).not.toMatch(/smell of gas/);
});

test('a run that is not a stop has no steps to take at once', () => {
  expect(wordOutcome('proven', inBand, about('gas')).afterStop).toEqual([]);
  expect(wordOutcome('not-proven', inBand, about('gas')).afterStop).toEqual([]);
});

test('every call has its own word', () => {
  const calls = ['inside', 'outside', 'within-allowance', 'too-close'] as const;

  expect(new Set(calls.map((call) => wordCall(call).word)).size).toBe(4);
});

test('a run that was not judged says why', () => {
  expect(wordNotJudged('no-rating')).toMatch(/no rating/);
  expect(wordNotJudged('probe-too-slow')).toMatch(/probe/);
  expect(wordNotJudged(null)).toBeNull();
});

test('the cautions cover lock-out, live measurement, gas, lint, edges and the maker’s sheet', () => {
  const cautions = [...RUN_CAUTIONS, ...CHECK_CAUTIONS, SAFETY_LINE].join(' ');

  for (const word of [
    /lock out/,
    /qualified/,
    /smell/,
    /[Ll]int/,
    /sharp/,
    /service sheet/,
    /Local codes/,
  ]) {
    expect(cautions).toMatch(word);
  }
});
