import { expect, test } from 'vitest';
import { wallClockMs } from '#server/runs/wall-clock.ts';

const NEW_YORK = 'America/New_York';

test('a probe’s own clock is read in the shop’s zone, winter and summer', () => {
  // Eastern Standard Time is UTC−5, Eastern Daylight Time UTC−4 (15 U.S.C. 260a, 261).
  expect(wallClockMs('2026-03-04 10:15:00', NEW_YORK)).toBe(Date.parse('2026-03-04T15:15:00Z'));
  expect(wallClockMs('2026-07-04 10:15:00', NEW_YORK)).toBe(Date.parse('2026-07-04T14:15:00Z'));
});

test('the hour before and the hour after a clock change are told right', () => {
  // Second Sunday of March 2026: 8 March, 02:00.
  expect(wallClockMs('2026-03-08 01:30:00', NEW_YORK)).toBe(Date.parse('2026-03-08T06:30:00Z'));
  expect(wallClockMs('2026-03-08 03:30:00', NEW_YORK)).toBe(Date.parse('2026-03-08T07:30:00Z'));
});

test('what is no date and time gives none', () => {
  expect(wallClockMs('soon', NEW_YORK)).toBeUndefined();
});
