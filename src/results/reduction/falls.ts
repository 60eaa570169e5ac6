// Who fell below a threshold, and when first: by replicate, over counts 1 to the last. Below is strict.

export interface FallsShape {
  readonly below: number;
  readonly steps: number;
  /** The largest number of replicates that can come. */
  readonly replicates: number;
}

export class Falls {
  readonly #below: number;
  /** Of each replicate the first count below; 0 for none, and for those that did not come. */
  readonly first: Int32Array;
  /** Runs that are below at count t, and that were below first at count t. */
  readonly belowAt: Uint32Array;
  readonly firstAt: Uint32Array;

  constructor({ below, steps, replicates }: FallsShape) {
    this.#below = below;
    this.first = new Int32Array(replicates);
    this.belowAt = new Uint32Array(steps + 1);
    this.firstAt = new Uint32Array(steps + 1);
  }

  add(step: number, replicate: number, value: number): void {
    if (!(value < this.#below)) return;
    this.belowAt[step] = (this.belowAt[step] ?? 0) + 1;
    if (this.first[replicate] !== 0) return;
    this.first[replicate] = step;
    this.firstAt[step] = (this.firstAt[step] ?? 0) + 1;
  }
}
