// What the measures need of the runs of a point, kept apart for the two halves of the replicates. Exact sums of whole numbers (of money as it comes):
// the same as those of a run with the same settings. Where plans are set beside each other, also what every future came to.
import { firstHandledColumn } from '../../compile/image/count.ts';
import type { MoneyOf } from '../../compare/plan.ts';
import { lanes } from '../../kernel/batch.ts';
import type { BatchCounts } from '../../kernel/output.ts';
import type { Model } from '../../model/model.ts';
import { handledParts } from '../../results/reduction/handled.ts';
import { Hits } from '../../results/reduction/hits.ts';
import { isOfRuns, type Quantity } from '../measures.ts';

const wholeColumn = 0;
const firstPatchColumn = 1;

/** What is asked of the finished runs. */
interface Sum {
  readonly n: number;
  readonly sum: number;
  /** Sums of the distances from the first value, and of their squares: of what is always the same both are 0. */
  readonly apart: number;
  readonly squares: number;
}

export interface TallyOptions {
  /** Of the plan; null where it costs nothing. */
  readonly moneyOf: MoneyOf | null;
  /** Whether what every future came to is kept. */
  readonly keepsFutures: boolean;
}

export class Tally {
  readonly #model: Model;
  readonly #halves: readonly [Half, Half];
  /** By name of the quantity. */
  readonly #futures: ReadonlyMap<string, Float64Array>;

  constructor(model: Model, quantities: readonly Quantity[], { moneyOf, keepsFutures }: TallyOptions) {
    this.#model = model;
    const ofRuns = quantities.filter(({ measure }) => isOfRuns(measure));
    const kept = keepsFutures ? ofRuns : [];
    this.#futures = new Map(kept.map(({ name }) => [name, new Float64Array(model.replicates).fill(NaN)]));
    const origins = new Map<string, number>();
    const half = (): Half => new Half(model, ofRuns, { moneyOf, futures: this.#futures, origins });
    this.#halves = [half(), half()];
  }

  /** By future; NaN for those that were stopped. */
  futuresOf({ name }: Quantity): Float64Array {
    const own = this.#futures.get(name);
    if (own === undefined) throw new RangeError(`The futures of ${name} were not kept.`);
    return own;
  }

  take(batch: BatchCounts): void {
    const stopped = new Set(batch.stopped.map(({ replicate }) => replicate - batch.first));
    const first = Math.floor(this.#model.replicates / 2);
    for (let lane = 0; lane < batch.lanes; lane++) {
      if (!stopped.has(lane)) this.#halves[batch.first + lane < first ? 0 : 1].take(batch, lane);
    }
  }

  /**
   * Value, standard error, first half, second half of a quantity; NaN where no run was finished, and the standard error of a mean of
   * one. That of a share p is √(p (1 − p) / n), that of a mean s / √n, s with n − 1.
   */
  numbersOf(quantity: Quantity): readonly [number, number, number, number] {
    const [first, second] = [this.#halves[0].sumOf(quantity), this.#halves[1].sumOf(quantity)];
    const n = first.n + second.n;
    const apart = first.apart + second.apart;
    const squares = Math.max(0, first.squares + second.squares - (apart * apart) / n);
    const freedom = quantity.outcome === undefined ? n - 1 : n;
    const error = Math.sqrt(squares / freedom / n);
    return [(first.sum + second.sum) / n, error, first.sum / first.n, second.sum / second.n];
  }
}

interface HalfOptions {
  readonly moneyOf: MoneyOf | null;
  readonly futures: ReadonlyMap<string, Float64Array>;
  /** The first value of each measure, of both halves. */
  readonly origins: Map<string, number>;
}

class Half {
  readonly #model: Model;
  readonly #quantities: readonly Quantity[];
  readonly #futures: ReadonlyMap<string, Float64Array>;
  /** By outcome; null where no quantity asks for it. */
  readonly #hits: readonly (Hits | null)[];
  /** By quantity that is no chance. */
  readonly #sums: ReadonlyMap<string, { sum: number; apart: number; squares: number }>;
  readonly #origins: Map<string, number>;
  readonly #moneyOf: MoneyOf | null;
  readonly #firstHandled: number;
  #runs = 0;

  constructor(model: Model, quantities: readonly Quantity[], { moneyOf, futures, origins }: HalfOptions) {
    const { steps, replicates, outcomes } = model;
    this.#model = model;
    this.#quantities = quantities;
    this.#futures = futures;
    this.#origins = origins;
    this.#moneyOf = moneyOf;
    this.#firstHandled = firstHandledColumn(model);
    this.#hits = outcomes.map(({ event, counts }, k) =>
      quantities.some(({ outcome }) => outcome === k) ? new Hits({ event, counts, steps, replicates }) : null,
    );
    const others = quantities.filter(({ outcome }) => outcome === undefined);
    this.#sums = new Map(others.map(({ measure }) => [measure, { sum: 0, apart: 0, squares: 0 }]));
  }

  take({ first, counts }: BatchCounts, lane: number): void {
    const { steps, patches } = this.#model;
    const columns = counts.length / (steps + 1);
    this.#runs++;
    this.#hits.forEach((hits, k) => {
      if (hits === null) return;
      const place = (firstPatchColumn + patches.length + k) * lanes + lane;
      const before = hits.nowAt[steps] ?? 0;
      for (let t = 0; t <= steps; t++) hits.add(t, first + lane, counts[t * columns + place] ?? 0);
      this.#keepHit(k, first + lane, {
        ever: (hits.first[first + lane] ?? 0) > 0,
        atEnd: hits.nowAt[steps] !== before,
      });
    });
    for (const [measure, sums] of this.#sums) {
      const value = this.#valueOf(measure, counts.subarray(lane), columns);
      const origin = this.#origins.get(measure) ?? value;
      this.#origins.set(measure, origin);
      const apart = value - origin;
      sums.sum += value;
      sums.apart += apart;
      sums.squares += apart * apart;
      this.#futures.get(measure)?.fill(value, first + lane, first + lane + 1);
    }
  }

  #keepHit(
    outcome: number,
    future: number,
    { ever, atEnd }: { readonly ever: boolean; readonly atEnd: boolean },
  ): void {
    if (this.#futures.size === 0) return;
    for (const { name, measure, outcome: own } of this.#quantities) {
      const values = own === outcome ? this.#futures.get(name) : undefined;
      if (values !== undefined) values[future] = (measure === 'chance' ? ever : atEnd) ? 1 : 0;
    }
  }

  /** Of one lane, whose numbers stand sixteen apart. */
  #valueOf(measure: string, counts: Float64Array, columns: number): number {
    const { steps, patches } = this.#model;
    const atEnd = (column: number): number => counts[steps * columns + column * lanes] ?? 0;
    if (measure === 'animals') return atEnd(wholeColumn);
    if (measure === 'patches-in-use') {
      return patches.reduce((used, _, p) => used + (atEnd(firstPatchColumn + p) > 0 ? 1 : 0), 0);
    }
    if (measure === 'cost') {
      const handled = (phase: number, step: number): number =>
        counts[step * columns + (this.#firstHandled + phase * handledParts.length) * lanes] ?? 0;
      return this.#moneyOf?.(handled).presentValue ?? 0;
    }
    let lowest = Infinity;
    for (let t = 0; t <= steps; t++) lowest = Math.min(lowest, counts[t * columns + wholeColumn * lanes] ?? 0);
    return lowest;
  }

  sumOf({ measure, outcome }: Quantity): Sum {
    const hits = outcome === undefined ? null : this.#hits[outcome];
    if (hits === null || hits === undefined)
      return { n: this.#runs, ...(this.#sums.get(measure) ?? { sum: NaN, apart: NaN, squares: NaN }) };
    const came = measure === 'chance' ? hits.firstAt.reduce((sum, runs) => sum + runs, 0) : (hits.nowAt.at(-1) ?? 0);
    return { n: this.#runs, sum: came, apart: came, squares: came };
  }
}
