// Growth and positive vector of a small irreducible nonnegative matrix.
import { factorShifted, solveShifted } from './shifted.ts';
import type { DenseMatrix } from './sparse.ts';

export interface PositivePair {
  readonly growthRate: number;
  /** Positive, sums to 1. */
  readonly vector: Float64Array;
}

/**
 * Noda's iteration (Noda 1971): with x > 0 and σ = max (Bx)ᵢ/xᵢ, which is never below the growth ρ, solve (σI − B)y = x and
 * take y for x. Stays positive, converges quadratically from any positive start and does not mind periods.
 * Ends when the smallest and the largest (Bx)ᵢ/xᵢ, which enclose ρ, agree. Cost: n³/3 a round, about ten rounds.
 */
export function positivePair(b: DenseMatrix, start?: Float64Array): PositivePair {
  const n = b.rows;
  let x = toShares(start ?? new Float64Array(n).fill(1));
  let found = enclose(b, x);
  for (let round = 0; round < 200 && found.high - found.low > 4e-16 * found.high; round++) {
    const factored = factorShifted(b, found.high);
    if (!factored) break;
    const y = toShares(solveShifted(factored, x));
    if (!y.every((value) => value > 0)) break;
    const next = enclose(b, y);
    const better = next.high - next.low < found.high - found.low;
    if (!better && round > 60) break;
    if (!better && found.high - found.low < 1e-11 * found.high) break;
    [x, found] = [y, next];
  }
  return { growthRate: (found.low + found.high) / 2, vector: x };
}

function enclose(b: DenseMatrix, x: Float64Array): { readonly low: number; readonly high: number } {
  const n = b.rows;
  let low = Infinity;
  let high = 0;
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let j = 0; j < n; j++) sum += (b.values[i * n + j] ?? 0) * (x[j] ?? 0);
    const ratio = sum / (x[i] ?? 0);
    low = Math.min(low, ratio);
    high = Math.max(high, ratio);
  }
  return { low, high };
}

/** Divided by its sum. */
export function toShares(x: Float64Array): Float64Array {
  let sum = 0;
  for (const value of x) sum += value;
  return x.map((value) => value / sum);
}
