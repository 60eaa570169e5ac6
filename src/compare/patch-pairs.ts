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

/** What a patch came to in the futures of a batch. */
export interface PatchEnds {
  readonly batch: BatchCounts;
  /** Animals at the last count at p · lanes + lane. */
  readonly last: Float64Array;
  /** 1 where the patch stood empty at some count after the start; the same places. */
  readonly emptied: Uint8Array;
}

export function patchEndsOf({ patches, steps }: Model, batch: BatchCounts): PatchEnds {
  const { counts } = batch;
  const [numbers, row] = [patches.length * lanes, counts.length / (steps + 1)];
  const first = firstPatchColumn * lanes;
  const emptied = new Uint8Array(numbers);
  for (let t = 1; t <= steps; t++) {
    const at = t * row + first;
    for (let i = 0; i < numbers; i++) if (counts[at + i] === 0) emptied[i] = 1;
  }
  const last = counts.subarray(steps * row + first, steps * row + first + numbers);
  return { batch, last, emptied };
}

/** The batches of one plan and of the base are those of the same futures. */
export class PatchPairs {
  readonly pairs: readonly PatchPair[];
  readonly #places: readonly (readonly [base: number | null, plan: number | null])[];

  constructor(base: Model, plan: Model) {
    const names = [...new Set([...base.patches, ...plan.patches].map(({ name }) => name))];
    const place = ({ patches }: Model, name: string): number | null => {
      const p = patches.findIndex((patch) => patch.name === name);
      return p < 0 ? null : p;
    };
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

  take(base: PatchEnds, plan: PatchEnds): void {
    const { first, lanes: count } = base.batch;
    const gone = new Set([...base.batch.stopped, ...plan.batch.stopped].map(({ replicate }) => replicate - first));
    this.pairs.forEach((pair, i) => {
      const [inBase, inPlan] = this.#places[i] ?? [null, null];
      for (let lane = 0; lane < count; lane++) {
        if (gone.has(lane)) continue;
        // A patch that is not there is empty and counts as never having been in use.
        const [then, now] = [placeOf(inBase, lane), placeOf(inPlan, lane)];
        const difference = (plan.last[now] ?? 0) - (base.last[then] ?? 0);
        const [thenEmpty, nowEmpty] = [base.emptied[then] ?? 1, plan.emptied[now] ?? 1];
        pair.futures++;
        pair.difference += difference;
        pair.squares += difference * difference;
        if (thenEmpty === 1 && nowEmpty === 1) pair.emptyBoth++;
        else if (thenEmpty === 1) pair.emptyBase++;
        else if (nowEmpty === 1) pair.emptyPlan++;
      }
    });
  }
}

/** −1 where there is no such patch. */
function placeOf(patch: number | null, lane: number): number {
  return patch === null ? -1 : patch * lanes + lane;
}
