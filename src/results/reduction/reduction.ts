// Reduces a run batch by batch to totals whose order does not matter: any number of threads gives the same bytes, and memory
// does not grow with the counts of all replicates. Runs that the kernel had to stop are left out of every number.
import { lanes } from '../../kernel/batch.ts';
import type { BatchCounts, Stop } from '../../kernel/output.ts';
import { Counts } from './counts.ts';
import { handledParts, HandledTotals } from './handled.ts';
import { Hits, type Asked } from './hits.ts';
import { Sums, type Moments } from './sums.ts';

export interface ReductionShape {
  readonly patches: number;
  readonly steps: number;
  /** The largest number of replicates that can come. */
  readonly replicates: number;
  readonly outcomes: readonly Asked[];
  /** Counts that are kept to be compared with those of the past; none where it is missing. */
  readonly watched?: number;
  /** Takes, moves and releases of the model. */
  readonly handled: number;
}

/** Columns of a batch: the whole, then each patch, then each outcome, then what is watched, then those of what people do with animals. */
const wholeColumn = 0;
const firstPatchColumn = 1;

export class Reduction {
  readonly shape: ReductionShape;
  /** Cell t. */
  readonly whole: Counts;
  /** Cell t * patches + p. */
  readonly patches: Counts;
  /** Patches with at least one animal; cell t. */
  readonly inUse: Counts;
  readonly hits: readonly Hits[];
  /** Cell w * (steps + 1) + t; null where nothing is watched. */
  readonly watched: Counts | null;
  readonly handled: readonly HandledTotals[];
  /** Of each replicate the lowest count of all animals, the start included; −1 for those that did not come or were stopped. */
  readonly lowest: Int32Array;
  readonly #lowest = new Sums(1);
  readonly #stopped: Stop[] = [];
  #runs = 0;
  readonly #values = new Float64Array(lanes);
  readonly #used = new Float64Array(lanes);

  constructor(shape: ReductionShape) {
    const { patches, steps, replicates, outcomes, watched = 0, handled } = shape;
    this.shape = shape;
    this.whole = new Counts(steps + 1, replicates);
    this.patches = new Counts((steps + 1) * patches, replicates);
    this.inUse = new Counts(steps + 1, replicates);
    this.hits = outcomes.map(({ event, counts }) => new Hits({ event, counts, steps, replicates }));
    this.watched = watched === 0 ? null : new Counts((steps + 1) * watched, replicates);
    this.handled = Array.from({ length: handled }, () => new HandledTotals(steps, replicates, lanes));
    this.lowest = new Int32Array(replicates).fill(-1);
  }

  /** Finished runs so far, the stopped ones not counted. */
  get runs(): number {
    return this.#runs;
  }

  /** In the order of the replicates. */
  get stopped(): readonly Stop[] {
    return this.#stopped.toSorted((a, b) => a.replicate - b.replicate);
  }

  lowestCount(): Moments {
    return this.#lowest.moments(0, this.#runs);
  }

  take(batch: BatchCounts): void {
    const gone = new Set(batch.stopped.map(({ replicate }) => replicate - batch.first));
    const kept = Array.from({ length: batch.lanes }, (_, lane) => lane).filter((lane) => !gone.has(lane));
    this.#stopped.push(...batch.stopped);
    this.#runs += kept.length;
    for (let t = 0; t <= this.shape.steps; t++) this.#takeCount(batch, kept, t);
    this.#takeLowest(batch, kept);
    this.#takeHandled(batch, kept);
  }

  #takeCount(batch: BatchCounts, kept: readonly number[], t: number): void {
    const { patches } = this.shape;
    const [values, used, count] = [this.#values, this.#used, kept.length];
    this.#read(batch, kept, t, wholeColumn);
    this.whole.add(t, values, count);
    used.fill(0);
    for (let p = 0; p < patches; p++) {
      this.#read(batch, kept, t, firstPatchColumn + p);
      this.patches.add(t * patches + p, values, count);
      for (let i = 0; i < count; i++) used[i] = (used[i] ?? 0) + ((values[i] ?? 0) > 0 ? 1 : 0);
    }
    this.inUse.add(t, used, count);
    this.hits.forEach((hits, k) => {
      this.#read(batch, kept, t, firstPatchColumn + patches + k);
      kept.forEach((lane, i) => {
        hits.add(t, batch.first + lane, values[i] ?? 0);
      });
    });
    for (let w = 0; w < this.#watchedColumns; w++) {
      this.#read(batch, kept, t, firstPatchColumn + patches + this.hits.length + w);
      this.watched?.add(w * (this.shape.steps + 1) + t, values, count);
    }
  }

  /** Puts one column of the kept lanes into `#values`. */
  #read({ counts }: BatchCounts, kept: readonly number[], t: number, column: number): void {
    const columns = this.#firstHandled + this.handled.length * handledParts.length;
    const at = (t * columns + column) * lanes;
    for (let i = 0; i < kept.length; i++) this.#values[i] = counts[at + (kept[i] ?? 0)] ?? 0;
  }

  get #watchedColumns(): number {
    return this.shape.watched ?? 0;
  }

  get #firstHandled(): number {
    return firstPatchColumn + this.shape.patches + this.hits.length + this.#watchedColumns;
  }

  #takeHandled(batch: BatchCounts, kept: readonly number[]): void {
    this.handled.forEach((totals, h) => {
      const first = this.#firstHandled + h * handledParts.length;
      totals.take((t, k) => {
        this.#read(batch, kept, t, first + k);
        return this.#values;
      }, kept.length);
    });
  }

  #takeLowest(batch: BatchCounts, kept: readonly number[]): void {
    const lowest = this.#used.fill(Infinity);
    for (let t = 0; t <= this.shape.steps; t++) {
      this.#read(batch, kept, t, wholeColumn);
      kept.forEach((_, i) => (lowest[i] = Math.min(lowest[i] ?? 0, this.#values[i] ?? 0)));
    }
    this.#lowest.add(0, lowest, kept.length);
    kept.forEach((lane, i) => (this.lowest[batch.first + lane] = lowest[i] ?? 0));
  }
}
