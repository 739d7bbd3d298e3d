import { studentTQuantile } from '../analysis/statistics/student-t.ts';

/** One contribution to a result: its standard uncertainty, and how well that itself is known. */
export type UncertaintyPart = {
  name: string;
  /** Standard uncertainty times sensitivity, in the unit of the result. */
  standard: number;
  /** Degrees of freedom; Infinity for what is stated rather than observed. */
  degrees: number;
};

export type CombinedUncertainty = {
  standard: number;
  /** Effective degrees of freedom; Infinity where nothing was observed. */
  degrees: number;
  /** Coverage factor for 95 %, from Student's t: 1.96 for many degrees, more for few. */
  factor: number;
  expanded: number;
};

/**
 * Independent contributions added by their squares (JCGM 100:2008, 5.1.2), with the effective degrees of freedom of
 * the sum (Welch–Satterthwaite, G.4.1) and the expanded uncertainty for 95 % that follows (G.6.4).
 *
 * @throws {RangeError} a standard uncertainty is negative or not finite, or degrees are not positive
 */
export function combineUncertainty(parts: readonly UncertaintyPart[]): CombinedUncertainty {
  let squares = 0;
  let fourths = 0;
  for (const { name, standard, degrees } of parts) {
    if (!(standard >= 0 && standard < Infinity)) throw new RangeError(`${name}: no uncertainty`);
    if (!(degrees > 0)) throw new RangeError(`${name}: degrees of freedom must be positive`);
    squares += standard ** 2;
    fourths += standard ** 4 / degrees;
  }
  const standard = Math.sqrt(squares);
  const degrees = fourths > 0 ? squares ** 2 / fourths : Infinity;
  const factor = coverageFactor(degrees);
  return { standard, degrees, factor, expanded: factor * standard };
}

/** Student's t for 95 % two-sided; between whole degrees it is interpolated (JCGM 100:2008, G.4.1 and table G.2). */
export function coverageFactor(degrees: number): number {
  return studentTQuantile(0.975, Math.max(1, Math.min(1e6, degrees)));
}

/** Standard uncertainty of a value known to lie anywhere within ± half with equal chance (JCGM 100:2008, 4.3.7). */
export function rectangular(half: number): number {
  return half / Math.sqrt(3);
}

/** Standard uncertainty of a reading shown in whole steps: half a step either way (JCGM 100:2008, F.2.2.1). */
export function ofResolution(step: number): number {
  return rectangular(step / 2);
}

/**
 * Mean of repeated readings and its standard uncertainty s/√n with n − 1 degrees of freedom (JCGM 100:2008, 4.2.3).
 *
 * @param values n ≥ 2
 * @throws {RangeError} fewer
 */
export function ofRepeats(values: readonly number[]): {
  mean: number;
  standard: number;
  degrees: number;
} {
  const n = values.length;
  if (n < 2) throw new RangeError(`repeats are at least two readings, got ${n}`);
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { mean, standard: Math.sqrt(squares / (n - 1) / n), degrees: n - 1 };
}

/**
 * Standard uncertainty from lag where it is not put right: a first-order probe in air that moves steadily is behind by
 * rate · τ, and by less while it begins to; so anywhere within that.
 *
 * @param rateKPerS how fast the air moves
 * @param responseS first-order response time
 */
export function ofLag(rateKPerS: number, responseS: number): number {
  return rectangular(Math.abs(rateKPerS) * responseS);
}
