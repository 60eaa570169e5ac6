// Where the values of many cells go and what can be asked of them.

export interface QuantileStore {
  /** `count` values from `from` on. */
  add(cell: number, values: Float64Array, from: number, count: number): void;
  /** The values of these ranks (0 is the lowest) in the order of size; ranks ascend. */
  at(cell: number, ranks: readonly number[]): readonly number[];
}
