import fc from 'fast-check';
import { expect, test } from 'vitest';
import { fromCelsius, fromKelvinStep, toCelsius, toKelvinStep } from '#shared/units.ts';

test.each([
  // NIST SP 811 (2008), appendix B.8: t/°C = (t/°F − 32)/1.8 and T/K = t/°C + 273.15.
  [32, 0, 273.15],
  [212, 100, 373.15],
  [-40, -40, 233.15],
  [98.6, 37, 310.15],
])('%d °F is %d °C and %d K', (inF, inC, inK) => {
  expect(toCelsius(inF, 'F')).toBeCloseTo(inC, 12);
  expect(fromCelsius(inC, 'F')).toBeCloseTo(inF, 12);
  expect(fromCelsius(inC, 'K')).toBeCloseTo(inK, 12);
  expect(toCelsius(inK, 'K')).toBeCloseTo(inC, 12);
  expect(toCelsius(inC, 'C')).toBe(inC);
});

test('a difference of 1.8 °F is one kelvin, with no offset', () => {
  // NIST SP 811 (2008), appendix B.8: a temperature interval in °F is divided by 1.8.
  expect(toKelvinStep(1.8, 'F')).toBe(1);
  expect(toKelvinStep(10, 'F')).toBeCloseTo(5.555556, 6);
  expect(fromKelvinStep(5, 'F')).toBe(9);
  expect(toKelvinStep(5, 'C')).toBe(5);
  expect(fromKelvinStep(5, 'K')).toBe(5);
});

test('a temperature comes back from any unit', () => {
  fc.assert(
    fc.property(
      fc.double({ min: -200, max: 1000, noNaN: true }),
      fc.constantFrom('F' as const, 'C' as const, 'K' as const),
      (temp, unit) => {
        expect(fromCelsius(toCelsius(temp, unit), unit)).toBeCloseTo(temp, 9);
        expect(fromKelvinStep(toKelvinStep(temp, unit), unit)).toBeCloseTo(temp, 9);
      },
    ),
  );
});
