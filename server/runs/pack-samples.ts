/** At most this many readings lie in one stored chunk. */
export const CHUNK_SAMPLES = 65_536;

const BYTES = Float64Array.BYTES_PER_ELEMENT;

/** Readings as little-endian float64, in chunks of at most CHUNK_SAMPLES. */
export function packSamples(values: Float64Array): Uint8Array[] {
  const chunks: Uint8Array[] = [];
  for (let from = 0; from < values.length; from += CHUNK_SAMPLES) {
    chunks.push(packChunk(values.subarray(from, from + CHUNK_SAMPLES)));
  }
  return chunks;
}

export function packChunk(values: Float64Array): Uint8Array {
  const view = new DataView(new ArrayBuffer(values.length * BYTES));
  values.forEach((value, i) => view.setFloat64(i * BYTES, value, true));
  return new Uint8Array(view.buffer);
}

/**
 * One chunk back to readings, bit for bit.
 *
 * @throws {RangeError} the length is not a whole number of float64
 */
export function unpackChunk(packed: Uint8Array): Float64Array {
  if (packed.byteLength % BYTES !== 0) throw new RangeError('a chunk holds whole float64 readings');
  const view = new DataView(packed.buffer, packed.byteOffset, packed.byteLength);
  return Float64Array.from({ length: packed.byteLength / BYTES }, (_, i) =>
    view.getFloat64(i * BYTES, true),
  );
}
