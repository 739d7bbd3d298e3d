const PRIME = 0x01000193;
const START = 0x811c9dc5;

/**
 * FNV-1a (32 bit) over the bytes of the times and, beside it, of the temperatures, as 16 hex digits.
 * Preview and import of the same file have the same one; it guards against slips, not against malice.
 */
export function resultHash(timesS: Float64Array, temps: Float64Array): string {
  const a = bytesOf(timesS);
  const b = bytesOf(temps);
  let first = START;
  let second = START;
  for (let i = 0; i < a.length; i++) {
    first = Math.imul(first ^ a[i]!, PRIME);
    second = Math.imul(second ^ b[i]!, PRIME);
  }
  return hex(first) + hex(second);
}

function bytesOf(numbers: Float64Array): Uint8Array {
  return new Uint8Array(numbers.buffer, numbers.byteOffset, numbers.byteLength);
}

function hex(hash: number): string {
  return (hash >>> 0).toString(16).padStart(8, '0');
}
