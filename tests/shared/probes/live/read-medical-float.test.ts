import { expect, test } from 'vitest';
import { readMedicalFloat } from '#shared/probes/live/read-medical-float.ts';
import { bytes } from './bytes.ts';

/*
 * HL7, Personal Health Device Implementation Guide, "IEEE 11073 FLOATs and SFLOATs": the table of FLOAT values, written
 * there most significant octet first, and the table of special values.
 */
test.each([
  ['02 00 00 00', 2],
  ['14 00 00 FF', 2.0],
  ['C8 00 00 FE', 2.0],
  ['02 00 00 01', 20],
  ['02 00 00 02', 200],
  ['C8 00 00 00', 200],
  ['D2 04 00 00', 1234],
  ['2E FB FF 00', -1234],
])('the octets %s are %s', (octets, number) => {
  expect(readMedicalFloat(bytes(octets), 0)).toBe(number);
});

test.each([
  ['FF FF 7F 00', 'NaN'],
  ['FE FF 7F 00', '+INF'],
  ['02 00 80 00', '-INF'],
  ['00 00 80 00', 'NRes'],
  ['01 00 80 00', 'reserved'],
])('the octets %s say %s', (octets, special) => {
  expect(readMedicalFloat(bytes(octets), 0)).toBe(special);
});

test('a number is the decimal that was meant, to the last bit', () => {
  // 981 = 0x0003D5, exponent −1 = 0xFF. In doubles 981 × 10^−1 by multiplication is 98.10000000000001.
  expect(readMedicalFloat(bytes('D5 03 00 FF'), 0)).toBe(98.1);
  // 15485 = 0x3C7D, exponent −2 = 0xFE, after one octet of something else.
  expect(readMedicalFloat(bytes('00 7D 3C 00 FE'), 1)).toBe(154.85);
});

test('the mantissa of a special value is one under any exponent', () => {
  expect(readMedicalFloat(bytes('FF FF 7F FB'), 0)).toBe('NaN');
});

test('fewer than four octets are refused', () => {
  expect(() => readMedicalFloat(bytes('6C 01 00'), 0)).toThrow(RangeError);
});
