/**
 * A quantile of unsorted numbers, linear between neighbours (type 7 of Hyndman and Fan, 1996).
 *
 * @param values any order, left as they are
 * @param share 0 to 1; 0.5 is the median
 * @throws {RangeError} there are no values
 */
export function quantile(values: ArrayLike<number>, share: number): number {
  if (values.length === 0) throw new RangeError('no values');
  const sorted = Float64Array.from(values).sort();
  const place = share * (sorted.length - 1);
  const below = Math.floor(place);
  const low = sorted[below]!;
  const high = sorted[Math.min(below + 1, sorted.length - 1)]!;
  return low + (place - below) * (high - low);
}

/** The middle value; the mean of the two middle ones where their number is even. */
export function median(values: ArrayLike<number>): number {
  return quantile(values, 0.5);
}
