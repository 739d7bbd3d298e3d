import { expect, test } from 'vitest';
import { readMoment } from '#client/forms/typed-moment.ts';

test('a time is read as a clock or as plain seconds', () => {
  expect(readMoment('7:48')).toBe(468);
  expect(readMoment('1:02:30')).toBe(3750);
  expect(readMoment(' 90 ')).toBe(90);
  expect(readMoment('0:12,5')).toBe(12.5);
});

test('what is no time is not guessed at', () => {
  expect(['', 'noon', '7:60', '7:', '-3', '1:2:3:4'].map(readMoment)).toEqual(
    Array<null>(6).fill(null),
  );
});
