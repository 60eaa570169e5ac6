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
  readonly #used = new Float64Array(lanes);
  readonly #lowestOf = new Float64Array(lanes);

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
    const kept = keptLanes(batch);
    this.#stopped.push(...batch.stopped);
    this.#runs += kept.replicates.length;
    this.#lowestOf.fill(Infinity);
    for (let t = 0; t <= this.shape.steps; t++) this.#takeCount(kept, t);
    this.#takeLowest(kept);
    this.#takeHandled(kept);
  }

  #takeCount({ counts, replicates }: KeptLanes, t: number): void {
    const { patches } = this.shape;
    const [used, lowest, count] = [this.#used, this.#lowestOf, replicates.length];
    let at = this.#place(t, wholeColumn);
    this.whole.add(t, counts, at, count);
    for (let i = 0; i < count; i++) {
      const value = counts[at + i] ?? 0;
      if (value < (lowest[i] ?? 0)) lowest[i] = value;
    }
    used.fill(0);
    at = this.#place(t, firstPatchColumn);
    for (let p = 0; p < patches; p++) {
      this.patches.add(t * patches + p, counts, at, count);
      for (let i = 0; i < count; i++) if ((counts[at + i] ?? 0) > 0) used[i] = (used[i] ?? 0) + 1;
      at += lanes;
    }
    this.inUse.add(t, used, 0, count);
    for (const hits of this.hits) {
      hits.addAll(t, replicates, counts, at);
      at += lanes;
    }
    for (let w = 0; w < this.#watchedColumns; w++) {
      this.watched?.add(w * (this.shape.steps + 1) + t, counts, at, count);
      at += lanes;
    }
  }

  /** Where a column of count t stands in a batch. */
  #place(t: number, column: number): number {
    return (t * (this.#firstHandled + this.handled.length * handledParts.length) + column) * lanes;
  }

  get #watchedColumns(): number {
    return this.shape.watched ?? 0;
  }

  get #firstHandled(): number {
    return firstPatchColumn + this.shape.patches + this.hits.length + this.#watchedColumns;
  }

  #takeHandled({ counts, replicates }: KeptLanes): void {
    this.handled.forEach((totals, h) => {
      const first = this.#firstHandled + h * handledParts.length;
      totals.take({ counts, place: (t, k) => this.#place(t, first + k), count: replicates.length });
    });
  }

  #takeLowest({ replicates }: KeptLanes): void {
    this.#lowest.add(0, this.#lowestOf, 0, replicates.length);
    replicates.forEach((replicate, i) => (this.lowest[replicate] = this.#lowestOf[i] ?? 0));
  }
}

/** Counts of a batch with the lanes that came to their end as the first of their columns, and the replicate of each. */
interface KeptLanes {
  readonly counts: Float64Array;
  readonly replicates: Int32Array;
}

function keptLanes({ first, lanes: count, counts, stopped }: BatchCounts): KeptLanes {
  const all = new Int32Array(count);
  for (let lane = 0; lane < count; lane++) all[lane] = first + lane;
  if (stopped.length === 0) return { counts, replicates: all };
  const gone = new Set(stopped.map(({ replicate }) => replicate));
  const replicates = all.filter((one) => !gone.has(one));
  const packed = new Float64Array(counts.length);
  for (let row = 0; row < counts.length; row += lanes) {
    replicates.forEach((replicate, i) => (packed[row + i] = counts[row + replicate - first] ?? 0));
  }
  return { counts: packed, replicates };
}
