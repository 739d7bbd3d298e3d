import { expect, test } from 'vitest';
import { resultHash } from '#shared/reading/result-hash.ts';

test('the hash is FNV-1a over the bytes of the numbers', () => {
  // 32-bit FNV-1a of eight zero bytes is 0x811c9dc5 times 0x01000193 to the eighth, modulo 2^32:
  // worked with big integers, since a zero byte leaves the exclusive or as it is
  const prime = 0x01000193n;
  let hash = 0x811c9dc5n;
  for (let i = 0; i < 8; i++) hash = (hash * prime) % 2n ** 32n;
  const hex = hash.toString(16).padStart(8, '0');

  expect(resultHash(Float64Array.of(0), Float64Array.of(0))).toBe(hex + hex);
});

test('one changed bit of either column changes it', () => {
  const timesS = Float64Array.of(0, 1, 2);
  const temps = Float64Array.of(70.1, 70.2, 70.3);
  const hash = resultHash(timesS, temps);

  expect(resultHash(timesS, Float64Array.of(70.1, 70.2, 70.30000000000001))).not.toBe(hash);
  expect(resultHash(Float64Array.of(0, 1, 2.5), temps)).not.toBe(hash);
});
