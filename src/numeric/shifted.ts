// Solves (σI − B)x = b for a nonnegative matrix B whose growth is below σ, without cancellation off the diagonal.
import type { DenseMatrix } from './sparse.ts';

/**
 * Elimination of σI − B. Such a matrix needs no row exchanges: off the diagonal only numbers of one sign are added, so
 * every entry keeps its relative accuracy. Null where a pivot is not positive: σ is not above the growth of B.
 */
export interface ShiftedFactor {
  readonly n: number;
  readonly lu: Float64Array;
}

/** Cost n³/3 at most; zeros are skipped. */
export function factorShifted(b: DenseMatrix, shift: number): ShiftedFactor | null {
  const n = b.rows;
  const a = b.values.map((value) => -value);
  for (let i = 0; i < n; i++) a[i * n + i] = shift - (b.values[i * n + i] ?? 0);
  for (let k = 0; k < n; k++) {
    const pivot = a[k * n + k] ?? 0;
    if (!(pivot > 0)) return null;
    for (let i = k + 1; i < n; i++) {
      const ratio = (a[i * n + k] ?? 0) / pivot;
      if (ratio === 0) continue;
      a[i * n + k] = ratio;
      for (let j = k + 1; j < n; j++) a[i * n + j] = (a[i * n + j] ?? 0) - ratio * (a[k * n + j] ?? 0);
    }
  }
  return { n, lu: a };
}

export function solveShifted({ n, lu }: ShiftedFactor, b: Float64Array): Float64Array {
  const x = b.slice();
  for (let i = 0; i < n; i++) {
    let sum = x[i] ?? 0;
    for (let j = 0; j < i; j++) sum -= (lu[i * n + j] ?? 0) * (x[j] ?? 0);
    x[i] = sum;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = x[i] ?? 0;
    for (let j = i + 1; j < n; j++) sum -= (lu[i * n + j] ?? 0) * (x[j] ?? 0);
    x[i] = sum / (lu[i * n + i] ?? 0);
  }
  return x;
}
