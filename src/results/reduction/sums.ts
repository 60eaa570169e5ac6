// Sums of whole numbers and of their squares, one pair a cell: exact, so the order in which they come changes nothing.

/** Squares are summed in three whole parts, so that no sum is ever rounded up to a million runs of a billion animals. */
const half = 65536;

export interface Moments {
  readonly mean: number;
  /** With n − 1; NaN, which is written as missing, where a single value has no spread. */
  readonly sd: number;
}

export class Sums {
  /** Of value = high · 65536 + low in cell i: Σ value, Σ high², Σ high · low, Σ low², at 4 i and after. */
  readonly #parts: Float64Array;

  constructor(cells: number) {
    this.#parts = new Float64Array(cells * 4);
  }

  /** Of `count` values from `from` on. */
  add(cell: number, values: Float64Array, from: number, count: number): void {
    let [sum, squares, largest] = [0, 0, 0];
    for (let i = from; i < from + count; i++) {
      const value = values[i] ?? 0;
      sum += value;
      squares += value * value;
      if (value > largest) largest = value;
    }
    if (largest >= half) this.#addLarge(cell, values, from, count);
    else {
      const [parts, at] = [this.#parts, cell * 4];
      parts[at] = (parts[at] ?? 0) + sum;
      parts[at + 3] = (parts[at + 3] ?? 0) + squares;
    }
  }

  #addLarge(cell: number, values: Float64Array, from: number, count: number): void {
    let [sum, highs, mixed, lows] = [0, 0, 0, 0];
    for (let i = from; i < from + count; i++) {
      const value = values[i] ?? 0;
      const high = Math.floor(value / half);
      const low = value - high * half;
      sum += value;
      highs += high * high;
      mixed += high * low;
      lows += low * low;
    }
    const [parts, at] = [this.#parts, cell * 4];
    parts[at] = (parts[at] ?? 0) + sum;
    parts[at + 1] = (parts[at + 1] ?? 0) + highs;
    parts[at + 2] = (parts[at + 2] ?? 0) + mixed;
    parts[at + 3] = (parts[at + 3] ?? 0) + lows;
  }

  moments(cell: number, n: number): Moments {
    const [sum = 0, highs = 0, mixed = 0, lows = 0] = this.#parts.subarray(cell * 4, cell * 4 + 4);
    const mean = sum / n;
    const squares = highs * half * half + 2 * mixed * half + lows;
    const variance = n < 2 ? NaN : Math.max(0, squares - sum * mean) / (n - 1);
    return { mean, sd: Math.sqrt(variance) };
  }
}
