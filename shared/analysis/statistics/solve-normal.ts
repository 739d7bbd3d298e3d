/**
 * Cholesky factor of a symmetric positive definite matrix.
 *
 * @param matrix n × n, row by row; only the lower half is read; left as it is
 * @returns lower triangular factor, row by row, or null where the matrix is not positive definite
 */
export function choleskyFactor(matrix: Float64Array, n: number): Float64Array | null {
  const factor = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = matrix[i * n + j]!;
      for (let k = 0; k < j; k++) sum -= factor[i * n + k]! * factor[j * n + k]!;
      if (i !== j) factor[i * n + j] = sum / factor[j * n + j]!;
      else if (!(sum > 0)) return null;
      else factor[i * n + i] = Math.sqrt(sum);
    }
  }
  return factor;
}

/** Solves `L·Lᵀ·x = right` for the factor of choleskyFactor; returns x, leaves `right` as it is. */
export function choleskySolve(factor: Float64Array, right: Float64Array, n: number): Float64Array {
  const x = Float64Array.from(right);
  for (let i = 0; i < n; i++) {
    let sum = x[i]!;
    for (let k = 0; k < i; k++) sum -= factor[i * n + k]! * x[k]!;
    x[i] = sum / factor[i * n + i]!;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = x[i]!;
    for (let k = i + 1; k < n; k++) sum -= factor[k * n + i]! * x[k]!;
    x[i] = sum / factor[i * n + i]!;
  }
  return x;
}

/** `√(gᵀ·M⁻¹·g)`: standard error of a quantity with gradient g, M the normal matrix behind `factor`. */
export function gradientError(factor: Float64Array, gradient: Float64Array, n: number): number {
  const x = Float64Array.from(gradient);
  let square = 0;
  for (let i = 0; i < n; i++) {
    let sum = x[i]!;
    for (let k = 0; k < i; k++) sum -= factor[i * n + k]! * x[k]!;
    x[i] = sum / factor[i * n + i]!;
    square += x[i]! * x[i]!;
  }
  return Math.sqrt(square);
}
