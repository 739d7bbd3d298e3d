import { expect, test } from 'vitest';
import { pauseMs } from '#server/people/back-off.ts';

test('four failures are free; then the pause doubles from 1 s to 15 min', () => {
  const pausesS = Array.from({ length: 17 }, (_, failures) => pauseMs(failures) / 1000);

  expect(pausesS).toEqual([0, 0, 0, 0, 0, 1, 2, 4, 8, 16, 32, 64, 128, 256, 512, 900, 900]);
  expect(pauseMs(10_000)).toBe(900_000);
});

test('somebody who never stops guessing gets at most 40 guesses in an hour', () => {
  let atMs = 0;
  let guesses = 0;
  // OWASP ASVS 4.0, 2.2.1 draws the line at 100.
  while (atMs < 3_600_000) atMs += pauseMs(++guesses);

  expect(guesses).toBeLessThanOrEqual(40);
});
