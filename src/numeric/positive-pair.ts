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
 * Ends when the smallest and the largest (Bx)ᵢ/xᵢ, which enclose ρ, agree; where rounding keeps them apart, after
 * twelve rounds without progress. Cost: n³/3 a round, about ten rounds.
 */
export function positivePair(b: DenseMatrix, start?: Float64Array): PositivePair {
  let x = toShares(start ?? new Float64Array(b.rows).fill(1));
  let here = enclose(b, x);
  let [best, found] = [x, here];
  for (let round = 0, idle = 0; round < 200 && idle < 12 && found.width > 4e-16; round++) {
    const y = above(b, here.high, x);
    if (!y) break;
    x = y;
    here = enclose(b, x);
    idle = here.width < found.width * 0.99 || here.high < found.high * (1 - 1e-14) ? 0 : idle + 1;
    if (here.width <= found.width) [best, found] = [x, here];
  }
  return { growthRate: found.growthRate, vector: best };
}

/** The solution for a shift as little above `bound` as rounding allows; null where none is positive. */
function above(b: DenseMatrix, bound: number, x: Float64Array): Float64Array | null {
  for (const more of [0, 1e-15, 1e-14, 1e-13, 1e-12, 1e-10]) {
    const factored = factorShifted(b, bound * (1 + more));
    if (!factored) continue;
    const y = toShares(solveShifted(factored, x));
    if (y.every((value) => value > 0)) return y;
  }
  return null;
}

interface Enclosure {
  readonly high: number;
  /** Largest less smallest ratio, relative to the largest. */
  readonly width: number;
  /** Mean of the ratios, weighted by x. */
  readonly growthRate: number;
}

function enclose(b: DenseMatrix, x: Float64Array): Enclosure {
  const n = b.rows;
  let low = Infinity;
  let high = 0;
  let total = 0;
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let j = 0; j < n; j++) sum += (b.values[i * n + j] ?? 0) * (x[j] ?? 0);
    const ratio = sum / (x[i] ?? 0);
    low = Math.min(low, ratio);
    high = Math.max(high, ratio);
    total += sum;
  }
  return { high, width: (high - low) / high, growthRate: total };
}

/** Divided by its sum. */
export function toShares(x: Float64Array): Float64Array {
  let sum = 0;
  for (const value of x) sum += value;
  return x.map((value) => value / sum);
}
