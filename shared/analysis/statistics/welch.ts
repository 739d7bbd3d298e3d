import { studentTProbability, studentTQuantile } from './student-t.ts';

/** A sample by its size, mean and variance (of one value, in its unit squared). */
export type Sample = { count: number; mean: number; variance: number };

/** A difference of two means, second less first, in their unit. */
export type MeanDifference = {
  difference: number;
  /** Half of the two-sided 95 % interval. */
  within: number;
  /** Chance of such a difference with none there, two-sided. */
  pValue: number;
};

/**
 * Difference of two means whose variances need not be alike: Welch's t, with Satterthwaite's degrees of freedom.
 *
 * @param common standard error (k = 1) of the difference that does not average out, in the samples' unit
 * @returns null where a sample has fewer than two values
 * @see B. L. Welch, Biometrika 34 (1947), 28–35; NIST/SEMATECH e-Handbook of Statistical Methods, 1.3.5.3
 */
export function compareMeans(first: Sample, second: Sample, common = 0): MeanDifference | null {
  if (first.count < 2 || second.count < 2) return null;
  const difference = second.mean - first.mean;
  const a = first.variance / first.count;
  const b = second.variance / second.count;
  const squared = a + b + common * common;
  const error = Math.sqrt(squared);
  if (!(error > 0)) return { difference, within: 0, pValue: difference === 0 ? 1 : 0 };
  // What is common is known from elsewhere and counts as without limit of degrees.
  const shares = (a / squared) ** 2 / (first.count - 1) + (b / squared) ** 2 / (second.count - 1);
  const bounded = Math.min(1 / shares, 1e6);
  return {
    difference,
    within: studentTQuantile(0.975, bounded) * error,
    pValue: 2 * (1 - studentTProbability(Math.abs(difference) / error, bounded)),
  };
}

/**
 * Mean and variance of values that are each known to an expanded uncertainty (k = 2): the variance is the larger of
 * what they show and what their own uncertainty says.
 *
 * @param values at least one
 * @param expanded of each value, same unit; empty where they are exact
 */
export function sampleOf(values: number[], expanded: number[] = []): Sample {
  const count = values.length;
  if (count === 0) throw new RangeError('a sample has at least one value');
  const mean = values.reduce((sum, value) => sum + value, 0) / count;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  const shown = count > 1 ? squares / (count - 1) : 0;
  const own = expanded.reduce((sum, u) => sum + (u / 2) ** 2, 0) / count;
  return { count, mean, variance: Math.max(shown, own) };
}
