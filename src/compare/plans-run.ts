// What the runs of all plans are collected in, and what comes of it.
import type { Crew, Job } from '../kernel/crew.ts';
import type { BatchCounts } from '../kernel/output.ts';
import type { CompiledModel } from '../pipeline.ts';
import type { Reduction } from '../results/reduction/reduction.ts';
import type { ReachedPrecision, RunResults } from '../results/results.ts';
import { Ledger } from './ledger.ts';
import { patchEndsOf, PatchPairs, type PatchEnds, type PatchPair } from './patch-pairs.ts';
import type { MoneyOf, PlanToRun } from './plan.ts';

/** Where numbers that are not exactly known enter; nowhere where nothing was drawn. */
export interface UnknownEnters {
  readonly model: boolean;
  readonly money: boolean;
}

export interface PlanRun {
  readonly plan: PlanToRun;
  readonly unknown: UnknownEnters;
  /** With as many replicates as were finished. */
  readonly compiled: CompiledModel;
  readonly results: RunResults;
  readonly ledger: Ledger;
  readonly reduction: Reduction;
  /** Against the first plan. */
  readonly patches: readonly PatchPair[];
}

/** First future of each finished draw and how many futures it has. */
export type DrawPlaces = readonly { readonly first: number; readonly futures: number }[];

export interface PlansRun {
  readonly runs: readonly PlanRun[];
  /** Empty where nothing was drawn. */
  readonly draws: DrawPlaces;
  readonly futures: number;
  /** Null where no precision was asked for. */
  readonly precision: ReachedPrecision | null;
}

/** One plan under way. */
export interface OpenPlan {
  readonly plan: PlanToRun;
  readonly reduction: Reduction;
  readonly ledger: Ledger;
  readonly patches: PatchPairs;
}

/** `futures` is the largest number that can come. */
export function openPlans(
  plans: readonly PlanToRun[],
  futures: number,
  reductionOf: (model: CompiledModel['model']) => Reduction,
): readonly OpenPlan[] {
  const base = plans[0]?.compiled.model;
  return plans.map((plan) => {
    const { model } = plan.compiled;
    return {
      plan,
      reduction: reductionOf(model),
      ledger: new Ledger(model, futures),
      patches: new PatchPairs(base ?? model, model),
    };
  });
}

export interface BatchOptions {
  readonly signal: AbortSignal | undefined;
  /** Replicates that are done more, of one plan. */
  readonly onBatch: (lanes: number) => void;
}

/** Gives every batch of a job as soon as it is done for all plans, in their order; resolves to how many there were. */
export async function runBatches(
  crew: Crew,
  job: Job,
  take: (batch: readonly BatchCounts[]) => void,
  { signal, onBatch }: BatchOptions,
): Promise<number> {
  let ofPlans: BatchCounts[] = [];
  const takeOne = (batch: BatchCounts): void => {
    ofPlans.push(batch);
    onBatch(batch.lanes);
    if (ofPlans.length < job.images.length) return;
    take(ofPlans);
    ofPlans = [];
  };
  return crew.run(job, takeOne, signal === undefined ? {} : { signal });
}

export interface PlaceOfBatch {
  /** Place of replicate 0 among all futures. */
  readonly offset: number;
  /** By plan. */
  readonly money: readonly (MoneyOf | null)[];
}

/** The same batch of all plans, which are set beside the first. */
export function keepBatch(
  plans: readonly OpenPlan[],
  batches: readonly BatchCounts[],
  { offset, money }: PlaceOfBatch,
): void {
  let base: PatchEnds | null = null;
  for (const [i, { plan, ledger, patches }] of plans.entries()) {
    const batch = batches[i];
    if (batch === undefined) continue;
    const ends = patchEndsOf(plan.compiled.model, batch);
    base ??= ends;
    ledger.take(batch, offset + batch.first, money[i] ?? null);
    patches.take(base, ends);
  }
}

export interface FinishedPlan extends Pick<PlanRun, 'compiled' | 'results'> {
  /** Absent where nothing was drawn. */
  readonly unknown?: UnknownEnters;
}

export function finishPlan(
  { plan, reduction, ledger, patches }: OpenPlan,
  { compiled, results, unknown = { model: false, money: false } }: FinishedPlan,
): PlanRun {
  return { plan, unknown, compiled, results, ledger, reduction, patches: patches.pairs };
}
