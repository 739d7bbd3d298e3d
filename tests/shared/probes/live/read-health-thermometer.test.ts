import { expect, test } from 'vitest';
import { readHealthThermometer } from '#shared/probes/live/read-health-thermometer.ts';
import { bytes } from './bytes.ts';

/*
 * Worked by hand from the definition of Temperature Measurement (0x2A1C): flags (bit 0 Fahrenheit, bit 1 time stamp,
 * bit 2 temperature type), medfloat32, then the stamp (7 octets) and the type (1) where announced.
 * Source: Bluetooth SIG, GATT Specification Supplement, section Temperature Measurement, as quoted by
 * docs.rs/trouble-host 0.2.4; the number itself as in read-medical-float.test.ts.
 */
test.each([
  // 6825 × 10^−2: 0x001AA9, 0xFE.
  ['°C alone', '00 A9 1A 00 FE', { temp: 68.25, unit: 'C' }],
  // 1549 × 10^−1: 0x00060D, 0xFF.
  ['°F alone', '01 0D 06 00 FF', { temp: 154.9, unit: 'F' }],
  // 1 December 2026 (0x07EA), 14:30:05.
  ['with a time stamp', '02 A9 1A 00 FE EA 07 0C 01 0E 1E 05', { temp: 68.25, unit: 'C' }],
  ['with a type', '04 A9 1A 00 FE 02', { temp: 68.25, unit: 'C' }],
  ['with both, in °F', '07 0D 06 00 FF EA 07 0C 01 0E 1E 05 02', { temp: 154.9, unit: 'F' }],
  // −105 = 0xFFFF97.
  ['below zero', '00 97 FF FF FF', { temp: -10.5, unit: 'C' }],
  ['with octets of a later edition', '00 A9 1A 00 FE 77 77', { temp: 68.25, unit: 'C' }],
])('a measurement %s is read in its own unit', (_what, octets, value) => {
  expect(readHealthThermometer(bytes(octets))).toEqual(value);
});

test.each([
  ['00 FF FF 7F 00', 'not-known'],
  ['00 00 00 80 00', 'out-of-range'],
  ['01 FE FF 7F 00', 'out-of-range'],
  ['01 02 00 80 00', 'out-of-range'],
  ['00 01 00 80 00', 'malformed'],
  // 1001 °C and 10^100 °C.
  ['00 E9 03 00 00', 'implausible'],
  ['00 01 00 00 64', 'implausible'],
  ['', 'malformed'],
  ['00 A9 1A 00', 'malformed'],
  // A stamp and a type are announced and missing.
  ['02 A9 1A 00 FE EA 07', 'malformed'],
  ['04 A9 1A 00 FE', 'malformed'],
])('the octets "%s" give no reading: %s', (octets, none) => {
  expect(readHealthThermometer(bytes(octets))).toEqual({ none });
});

test('what is too hot in one unit can be a reading in the other', () => {
  expect(readHealthThermometer(bytes('01 E9 03 00 00'))).toEqual({ temp: 1001, unit: 'F' });
});
