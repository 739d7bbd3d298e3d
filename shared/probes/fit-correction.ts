import type { ProbeCorrection } from '../analysis/rating.ts';

/** A probe held beside what it should have read. */
export type ComparedPoint = {
  /** What the probe read, °C; the mean where it was read several times. */
  readingC: number;
  /** What it should have read, °C. */
  referenceC: number;
  /** Standard uncertainty of their difference that this point has for itself, K. */
  ownErrorK: number;
};

export type CorrectionFit = {
  correction: ProbeCorrection;
  /** Degrees of freedom of the errors; Infinity where they follow from what is stated of the points. */
  degrees: number;
  /** Scatter of the points about the line with n − 2 degrees of freedom, K; null for two points. */
  residualSdK: number | null;
};

/** Nearer than this, two points say nothing of a slope, K. */
const LEAST_SPAN_K = 1;

/**
 * The line b(t) = y1 + y2 (t − t0) through differences b = reference − reading, by least squares, with the variances
 * of both and their covariance (JCGM 100:2008, H.3).
 *
 * The points' scatter about the line tells how well they are known, as in H.3, unless what is stated of them says that
 * they are known less well: then that is carried through the same formulas. Two points leave no degrees of freedom, so
 * there only what is stated counts.
 *
 * @param points at least 2, spanning at least 1 K
 * @param aboutC t0, °C
 * @throws {RangeError} too few points or too near together, or a value is not finite
 */
export function fitCorrection(points: readonly ComparedPoint[], aboutC: number): CorrectionFit {
  const n = points.length;
  if (n < 2) throw new RangeError(`a correction needs 2 points, got ${n}`);
  const xs = points.map(({ readingC }) => readingC - aboutC);
  const bs = points.map(({ readingC, referenceC }) => referenceC - readingC);
  const meanX = sum(xs) / n;
  const sxx = sum(xs.map((x) => (x - meanX) ** 2));
  const spanK = Math.max(...xs) - Math.min(...xs);
  if (!(spanK >= LEAST_SPAN_K)) throw new RangeError('the points are too near together');
  // Both results are sums of the differences with these weights; so are their variances.
  const slopeWeights = xs.map((x) => (x - meanX) / sxx);
  const interceptWeights = slopeWeights.map((weight) => 1 / n - weight * meanX);
  const interceptK = weighted(interceptWeights, bs);
  const slope = weighted(slopeWeights, bs);
  if (!Number.isFinite(interceptK + slope)) throw new RangeError('a point is not finite');

  const squares = sum(bs.map((b, i) => (b - interceptK - slope * xs[i]!) ** 2));
  const residualSdK = n > 2 ? Math.sqrt(squares / (n - 2)) : null;
  const ownSquares = points.map(({ ownErrorK }) => ownErrorK ** 2);
  const scatters = residualSdK !== null && residualSdK ** 2 > sum(ownSquares) / n;
  const variances = scatters ? bs.map(() => residualSdK ** 2) : ownSquares;
  return {
    correction: {
      aboutC,
      interceptK,
      slope,
      ...errorsOf(interceptWeights, slopeWeights, variances),
    },
    degrees: scatters ? n - 2 : Infinity,
    residualSdK,
  };
}

/** Variances and covariance of two weighted sums of independent differences (JCGM 100:2008, H.3.2). */
function errorsOf(intercept: number[], slope: number[], variances: number[]) {
  const interceptErrorK = Math.sqrt(sum(variances.map((v, i) => v * intercept[i]! ** 2)));
  const slopeError = Math.sqrt(sum(variances.map((v, i) => v * slope[i]! ** 2)));
  const covariance = sum(variances.map((v, i) => v * intercept[i]! * slope[i]!));
  const product = interceptErrorK * slopeError;
  return { interceptErrorK, slopeError, correlation: product > 0 ? covariance / product : 0 };
}

function weighted(weights: number[], values: number[]): number {
  return sum(values.map((value, i) => weights[i]! * value));
}

function sum(values: number[]): number {
  return values.reduce((total, value) => total + value, 0);
}
