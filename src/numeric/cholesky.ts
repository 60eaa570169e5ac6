// Square roots of covariance and correlation matrices.
import type { DenseMatrix } from './sparse.ts';

/**
 * Lower triangular L with L Lᵀ = A for a symmetric A that may be singular but not indefinite. A pivot within `tolerance` of 0
 * (relative to the largest diagonal entry) gives a column of zeros. Null where A has a clearly negative direction.
 * Cost n³/6.
 */
export function cholesky(matrix: DenseMatrix, tolerance = 1e-12): DenseMatrix | null {
  const n = matrix.rows;
  const lower = new Float64Array(n * n);
  const largest = diagonalOf(matrix).reduce((high, value) => Math.max(high, value), 0);
  const rest = (i: number, j: number): number => {
    let sum = matrix.values[i * n + j] ?? 0;
    for (let k = 0; k < j; k++) sum -= (lower[i * n + k] ?? 0) * (lower[j * n + k] ?? 0);
    return sum;
  };
  for (let j = 0; j < n; j++) {
    const pivot = rest(j, j);
    if (!(pivot >= -tolerance * largest)) return null;
    const flat = pivot <= tolerance * largest;
    const root = flat ? 0 : Math.sqrt(pivot);
    lower[j * n + j] = root;
    for (let i = j + 1; i < n; i++) {
      const value = rest(i, j);
      if (flat && Math.abs(value) > Math.sqrt(tolerance) * largest) return null;
      lower[i * n + j] = flat ? 0 : value / root;
    }
  }
  return { rows: n, columns: n, values: lower };
}

export function diagonalOf(matrix: DenseMatrix): Float64Array {
  return Float64Array.from({ length: matrix.rows }, (_, i) => matrix.values[i * matrix.columns + i] ?? 0);
}
