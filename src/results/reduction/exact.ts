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

  add(cell: number, values: Float64Array, from: number, count: number): void {
    const [own, filled] = [this.#values, this.#filled[cell] ?? 0];
    const start = cell * this.#replicates + filled;
    for (let i = 0; i < count; i++) own[start + i] = values[from + i] ?? 0;
    this.#filled[cell] = filled + count;
  }

  at(cell: number, ranks: readonly number[]): readonly number[] {
    const start = cell * this.#replicates;
    const values = this.#values.subarray(start, start + (this.#filled[cell] ?? 0));
    let lowest = Infinity;
    let highest = -Infinity;
    for (let i = 0; i < values.length; i++) {
      const value = values[i] ?? 0;
      if (value < lowest) lowest = value;
      if (value > highest) highest = value;
    }
    if (highest >= lowest && highest - lowest < few * values.length) return counted(values, { lowest, highest }, ranks);
    const sorted = values.slice().sort();
    return ranks.map((rank) => sorted[rank] ?? 0);
  }
}

/** Where values lie this close, counting how often each comes is quicker than sorting them. */
const few = 4;

function counted(
  values: Int32Array,
  { lowest, highest }: { readonly lowest: number; readonly highest: number },
  ranks: readonly number[],
): readonly number[] {
  const times = new Uint32Array(highest - lowest + 1);
  for (let i = 0; i < values.length; i++) {
    const at = (values[i] ?? 0) - lowest;
    times[at] = (times[at] ?? 0) + 1;
  }
  let [place, passed] = [0, times[0] ?? 0];
  return ranks.map((rank) => {
    if (rank >= values.length) return 0;
    while (passed <= rank) passed += times[++place] ?? 0;
    return lowest + place;
  });
}
