import { expect, test } from 'vitest';
import { openingRun } from '#client/pages/sign-in/opening-run.ts';
import { fromCelsius } from '#shared/units.ts';

test('the run over the sign-in cuts out and comes back three times, inside the bands it is drawn on', () => {
  const { turns, readings } = openingRun();

  const temps = turns.map(({ tempC }) => fromCelsius(tempC, 'F'));
  const cutOuts = temps.filter((_, index) => index % 2 === 0);
  const resets = temps.filter((_, index) => index % 2 === 1);
  expect([cutOuts.length, resets.length]).toEqual([3, 3]);
  // Common practice, as printed behind it: opens 155 ± 5 °F, closes 130 ± 5 °F.
  for (const temp of cutOuts) expect(Math.abs(temp - 155)).toBeLessThan(5);
  for (const temp of resets) expect(Math.abs(temp - 130)).toBeLessThan(5);
  expect(readings.length).toBeLessThan(900);
});
