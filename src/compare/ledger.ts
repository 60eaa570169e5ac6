// What is kept of every future of a plan, so that it can be set beside the same future of another plan.
import { firstHandledColumn } from '../compile/image/count.ts';
import { isHandling } from '../compile/image/handling.ts';
import { lanes } from '../kernel/batch.ts';
import type { BatchCounts } from '../kernel/output.ts';
import type { Model } from '../model/model.ts';
import { handledParts } from '../results/reduction/handled.ts';
import type { HandledAnimals, MoneyOf } from './plan.ts';

/** Each by future. */
export class Ledger {
  /** 1 where the run came to its end. */
  readonly ended: Uint8Array;
  /** Animals at the last count. */
  readonly last: Float64Array;
  /** Animals taken over all years. */
  readonly taken: Float64Array;
  readonly presentValue: Float64Array;
  readonly undiscounted: Float64Array;
  /** Present value at the least and the most of prices that are ranges. */
  readonly least: Float64Array;
  readonly most: Float64Array;
  readonly #model: Model;
  readonly #takes: readonly number[];
  readonly #columns: number;
  readonly #firstHandled: number;

  constructor(model: Model, futures: number) {
    this.#model = model;
    this.ended = new Uint8Array(futures);
    this.last = new Float64Array(futures);
    this.taken = new Float64Array(futures);
    this.presentValue = new Float64Array(futures);
    this.undiscounted = new Float64Array(futures);
    this.least = new Float64Array(futures);
    this.most = new Float64Array(futures);
    const handling = model.phases.filter(isHandling);
    this.#takes = handling.flatMap(({ kind }, h) => (kind === 'take' ? [h] : []));
    this.#firstHandled = firstHandledColumn(model);
    this.#columns = this.#firstHandled + handling.length * handledParts.length;
  }

  /** `first` is the place of lane 0 among all futures. */
  take(batch: BatchCounts, first: number, moneyOf: MoneyOf | null): void {
    const gone = new Set(batch.stopped.map(({ replicate }) => replicate - batch.first));
    const { steps } = this.#model;
    const at = (t: number, column: number, lane: number): number =>
      batch.counts[(t * this.#columns + column) * lanes + lane] ?? 0;
    for (let lane = 0; lane < batch.lanes; lane++) {
      if (gone.has(lane)) continue;
      const future = first + lane;
      const handled: HandledAnimals = (phase, step) => at(step, this.#firstHandled + phase * handledParts.length, lane);
      this.ended[future] = 1;
      this.last[future] = at(steps, 0, lane);
      let taken = 0;
      for (const h of this.#takes) for (let t = 1; t <= steps; t++) taken += handled(h, t);
      this.taken[future] = taken;
      if (moneyOf === null) continue;
      const { presentValue, undiscounted, least, most } = moneyOf(handled);
      this.presentValue[future] = presentValue;
      this.undiscounted[future] = undiscounted;
      this.least[future] = least;
      this.most[future] = most;
    }
  }

  get takes(): boolean {
    return this.#takes.length > 0;
  }
}
