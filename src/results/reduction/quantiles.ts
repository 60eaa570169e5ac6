// Quantiles of many cells at once: from all values where the request is small, from sketches where it is large. Which of the
// two is decided by the request alone, so that the same request gives the same bytes on any machine.
import type { Quantiles } from '../results.ts';
import { ExactValues } from './exact.ts';
import { Sketches } from './sketch.ts';
import type { QuantileStore } from './store.ts';

/** As many values as are kept one by one: 64 MB. */
export const mostExactValues = 1 << 24;

export function isExact(cells: number, replicates: number): boolean {
  return cells * replicates <= mostExactValues;
}

/** `replicates` is the largest number that can come. */
export function openQuantiles(cells: number, replicates: number): QuantileStore {
  return isExact(cells, replicates) ? new ExactValues(cells, replicates) : new Sketches(cells, replicates);
}

/** Smallest value that at least the given share of the n runs does not exceed. */
export function quantilesOf(store: QuantileStore, cell: number, n: number): Quantiles {
  const rank = (share: number): number => Math.max(0, Math.ceil(share * n - 1e-9) - 1);
  const [a = 0, b = 0, c = 0, d = 0, e = 0] = store.at(cell, [0.05, 0.25, 0.5, 0.75, 0.95].map(rank));
  return { '0.05': a, '0.25': b, '0.5': c, '0.75': d, '0.95': e };
}
