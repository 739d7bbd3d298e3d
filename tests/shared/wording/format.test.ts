import { expect, test } from 'vitest';
import { toCelsius } from '#shared/units.ts';
import {
  formatBand,
  formatMoment,
  formatProbability,
  formatRate,
  formatRated,
  formatSpan,
  formatStep,
  formatTemp,
  formatWithin,
} from '#shared/wording/format.ts';

const N = '\u00a0';

test('a temperature comes back in the unit it was written in, to a tenth', () => {
  expect(formatTemp(toCelsius(155, 'F'), 'F')).toBe(`155.0${N}°F`);
  // NIST SP 811, B.8: 155 °F is 68.33 °C.
  expect(formatTemp(toCelsius(155, 'F'), 'C')).toBe(`68.3${N}°C`);
});

test('a temperature under zero has a true minus sign, and zero has none', () => {
  expect(formatTemp(-40, 'C')).toBe(`−40.0${N}°C`);
  expect(formatTemp(-0.01, 'C')).toBe(`0.0${N}°C`);
});

test('a rated temperature drops a needless decimal', () => {
  expect(formatRated(toCelsius(196, 'F'), 'F')).toBe(`196${N}°F`);
  expect(formatRated(67.5, 'C')).toBe(`67.5${N}°C`);
});

test('a difference has no offset', () => {
  expect(formatStep(5, 'F')).toBe(`9.0${N}°F`);
});

test('a band is its two edges with one unit', () => {
  expect(formatBand(toCelsius(155, 'F'), 5 / 1.8, 'F')).toBe(`150–160${N}°F`);
});

test('a value with its uncertainty keeps together on one line', () => {
  expect(formatWithin(toCelsius(154.8, 'F'), 2.3 / 1.8, 'F')).toBe(`154.8${N}±${N}2.3${N}°F`);
});

test('spans read 12 s, 3:47 and 1:02:05', () => {
  expect([12, 227, 3725].map(formatSpan)).toEqual([`12${N}s`, '3:47', '1:02:05']);
});

test('a span of 59.6 s rounds to a minute', () => {
  expect(formatSpan(59.6)).toBe('1:00');
});

test('moments read 0:12 and 7:48', () => {
  expect([12, 468].map(formatMoment)).toEqual(['0:12', '7:48']);
});

test('a rate is told by the minute', () => {
  expect(formatRate(0.1, 'C')).toBe(`6.0${N}°C a minute`);
});

test('a probability never claims certainty', () => {
  expect(formatProbability(0.97)).toBe(`97${N}%`);
  expect(formatProbability(0.9999)).toBe(`over 99.9${N}%`);
  expect(formatProbability(0)).toBe(`under 0.1${N}%`);
});
