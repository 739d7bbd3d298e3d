/** Σ c_i x^i by Horner's rule; coefficients from the lowest power up. */
export function polynomial(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) sum = sum * x + coefficients[i]!;
  return sum;
}

/** Derivative of the same polynomial at x. */
export function polynomialSlope(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let i = coefficients.length - 1; i >= 1; i--) sum = sum * x + i * coefficients[i]!;
  return sum;
}
