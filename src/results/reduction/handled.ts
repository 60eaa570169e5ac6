// What a take, a move or a release came to: by step and in all.
import { Counts } from './counts.ts';

/** Its columns in a batch, in order. */
export const handledParts = ['handled', 'died', 'shortfall'] as const;

/** Where the columns of the phase stand among the counts of a batch: part k of step t for the first `count` lanes. */
export interface HandledColumns {
  readonly counts: Float64Array;
  readonly place: (t: number, k: number) => number;
  readonly count: number;
}

export class HandledTotals {
  readonly #steps: number;
  /** Cell t − 1 of each part. */
  readonly byStep: readonly Counts[];
  /** One cell of each part: the sum over the steps. */
  readonly inAll: readonly Counts[];
  readonly #sums: Float64Array;

  constructor(steps: number, replicates: number, lanes: number) {
    this.#steps = steps;
    this.byStep = handledParts.map(() => new Counts(steps, replicates));
    this.inAll = handledParts.map(() => new Counts(1, replicates));
    this.#sums = new Float64Array(lanes);
  }

  take({ counts, place, count }: HandledColumns): void {
    handledParts.forEach((_, k) => {
      this.#sums.fill(0);
      for (let t = 1; t <= this.#steps; t++) {
        const at = place(t, k);
        this.byStep[k]?.add(t - 1, counts, at, count);
        for (let i = 0; i < count; i++) this.#sums[i] = (this.#sums[i] ?? 0) + (counts[at + i] ?? 0);
      }
      this.inAll[k]?.add(0, this.#sums, 0, count);
    });
  }
}
