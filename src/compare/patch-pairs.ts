// What each patch gains or loses under a plan, future by future against the plan that all are set beside.
import { lanes } from '../kernel/batch.ts';
import type { BatchCounts } from '../kernel/output.ts';
import type { Model } from '../model/model.ts';

const firstPatchColumn = 1;

/** Sums over futures of the differences of one patch between a plan and `as now`. */
export interface PatchPair {
  readonly patch: string;
  futures: number;
  /** Of animals at the last count, plan less base, and of the squares: whole numbers, so exact in any order. */
  difference: number;
  squares: number;
  /** Futures in which the patch stood empty at some count after the start. */
  emptyBoth: number;
  emptyBase: number;
  emptyPlan: number;
}

/** The batches of one plan and of the base are those of the same futures. */
export class PatchPairs {
  readonly pairs: readonly PatchPair[];
  readonly #places: readonly (readonly [base: number | null, plan: number | null])[];
  readonly #steps: number;

  constructor(base: Model, plan: Model) {
    const names = [...new Set([...base.patches, ...plan.patches].map(({ name }) => name))];
    const place = ({ patches }: Model, name: string): number | null => {
      const p = patches.findIndex((patch) => patch.name === name);
      return p < 0 ? null : p;
    };
    this.#steps = base.steps;
    this.#places = names.map((name) => [place(base, name), place(plan, name)] as const);
    this.pairs = names.map((patch) => ({
      patch,
      futures: 0,
      difference: 0,
      squares: 0,
      emptyBoth: 0,
      emptyBase: 0,
      emptyPlan: 0,
    }));
  }

  take(base: BatchCounts, plan: BatchCounts): void {
    const gone = new Set([...base.stopped, ...plan.stopped].map(({ replicate }) => replicate - base.first));
    const kept = Array.from({ length: base.lanes }, (_, lane) => lane).filter((lane) => !gone.has(lane));
    this.pairs.forEach((pair, i) => {
      const [inBase, inPlan] = this.#places[i] ?? [null, null];
      for (const lane of kept) {
        const [then, now] = [this.#read(base, inBase, lane), this.#read(plan, inPlan, lane)];
        const difference = now.last - then.last;
        pair.futures++;
        pair.difference += difference;
        pair.squares += difference * difference;
        if (then.empty && now.empty) pair.emptyBoth++;
        else if (then.empty) pair.emptyBase++;
        else if (now.empty) pair.emptyPlan++;
      }
    });
  }

  /** A patch that is not there is empty and counts as never having been in use. */
  #read({ counts }: BatchCounts, patch: number | null, lane: number): { last: number; empty: boolean } {
    if (patch === null) return { last: 0, empty: true };
    const columns = counts.length / (this.#steps + 1) / lanes;
    const at = (t: number): number => counts[(t * columns + firstPatchColumn + patch) * lanes + lane] ?? 0;
    let empty = false;
    for (let t = 1; t <= this.#steps && !empty; t++) empty = at(t) === 0;
    return { last: at(this.#steps), empty };
  }
}
