import { expect, test } from '@playwright/test';
import { FIRST_LOAD_BAR_KB, firstLoad, sumKb } from '#tests/support/first-load.ts';

test('the stopwatch’s first load with the engine in it is within its budget', () => {
  const { first } = firstLoad('dist/client');

  expect(sumKb(first)).toBeLessThanOrEqual(FIRST_LOAD_BAR_KB);
  // The engine alone packs to a fifth of it: a count far below has missed something.
  expect(sumKb(first)).toBeGreaterThan(FIRST_LOAD_BAR_KB / 2);
});
