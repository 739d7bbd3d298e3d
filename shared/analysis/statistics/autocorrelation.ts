/**
 * Correlation of each value with the next, about zero: Σ x[i]·x[i+1] / Σ x[i]², −1 to 1.
 *
 * @param values residuals in time order; NaN parts them into runs
 * @returns 0 where there is nothing to correlate
 */
export function autocorrelation(values: Float64Array): number {
  let products = 0;
  let squares = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (Number.isNaN(value)) continue;
    squares += value * value;
    const next = values[i + 1] ?? NaN;
    if (!Number.isNaN(next)) products += value * next;
  }
  return squares > 0 ? products / squares : 0;
}
