/** Lanczos' coefficients for g = 7 and nine terms. */
const LANCZOS = [
  0.9999999999998099, 676.5203681218851, -1259.1392167224028, 771.3234287776531, -176.6150291621406,
  12.507343278686905, -0.13857109526572012, 9.984369578019572e-6, 1.5056327351493116e-7,
];

/**
 * Quantile of Student's t distribution.
 *
 * @param probability above 0 and below 1
 * @param degrees degrees of freedom, above 0
 * @throws {RangeError} an argument is out of its range
 */
export function studentTQuantile(probability: number, degrees: number): number {
  if (!(probability > 0 && probability < 1)) throw new RangeError('probability must lie in 0 to 1');
  if (!(degrees > 0)) throw new RangeError('degrees of freedom must be positive');
  if (probability < 0.5) return -studentTQuantile(1 - probability, degrees);
  let low = 0;
  let high = 2;
  while (studentTProbability(high, degrees) < probability && high < 1e9) high *= 2;
  for (let i = 0; i < 80; i++) {
    const middle = (low + high) / 2;
    if (studentTProbability(middle, degrees) < probability) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** Probability that Student's t with `degrees` degrees of freedom is at most `t`. */
export function studentTProbability(t: number, degrees: number): number {
  const tail = 0.5 * incompleteBeta(degrees / (degrees + t * t), degrees / 2, 0.5);
  return t > 0 ? 1 - tail : tail;
}

/**
 * Probability that an F-distributed ratio of variances is at least `ratio`: the p-value of an F test.
 *
 * @param above degrees of freedom of the numerator
 * @param below degrees of freedom of the denominator
 */
export function fTail(ratio: number, above: number, below: number): number {
  if (!(ratio > 0)) return 1;
  return incompleteBeta(below / (below + above * ratio), below / 2, above / 2);
}

/** Regularised incomplete beta function I_x(a, b), by Lentz's continued fraction (DLMF 8.17.22). */
function incompleteBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  const front = Math.exp(
    logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x),
  );
  if (x < (a + 1) / (a + b + 2)) return (front * betaFraction(x, a, b)) / a;
  return 1 - (front * betaFraction(1 - x, b, a)) / b;
}

function betaFraction(x: number, a: number, b: number): number {
  const tiny = 1e-300;
  let c = 1;
  let d = 1 / nonZero(1 - ((a + b) * x) / (a + 1), tiny);
  let value = d;
  for (let m = 1; m < 400; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / nonZero(1 + even * d, tiny);
    c = nonZero(1 + even / c, tiny);
    value *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / nonZero(1 + odd * d, tiny);
    c = nonZero(1 + odd / c, tiny);
    value *= d * c;
    if (Math.abs(d * c - 1) < 1e-15) break;
  }
  return value;
}

function nonZero(value: number, tiny: number): number {
  return Math.abs(value) < tiny ? tiny : value;
}

/** ln Γ(x) for x > 0, Lanczos' approximation; relative error about 1e-15. */
function logGamma(x: number): number {
  let sum = LANCZOS[0]!;
  for (let i = 1; i < LANCZOS.length; i++) sum += LANCZOS[i]! / (x - 1 + i);
  const base = x + 6.5;
  return 0.5 * Math.log(2 * Math.PI) + (x - 0.5) * Math.log(base) - base + Math.log(sum);
}
