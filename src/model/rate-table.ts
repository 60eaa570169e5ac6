// Numbers by patch and class that may change with the years.

/** One number a patch and class, at p * classes + c, for each stretch of steps in which it is constant. */
export interface RateTable {
  readonly epochs: readonly Float64Array[];
  /** Index into `epochs` for step t (1-based) at t - 1; empty where there is one epoch. */
  readonly epochOf: Int32Array;
  /** For each number of a table what it was written as, where that is an expression. */
  readonly written?: readonly (WrittenNumber | null)[];
}

export interface WrittenNumber {
  readonly expression: number | string;
  readonly path: readonly (string | number)[];
  readonly what: string;
}

/** One C×C matrix a patch, at p * C * C + to * C + from. */
export type PatchMatrices = RateTable;
