// What the kernel gives back, before any statistics.

/** Integer totals of one run, independent of the order in which batches arrive. */
export interface RawRun {
  readonly replicates: number;
  readonly steps: number;
  /** Names what column k of `counts` holds: the whole, then each patch, then each outcome. */
  readonly columns: number;
  /** Animals (weighted sums for outcomes) at count t (0 is the start) of column k in replicate r, at (t * columns + k) * replicates + r. */
  readonly counts: Float64Array;
  /** Replicates that the kernel had to stop, with why. Their counts are 0 from the step in which they were stopped. */
  readonly stopped: readonly { readonly replicate: number; readonly step: number; readonly reason: string }[];
  readonly moved?: Moved;
}

/** The path without chance: animals at count t, at (t * P + p) * C + c. */
export interface RawPath {
  readonly steps: number;
  readonly animals: Float64Array;
  readonly moved?: Moved;
}

/**
 * Animals that arrived over each way in each step, all classes together and summed over the replicates (those stopped later
 * included), at (t - 1) * ways + w. The ways are those of the movements of the landscape, one dispersal after the other in
 * the order of the phases, each in the order of its `destinations`.
 */
export interface Moved {
  readonly ways: number;
  readonly animals: Float64Array;
}
