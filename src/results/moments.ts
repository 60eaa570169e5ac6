// Mean, standard deviation and quantiles of whole numbers, exact whatever the order in which they came.
import type { Quantiles } from './results.ts';

/** Squares are summed in three whole parts, so that no sum is ever rounded up to a million runs of a billion animals. */
const half = 65536;

export interface Moments {
  readonly mean: number;
  /** With n − 1; 0 for a single value. */
  readonly sd: number;
}

export function momentsOf(values: Float64Array): Moments {
  const n = values.length;
  let [sum, highs, mixed, lows] = [0, 0, 0, 0];
  for (const value of values) {
    const high = Math.floor(value / half);
    const low = value - high * half;
    sum += value;
    highs += high * high;
    mixed += high * low;
    lows += low * low;
  }
  const mean = sum / n;
  const squares = highs * half * half + 2 * mixed * half + lows;
  const variance = n < 2 ? 0 : Math.max(0, squares - sum * mean) / (n - 1);
  return { mean, sd: Math.sqrt(variance) };
}

/** Smallest value that at least the given share of the runs does not exceed: always a count that some run had. */
export function quantilesOf(values: Float64Array): Quantiles {
  const sorted = values.toSorted();
  const at = (share: number): number => sorted[Math.max(0, Math.ceil(share * sorted.length - 1e-9) - 1)] ?? 0;
  return { '0.05': at(0.05), '0.25': at(0.25), '0.5': at(0.5), '0.75': at(0.75), '0.95': at(0.95) };
}
