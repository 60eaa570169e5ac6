// What the kernel gives back, before any statistics.

/** A replicate that the kernel had to stop. Its counts are 0 from that step on. */
export interface Stop {
  readonly replicate: number;
  readonly step: number;
  readonly reason: string;
}

/** Up to sixteen replicates that ran side by side, as they were counted. */
export interface BatchCounts {
  /** Position of lane 0 among the replicates of the run. */
  readonly first: number;
  readonly lanes: number;
  /**
   * Animals (weighted sums for outcomes) at count t (0 is the start) of column k in lane l, at (t * columns + k) * 16 + l.
   * Column 0 is the whole, then each patch, then each outcome.
   */
  readonly counts: Float64Array<ArrayBuffer>;
  readonly stopped: readonly Stop[];
  /** Null where it was not asked for. */
  readonly moved: Moved | null;
}

/** The path without chance: animals at count t, at (t * P + p) * C + c. */
export interface RawPath {
  readonly steps: number;
  readonly animals: Float64Array;
}

/**
 * Animals that arrived over each way in each step, all classes together and summed over the replicates (those stopped later
 * included), at (t - 1) * ways + w. The ways are those of the movements of the landscape, one dispersal after the other in
 * the order of the phases, each in the order of its `destinations`.
 */
export interface Moved {
  readonly ways: number;
  readonly animals: Float64Array<ArrayBuffer>;
}
