// What is kept of counts of animals (or of patches), cell by cell: moments and quantiles.
import type { Quantiles } from '../results.ts';
import { isExact, openQuantiles, quantilesOf } from './quantiles.ts';
import type { QuantileStore } from './store.ts';
import { Sums, type Moments } from './sums.ts';

export class Counts {
  readonly exact: boolean;
  readonly #sums: Sums;
  readonly #quantiles: QuantileStore;
  /** Runs that came with nobody there. */
  readonly #empty: Uint32Array;

  constructor(cells: number, replicates: number) {
    this.exact = isExact(cells, replicates);
    this.#sums = new Sums(cells);
    this.#quantiles = openQuantiles(cells, replicates);
    this.#empty = new Uint32Array(cells);
  }

  /** Of `count` values from `from` on. */
  add(cell: number, values: Float64Array, from: number, count: number): void {
    this.#sums.add(cell, values, from, count);
    this.#quantiles.add(cell, values, from, count);
    let empty = 0;
    for (let i = from; i < from + count; i++) if (values[i] === 0) empty++;
    this.#empty[cell] = (this.#empty[cell] ?? 0) + empty;
  }

  /** Of n runs. */
  summary(cell: number, n: number): Moments & { readonly quantiles: Quantiles } {
    return { ...this.#sums.moments(cell, n), quantiles: quantilesOf(this.#quantiles, cell, n) };
  }

  empty(cell: number): number {
    return this.#empty[cell] ?? 0;
  }
}
