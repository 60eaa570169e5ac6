// Dense linear systems by elimination with row exchanges.
import type { DenseMatrix } from './sparse.ts';

export interface Factored {
  /** Lower factor below the diagonal (unit diagonal), upper factor on and above it. */
  readonly lu: DenseMatrix;
  readonly rowOrder: Int32Array;
  readonly sign: 1 | -1;
}

/** P A = L U. Cost n³/3. Null where a pivot is exactly 0: the matrix is singular. */
export function factor(matrix: DenseMatrix): Factored | null {
  const n = matrix.rows;
  const a = matrix.values.slice();
  const rowOrder = Int32Array.from({ length: n }, (_, i) => i);
  let sign: 1 | -1 = 1;
  for (let k = 0; k < n; k++) {
    let best = k;
    for (let i = k + 1; i < n; i++) if (Math.abs(a[i * n + k] ?? 0) > Math.abs(a[best * n + k] ?? 0)) best = i;
    const pivot = a[best * n + k] ?? 0;
    if (pivot === 0) return null;
    if (best !== k) {
      exchangeRows(a, n, [k, best]);
      [rowOrder[k], rowOrder[best]] = [rowOrder[best] ?? 0, rowOrder[k] ?? 0];
      sign = sign === 1 ? -1 : 1;
    }
    for (let i = k + 1; i < n; i++) {
      const ratio = (a[i * n + k] ?? 0) / pivot;
      a[i * n + k] = ratio;
      if (ratio === 0) continue;
      for (let j = k + 1; j < n; j++) a[i * n + j] = (a[i * n + j] ?? 0) - ratio * (a[k * n + j] ?? 0);
    }
  }
  return { lu: { rows: n, columns: n, values: a }, rowOrder, sign };
}

function exchangeRows(a: Float64Array, n: number, [first, second]: readonly [number, number]): void {
  const kept = a.slice(first * n, first * n + n);
  a.copyWithin(first * n, second * n, second * n + n);
  a.set(kept, second * n);
}

/** x with A x = b. Cost n². */
export function solveFactored({ lu, rowOrder }: Factored, b: Float64Array): Float64Array {
  const n = lu.rows;
  const a = lu.values;
  const x = Float64Array.from(rowOrder, (row) => b[row] ?? 0);
  for (let i = 0; i < n; i++) {
    let sum = x[i] ?? 0;
    for (let j = 0; j < i; j++) sum -= (a[i * n + j] ?? 0) * (x[j] ?? 0);
    x[i] = sum;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = x[i] ?? 0;
    for (let j = i + 1; j < n; j++) sum -= (a[i * n + j] ?? 0) * (x[j] ?? 0);
    x[i] = sum / (a[i * n + i] ?? 0);
  }
  return x;
}

/** x with A x = b; null where A is singular. */
export function solveDense(matrix: DenseMatrix, b: Float64Array): Float64Array | null {
  const factored = factor(matrix);
  return factored && solveFactored(factored, b);
}

/** A⁻¹; null where A is singular. */
export function invertDense(matrix: DenseMatrix): DenseMatrix | null {
  const n = matrix.rows;
  const factored = factor(matrix);
  if (!factored) return null;
  const inverse = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    const unit = new Float64Array(n);
    unit[j] = 1;
    solveFactored(factored, unit).forEach((value, i) => (inverse[i * n + j] = value));
  }
  return { rows: n, columns: n, values: inverse };
}
