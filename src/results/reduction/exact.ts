// All values of many cells, one by one: for requests that are small enough.
import type { QuantileStore } from './store.ts';

export class ExactValues implements QuantileStore {
  readonly #replicates: number;
  /** Values of cell i from i · replicates on, in the order in which they came. */
  readonly #values: Int32Array;
  readonly #filled: Int32Array;

  constructor(cells: number, replicates: number) {
    this.#replicates = replicates;
    this.#values = new Int32Array(cells * replicates);
    this.#filled = new Int32Array(cells);
  }

  add(cell: number, values: Float64Array, count: number): void {
    const filled = this.#filled[cell] ?? 0;
    const start = cell * this.#replicates + filled;
    for (let i = 0; i < count; i++) this.#values[start + i] = values[i] ?? 0;
    this.#filled[cell] = filled + count;
  }

  at(cell: number, ranks: readonly number[]): readonly number[] {
    const start = cell * this.#replicates;
    const sorted = this.#values.slice(start, start + (this.#filled[cell] ?? 0)).sort();
    return ranks.map((rank) => sorted[rank] ?? 0);
  }
}
