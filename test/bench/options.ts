// What is asked of the benches, and what they give.

export interface Options {
  /** Less work, for a look: noisier. */
  readonly quick: boolean;
  readonly rounds: number;
}

/** Times of several ways to the same answer. */
export interface Comparison {
  readonly name: string;
  /** Patch × class × year × replicate, or matrices. */
  readonly cells: number;
  /** Processor seconds, medians; `skein` is ours. */
  readonly seconds: Readonly<Record<string, number>>;
  /** How they agreed on the answer. */
  readonly agreement: readonly string[];
  /** Ratios to ours that are the least. */
  readonly floors?: Readonly<Record<string, number>>;
}
