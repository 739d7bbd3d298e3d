import { expect, test } from 'vitest';
import { formatRunTime, parseRunTime } from '#client/pages/upload/run-time.ts';

test('minutes and seconds are read as typed', () => {
  expect(parseRunTime('3:47')).toBe(227);
  expect(parseRunTime(' 0:05 ')).toBe(5);
  expect(parseRunTime('90:15')).toBe(5415);
  expect(parseRunTime('1:02:03')).toBe(3723);
  expect(parseRunTime('0:12.5')).toBe(12.5);
  expect(parseRunTime('0:12,5')).toBe(12.5);
});

test('a bare number is not taken for minutes or for seconds', () => {
  expect(parseRunTime('12')).toBeNull();
  expect(parseRunTime('')).toBeNull();
  expect(parseRunTime('3:75')).toBeNull();
  expect(parseRunTime('1:75:00')).toBeNull();
  expect(parseRunTime('-1:00')).toBeNull();
});

test('a moment is shown as it is typed', () => {
  expect(formatRunTime(227)).toBe('3:47');
  expect(formatRunTime(3723)).toBe('1:02:03');
  expect(formatRunTime(12.5)).toBe('0:12.5');
  expect(formatRunTime(59.97)).toBe('1:00');
});

test('what is shown is read back as the same moment', () => {
  for (const timeS of [0, 5, 59.9, 60, 3599.9, 3600, 86_399.5]) {
    expect(parseRunTime(formatRunTime(timeS))).toBeCloseTo(timeS, 6);
  }
});
