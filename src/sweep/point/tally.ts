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

/** Number, sum and sum of squares of what is asked of the finished runs. */
interface Sum {
  readonly n: number;
  readonly sum: number;
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
    const half = (): Half => new Half(model, ofRuns, { moneyOf, futures: this.#futures });
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

  /** Value, standard error, first half, second half of a quantity; NaN where no run was finished. */
  numbersOf(quantity: Quantity): readonly [number, number, number, number] {
    const [first, second] = [this.#halves[0].sumOf(quantity), this.#halves[1].sumOf(quantity)];
    const n = first.n + second.n;
    const mean = (first.sum + second.sum) / n;
    const spread = Math.max(0, (first.squares + second.squares) / n - mean * mean);
    return [mean, Math.sqrt(spread / n), first.sum / first.n, second.sum / second.n];
  }
}

interface HalfOptions {
  readonly moneyOf: MoneyOf | null;
  readonly futures: ReadonlyMap<string, Float64Array>;
}

class Half {
  readonly #model: Model;
  readonly #quantities: readonly Quantity[];
  readonly #futures: ReadonlyMap<string, Float64Array>;
  /** By outcome; null where no quantity asks for it. */
  readonly #hits: readonly (Hits | null)[];
  /** By quantity that is no chance. */
  readonly #sums: ReadonlyMap<string, { sum: number; squares: number }>;
  readonly #moneyOf: MoneyOf | null;
  readonly #firstHandled: number;
  #runs = 0;

  constructor(model: Model, quantities: readonly Quantity[], { moneyOf, futures }: HalfOptions) {
    const { steps, replicates, outcomes } = model;
    this.#model = model;
    this.#quantities = quantities;
    this.#futures = futures;
    this.#moneyOf = moneyOf;
    this.#firstHandled = firstHandledColumn(model);
    this.#hits = outcomes.map(({ event, counts }, k) =>
      quantities.some(({ outcome }) => outcome === k) ? new Hits({ event, counts, steps, replicates }) : null,
    );
    const others = quantities.filter(({ outcome }) => outcome === undefined);
    this.#sums = new Map(others.map(({ measure }) => [measure, { sum: 0, squares: 0 }]));
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
      sums.sum += value;
      sums.squares += value * value;
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
      return { n: this.#runs, ...(this.#sums.get(measure) ?? { sum: NaN, squares: NaN }) };
    const came = measure === 'chance' ? hits.firstAt.reduce((sum, runs) => sum + runs, 0) : (hits.nowAt.at(-1) ?? 0);
    return { n: this.#runs, sum: came, squares: came };
  }
}
