import { expect, test } from 'vitest';
import type { Crossing } from '#shared/analysis/guard/guard-state.ts';
import { toCelsius } from '#shared/units.ts';
import { watchSentence, type GuardFacts } from '../../../client/pages/stopwatch/guard-panel.tsx';

const NBSP = '\u00a0';

function factsAt(nowS: number, highLimit: Crossing): GuardFacts {
  return {
    view: {
      says: 'watch',
      why: 'limit-near',
      forecast: { ceiling: null, highLimit },
      unconfirmed: null,
    },
    nowS,
    unit: 'F',
    highLimitC: toCelsius(196, 'F'),
    ceilingC: toCelsius(190, 'F'),
    lastC: toCelsius(170, 'F'),
    isGas: false,
    isHeatOff: false,
  };
}

test('a forecast is told with half the width of its interval', () => {
  const facts = factsAt(300, { earliestS: 380, likelyS: 400, latestS: 440 });

  const sentence = watchSentence(facts);

  // By hand: 400 - 300 = 100 s = 1:40; (440 - 380) / 2 = 30 s.
  expect(sentence).toBe(`At this rate it reaches 196${NBSP}°F in 1:40, give or take 30${NBSP}s.`);
});

test('a forecast whose end cannot be seen is told by its earliest', () => {
  const facts = factsAt(300, { earliestS: 325, likelyS: 345, latestS: null });

  const sentence = watchSentence(facts);

  expect(sentence).toBe(
    `At this rate it reaches 196${NBSP}°F in 45${NBSP}s, at the earliest in 25${NBSP}s.`,
  );
});
