/** Median of absolute values times this is the standard deviation of a normal spread. */
const NORMAL = 1.4826;
/** Enough for a steady median of millions. */
const LOOKED_AT = 20_000;

/**
 * How far values stray, by the median of their size, so that a few wild ones do not count.
 *
 * @param count how many there are
 * @param valueAt the value at a place; NaN is passed over
 * @returns standard deviation of a normal spread with that median; 0 for none
 */
export function robustScale(count: number, valueAt: (place: number) => number): number {
  const stride = Math.max(1, Math.floor(count / LOOKED_AT));
  const sizes = new Float64Array(Math.ceil(count / stride));
  let n = 0;
  for (let i = 0; i < count; i += stride) {
    const size = Math.abs(valueAt(i));
    if (size >= 0) sizes[n++] = size;
  }
  const sorted = sizes.subarray(0, n).sort();
  return NORMAL * (sorted[n >> 1] ?? 0);
}
