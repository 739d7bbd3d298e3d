const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);

/**
 * Probability that a standard normal variable is at most `z`.
 *
 * Near the middle the Taylor series about zero, in the tails Laplace's continued fraction, so that
 * small probabilities keep their digits too.
 *
 * @param z standard deviations from the mean; infinities are allowed
 * @returns 0 to 1, good to about 1e-15 absolute and 1e-12 relative
 * @see G. Marsaglia, Evaluating the Normal Distribution, J. Stat. Software 11(4), 2004
 */
export function normalProbability(z: number): number {
  if (Number.isNaN(z)) throw new RangeError('z is not a number');
  if (z > 4) return 1 - upperTail(z);
  if (z < -4) return upperTail(-z);
  let sum = z;
  let term = z;
  for (let k = 3; Math.abs(term) > 1e-17 * Math.abs(sum); k += 2) {
    term *= (z * z) / k;
    sum += term;
  }
  return 0.5 + (sum * Math.exp((-z * z) / 2)) / ROOT_TWO_PI;
}

/**
 * Probability that a normal variable lies between two limits (JCGM 106:2012, 7.2 to 7.4).
 *
 * @param value best estimate
 * @param standardU standard uncertainty, same unit; 0 means that the value is known exactly
 * @param low lower limit, -Infinity where there is none
 * @param high upper limit, Infinity where there is none
 */
export function probabilityBetween(
  value: number,
  standardU: number,
  low: number,
  high: number,
): number {
  if (!(standardU > 0)) return value >= low && value <= high ? 1 : 0;
  const below = (low - value) / standardU;
  const above = (high - value) / standardU;
  // Both limits on one side: the difference of two small tails keeps its digits, that of two ones does not.
  if (below > 0) return normalProbability(-below) - normalProbability(-above);
  return normalProbability(above) - normalProbability(below);
}

/** P(Z > z) for z > 4. */
function upperTail(z: number): number {
  let fraction = z;
  for (let k = 60; k > 0; k--) fraction = z + k / fraction;
  return Math.exp((-z * z) / 2) / ROOT_TWO_PI / fraction;
}
