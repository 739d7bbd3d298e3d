import fc from 'fast-check';
import { expect, test } from 'vitest';
import { CHUNK_SAMPLES, packChunk, packSamples, unpackChunk } from '#server/runs/pack-samples.ts';

test('a packed reading is a little-endian IEEE 754 double', () => {
  // IEEE 754-2019, binary64: 155 = 1.2109375 × 2^7, so sign 0, exponent 1030, fraction 0x3600000000000.
  const packed = packChunk(Float64Array.of(155));

  expect(Buffer.from(packed).toString('hex')).toBe('0000000000606340');
});

test('any readings come back bit for bit, gaps and all', () => {
  fc.assert(
    fc.property(fc.float64Array({ maxLength: 200 }), (values) => {
      const back = packSamples(values).map(unpackChunk);

      expect(Buffer.concat(back.map(({ buffer }) => Buffer.from(buffer)))).toEqual(
        Buffer.from(values.buffer, values.byteOffset, values.byteLength),
      );
    }),
  );
});

test('a long record is cut into chunks of at most 65,536 readings', () => {
  const chunks = packSamples(new Float64Array(2 * 65_536 + 1));

  expect(chunks.map(({ byteLength }) => byteLength / 8)).toEqual([65_536, 65_536, 1]);
  expect(CHUNK_SAMPLES).toBe(65_536);
});

test('octets that are no whole readings are refused', () => {
  expect(() => unpackChunk(new Uint8Array(12))).toThrow(RangeError);
});
