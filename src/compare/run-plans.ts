// Runs all plans under common chance: every plan meets the same weather and luck in the future of the same number. They go on
// together part by part, so that what is finished when the work is stopped is finished for all of them.
import { lanes, batchesOf, type Batch } from '../kernel/batch.ts';
import type { Crew } from '../kernel/crew.ts';
import type { BatchCounts } from '../kernel/output.ts';
import { openPooled, summarise, withSettings, type CompiledModel, type CrewOptions } from '../pipeline.ts';
import { DrawCollector } from '../results/draws/collect.ts';
import { drawnValues, seedOfDraw } from '../results/draws/plan.ts';
import type { Reduction } from '../results/reduction/reduction.ts';
import type { RunResults } from '../results/results.ts';
import { openReduction } from '../results/summarise.ts';
import { Ledger } from './ledger.ts';
import { PatchPairs, type PatchPair } from './patch-pairs.ts';
import type { HandledAnimals, Money, PlanToRun } from './plan.ts';

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

export interface PlansRun {
  readonly runs: readonly PlanRun[];
  /** First future of each finished draw and how many futures it has; empty where nothing was drawn. */
  readonly draws: readonly { readonly first: number; readonly futures: number }[];
  readonly futures: number;
}

/** Null where not even the first part was finished. The first plan is the one that the patches of all others are set beside. */
export async function runPlans(
  crew: Crew,
  plans: readonly PlanToRun[],
  options: CrewOptions = {},
): Promise<PlansRun | null> {
  const first = plans[0]?.compiled.model;
  if (first === undefined) throw new RangeError('There is no plan to run.');
  const drawn = first.draws > 0 && first.uncertainty !== null;
  return drawn ? runDraws(crew, plans, options) : runTogether(crew, plans, options);
}

/** Numbers that the batches of one part may hold, all plans together. */
const mostNumbers = 1 << 23;
const mostBatches = 64;
const fewestBatches = 4;

function partsOf(plans: readonly PlanToRun[]): readonly (readonly Batch[])[] {
  const [first] = plans;
  const batches = batchesOf(first?.compiled.model.replicates ?? 0);
  const numbers = plans.reduce(
    (sum, { compiled: { model } }) => sum + lanes * (model.steps + 1) * (model.patches.length + 4),
    0,
  );
  const size = Math.max(fewestBatches, Math.min(mostBatches, Math.floor(mostNumbers / numbers)));
  return Array.from({ length: Math.ceil(batches.length / size) }, (_, i) => batches.slice(i * size, (i + 1) * size));
}

interface Open {
  readonly plan: PlanToRun;
  readonly reduction: Reduction;
  readonly ledger: Ledger;
  readonly patches: PatchPairs;
}

function open(
  plans: readonly PlanToRun[],
  futures: number,
  reductionOf: (model: CompiledModel['model']) => Reduction,
): readonly Open[] {
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

/** One part of one plan; null where it was stopped before its end. In the order of the batches. */
async function part(
  crew: Crew,
  job: Parameters<Crew['run']>[0],
  { signal, onBatch }: { readonly signal: AbortSignal | undefined; readonly onBatch: (lanes: number) => void },
): Promise<readonly BatchCounts[] | null> {
  const taken: BatchCounts[] = [];
  const take = (batch: BatchCounts): void => {
    taken.push(batch);
    onBatch(batch.lanes);
  };
  const finished = await crew.run(job, take, signal === undefined ? {} : { signal });
  return finished < job.batches.length ? null : taken.sort((a, b) => a.first - b.first);
}

async function runTogether(crew: Crew, plans: readonly PlanToRun[], options: CrewOptions): Promise<PlansRun | null> {
  const replicates = plans[0]?.compiled.model.replicates ?? 0;
  const opened = open(plans, replicates, openReduction);
  let [done, told] = [0, 0];
  const onBatch = (count: number): void => options.onProgress?.((told += count), replicates * plans.length);
  for (const batches of partsOf(plans)) {
    const parts: (readonly BatchCounts[])[] = [];
    for (const { plan } of opened) {
      const { image, model } = plan.compiled;
      const request = { steps: model.steps, seed: model.seed };
      const finished = await part(crew, { image, request, batches }, { signal: options.signal, onBatch });
      if (finished === null) break;
      parts.push(finished);
    }
    if (parts.length < opened.length) break;
    opened.forEach((one, i) => {
      for (const batch of parts[i] ?? []) one.reduction.take(batch);
      keep(one, { base: parts[0] ?? [], own: parts[i] ?? [], offset: 0, moneyOf: one.plan.moneyOf });
    });
    done += batches.reduce((sum, batch) => sum + batch.lanes, 0);
  }
  if (done === 0) return null;
  const runs = opened.map(({ plan, reduction, ledger, patches }) => {
    const compiled = done === replicates ? plan.compiled : withSettings(plan.compiled, { replicates: done });
    return { plan, compiled, results: summarise(compiled, reduction), ledger, reduction, patches: patches.pairs };
  });
  return { runs, draws: [], futures: done };
}

interface Kept {
  readonly base: readonly BatchCounts[];
  readonly own: readonly BatchCounts[];
  /** Place of replicate 0 among all futures. */
  readonly offset: number;
  readonly moneyOf: ((handled: HandledAnimals) => Money) | null;
}

function keep({ ledger, patches }: Open, { base, own, offset, moneyOf }: Kept): void {
  own.forEach((batch, i) => {
    ledger.take(batch, offset + batch.first, moneyOf);
    const beside = base[i];
    if (beside !== undefined) patches.take(beside, batch);
  });
}

/** A draw that one plan cannot have is left out of all. */
async function runDraws(crew: Crew, plans: readonly PlanToRun[], options: CrewOptions): Promise<PlansRun | null> {
  const base = plans[0]?.compiled.model;
  if (base === undefined || base.uncertainty === null) return null;
  const { uncertainty, seed, replicates, steps } = base;
  const number = uncertainty.table === null ? base.draws : Math.min(base.draws, uncertainty.table.length);
  const opened = open(plans, replicates * number, openPooled);
  const collectors = opened.map(({ plan, reduction }) => new DrawCollector(plan.compiled.model, reduction));
  const draws: { first: number; futures: number }[] = [];
  let [told, begun] = [0, 0];
  const onBatch = (count: number): void => options.onProgress?.((told += count), replicates * number * plans.length);
  const batches = batchesOf(replicates);
  for (let draw = 0; draw < number; draw++) {
    const values = drawnValues(uncertainty, seed, draw);
    const own = opened.map(({ plan }) => plan.under(values));
    const failed = own.find(({ compiled }) => compiled === null);
    if (failed?.compiled === null) {
      for (const collector of collectors) collector.fail(draw, values, failed.failure);
      onBatch(replicates * plans.length);
      begun = draw + 1;
      continue;
    }
    const parts: (readonly BatchCounts[])[] = [];
    for (const { compiled } of own) {
      if (compiled === null) break;
      const request = { steps, seed: seedOfDraw(seed, draw) };
      const finished = await part(
        crew,
        { image: compiled.image, request, batches },
        { signal: options.signal, onBatch },
      );
      if (finished === null) break;
      parts.push(finished);
    }
    if (parts.length < opened.length) break;
    begun = draw + 1;
    const offset = draws.length * replicates;
    opened.forEach((one, i) => {
      for (const batch of parts[i] ?? []) collectors[i]?.take(batch);
      collectors[i]?.finish(draw, values);
      keep(one, { base: parts[0] ?? [], own: parts[i] ?? [], offset, moneyOf: own[i]?.moneyOf ?? null });
    });
    draws.push({ first: offset, futures: replicates });
  }
  if (draws.length === 0) return null;
  const runs = opened.flatMap(({ plan, reduction, ledger, patches }, i) => {
    const compiled = begun === number ? plan.compiled : withSettings(plan.compiled, { draws: begun });
    const results = collectors[i]?.withDraws(summarise(compiled, reduction));
    return results === undefined ? [] : [{ plan, compiled, results, ledger, reduction, patches: patches.pairs }];
  });
  return { runs, draws, futures: draws.length * replicates };
}
