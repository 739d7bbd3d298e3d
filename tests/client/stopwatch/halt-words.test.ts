import { expect, test } from 'vitest';
import type { GuardSays } from '#shared/analysis/guard/guard-state.ts';
import { toCelsius } from '#shared/units.ts';
import type { GuardFacts } from '../../../client/pages/stopwatch/guard-panel.tsx';
import { haltWords } from '../../../client/pages/stopwatch/halt-panel.tsx';

function facts(says: GuardSays, isGas: boolean): GuardFacts {
  return {
    view: { says, why: null, forecast: null, unconfirmed: null },
    nowS: 300,
    unit: 'F',
    highLimitC: toCelsius(196, 'F'),
    ceilingC: toCelsius(190, 'F'),
    lastC: toCelsius(192, 'F'),
    isGas,
    isHeatOff: says === 'unplug',
  };
}

test('before heat off is pressed, the selector comes first, and then the key', () => {
  const { head, todo } = haltWords(facts('cut-heat', false));

  expect(head).toBe('Cut the heat');
  expect(todo).toMatch(/selector to no-heat.*Then press Heat off\.$/);
});

test('an electric machine that climbs on is to be unplugged or its breaker opened', () => {
  const { head, todo } = haltWords(facts('unplug', false));

  expect(head).toBe('Pull the plug');
  expect(todo).toContain('Pull the plug or open the breaker.');
  expect(todo).not.toMatch(/gas/);
});

test('a gas machine that climbs on is to be unplugged and its gas shut, and a smell is not to be sparked', () => {
  const { head, todo } = haltWords(facts('unplug', true));

  expect(head).toBe('Pull the plug');
  expect(todo).toContain('then shut the gas');
  expect(todo).toContain('On a smell of gas touch no switch or plug');
  expect(todo).toContain('call the gas emergency line');
});
