import { expect, test } from 'vitest';
import { readTemperature } from '#shared/probes/live/read-temperature.ts';
import { bytes } from './bytes.ts';

/*
 * Worked by hand from the definition of Temperature (0x2A6E): sint16, least significant octet first, M = 1, d = −2,
 * b = 0; −273.15 to 327.67 °C; 0x8000 "value is not known"; all other values prohibited.
 * Source: Bluetooth SIG, GATT Specification Supplement, section Temperature, as quoted by docs.rs/trouble-host 0.2.4.
 */
test.each([
  // 6825 = 0x1AA9: 68.25 °C, which is 154.85 °F.
  ['A9 1A', 68.25],
  ['00 00', 0],
  ['01 00', 0.01],
  // −1 = 0xFFFF.
  ['FF FF', -0.01],
  // −1050 = 0x10000 − 1050 = 0xFBE6.
  ['E6 FB', -10.5],
  // The greatest value: 0x7FFF = 32767.
  ['FF 7F', 327.67],
])('the octets %s are %s °C', (octets, tempC) => {
  expect(readTemperature(bytes(octets))).toEqual({ temp: tempC, unit: 'C' });
});

test('a probe that does not know its temperature gives no reading', () => {
  expect(readTemperature(bytes('00 80'))).toEqual({ none: 'not-known' });
});

test('what is colder than any winter is a gap, and what is colder than nothing is no temperature', () => {
  // −6001 = 0x10000 − 6001 = 0xE88F: −60.01 °C. −27315 = 0x954D is the least value allowed; −27316 = 0x954C is prohibited.
  expect(readTemperature(bytes('8F E8'))).toEqual({ none: 'implausible' });
  expect(readTemperature(bytes('4D 95'))).toEqual({ none: 'implausible' });
  expect(readTemperature(bytes('4C 95'))).toEqual({ none: 'malformed' });
});

test.each(['', 'A9', 'A9 1A 00'])('octets that are not two say nothing: "%s"', (octets) => {
  expect(readTemperature(bytes(octets))).toEqual({ none: 'malformed' });
});
