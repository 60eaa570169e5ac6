// What the runs of all plans are collected in, and what comes of it.
import type { Crew, Job } from '../kernel/crew.ts';
import type { BatchCounts } from '../kernel/output.ts';
import type { CompiledModel } from '../pipeline.ts';
import type { Reduction } from '../results/reduction/reduction.ts';
import type { ReachedPrecision, RunResults } from '../results/results.ts';
import { Ledger } from './ledger.ts';
import { patchEndsOf, PatchPairs, type PatchEnds, type PatchPair } from './patch-pairs.ts';
import type { MoneyOf, PlanToRun } from './plan.ts';

export interface PlanRun {
  readonly plan: PlanToRun;
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

export interface PartOptions {
  readonly signal: AbortSignal | undefined;
  readonly onBatch: (lanes: number) => void;
}

/** Some batches of every plan, in their order; null where the work was stopped before all were done. */
export async function runPart(
  crew: Crew,
  job: Job,
  { signal, onBatch }: PartOptions,
): Promise<readonly (readonly BatchCounts[])[] | null> {
  const taken = job.images.map((): BatchCounts[] => []);
  const take = (batch: BatchCounts, plan: number): void => {
    taken[plan]?.push(batch);
    onBatch(batch.lanes);
  };
  const finished = await crew.run(job, take, signal === undefined ? {} : { signal });
  return finished < job.batches.length ? null : taken.map((own) => own.sort((a, b) => a.first - b.first));
}

/** Of one plan. */
export interface FinishedPart {
  readonly own: readonly BatchCounts[];
  /** Place of replicate 0 among all futures. */
  readonly offset: number;
  readonly moneyOf: MoneyOf | null;
}

/** The same batches of all plans, which are set beside those of the first. */
export function keepParts(plans: readonly OpenPlan[], parts: readonly FinishedPart[]): void {
  let base: readonly PatchEnds[] | null = null;
  plans.forEach(({ plan, ledger, patches }, i) => {
    const { own, offset, moneyOf } = parts[i] ?? { own: [], offset: 0, moneyOf: null };
    const ends = own.map((batch) => patchEndsOf(plan.compiled.model, batch));
    base ??= ends;
    for (const [k, end] of ends.entries()) {
      ledger.take(end.batch, offset + end.batch.first, moneyOf);
      const beside = base[k];
      if (beside !== undefined) patches.take(beside, end);
    }
  });
}

export function finishPlan(
  { plan, reduction, ledger, patches }: OpenPlan,
  compiled: CompiledModel,
  results: RunResults,
): PlanRun {
  return { plan, compiled, results, ledger, reduction, patches: patches.pairs };
}
