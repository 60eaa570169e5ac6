// Who came to what an outcome asks for, and when first: by replicate, over counts 1 to the last.
import type { OutcomeEvent } from '../../model/model.ts';

/** What must be so, and at how many counts one after the other. */
export interface Asked {
  readonly event: OutcomeEvent;
  readonly counts: number;
}

export interface HitsShape extends Asked {
  readonly steps: number;
  /** The largest number of replicates that can come. */
  readonly replicates: number;
}

/** Shares of whole counts do not always come out whole. */
const rounding = 1e-9;

/** At most so many are left when those at the start have fallen by this share. */
export function leftAfterFall(start: number, by: number): number {
  return start * (1 - by) + start * rounding;
}

export class Hits {
  readonly #event: OutcomeEvent;
  readonly #counts: number;
  /** Of each replicate the first count at which it is so; 0 for none, and for those that did not come. */
  readonly first: Int32Array;
  /** Runs in which it is so at count t, and in which it is so first at count t. */
  readonly nowAt: Uint32Array;
  readonly firstAt: Uint32Array;
  /** Counts up to now at which it has been so, one after the other. */
  readonly #row: Int32Array;
  /** At most so many are left of those at the start when they have fallen; −1 where nobody was there. */
  readonly #left: Float64Array;

  constructor({ event, counts, steps, replicates }: HitsShape) {
    this.#event = event;
    this.#counts = counts;
    this.first = new Int32Array(replicates);
    this.nowAt = new Uint32Array(steps + 1);
    this.firstAt = new Uint32Array(steps + 1);
    this.#row = new Int32Array(counts > 1 ? replicates : 0);
    this.#left = new Float64Array(event.is === 'fallen' ? replicates : 0);
  }

  /** Count by count for each replicate; count 0 is the start, which has no part in it but to be compared with. */
  add(step: number, replicate: number, value: number): void {
    if (step === 0) this.#start(replicate, value);
    else if (this.#isSo(replicate, value)) this.#note(step, replicate);
    else if (this.#counts > 1) this.#row[replicate] = 0;
  }

  /** The same of many replicates: the value of each stands at its place from `from` on. */
  addAll(step: number, replicates: Int32Array, values: Float64Array, from: number): void {
    for (let i = 0; i < replicates.length; i++) this.add(step, replicates[i] ?? 0, values[from + i] ?? 0);
  }

  #start(replicate: number, value: number): void {
    if (this.#event.is !== 'fallen') return;
    this.#left[replicate] = value > 0 ? leftAfterFall(value, this.#event.by) : -1;
  }

  #isSo(replicate: number, value: number): boolean {
    const event = this.#event;
    if (event.is === 'below') return value < event.than;
    return event.is === 'above' ? value > event.than : value <= (this.#left[replicate] ?? 0);
  }

  #note(step: number, replicate: number): void {
    if (this.#counts > 1) {
      const row = (this.#row[replicate] ?? 0) + 1;
      this.#row[replicate] = row;
      if (row < this.#counts) return;
    }
    this.nowAt[step] = (this.nowAt[step] ?? 0) + 1;
    if (this.first[replicate] !== 0) return;
    this.first[replicate] = step;
    this.firstAt[step] = (this.firstAt[step] ?? 0) + 1;
  }
}
