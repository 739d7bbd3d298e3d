/** What a FLOAT-Type says instead of a number. */
export type SpecialFloat = 'NaN' | 'NRes' | '+INF' | '-INF' | 'reserved';

/** By the 24 bits of the mantissa. */
const SPECIALS: ReadonlyMap<number, SpecialFloat> = new Map([
  [0x7ffffe, '+INF'],
  [0x7fffff, 'NaN'],
  [0x800000, 'NRes'],
  [0x800001, 'reserved'],
  [0x800002, '-INF'],
]);

/**
 * IEEE 11073-20601 FLOAT-Type: mantissa × 10^exponent, the exponent a signed octet at the most significant end, the
 * mantissa signed in 24 bits. Least significant octet first, as the Bluetooth profiles carry it.
 *
 * The mantissas of the special values count as special whatever the exponent: a number may not use them
 * (its mantissa reaches ±(2^23 − 3); from memory).
 *
 * @param value holds four octets from `offset` on
 * @returns the decimal number as exactly as a double can hold it
 * @throws {RangeError} fewer than four octets are left
 * @see HL7 Personal Health Device guide, "IEEE 11073 FLOATs and SFLOATs", which prints the encoding and its examples
 */
export function readMedicalFloat(value: DataView, offset: number): number | SpecialFloat {
  const bits = value.getUint32(offset, true) & 0xffffff;
  const special = SPECIALS.get(bits);
  if (special) return special;
  const mantissa = bits >= 0x800000 ? bits - 0x1000000 : bits;
  // By way of decimal text: a product with a power of ten is off in the last bit (981 × 10^−1 is 98.10000000000001).
  return Number(`${mantissa}e${value.getInt8(offset + 3)}`);
}
