// Runs all plans under the same draws of what is not known: for each draw every plan, in the same futures.
import { batchesOf } from '../kernel/batch.ts';
import type { Crew } from '../kernel/crew.ts';
import type { BatchCounts } from '../kernel/output.ts';
import type { ActionCost, Sums } from '../model/costs.ts';
import type { Model } from '../model/model.ts';
import { openPooled, summarise, withSettings, type CrewOptions } from '../pipeline.ts';
import { DrawCollector } from '../results/draws/collect.ts';
import { drawnValues, seedOfDraw, type DrawnValues } from '../results/draws/plan.ts';
import { endsBlockOfDraws, mostDraws } from '../results/precision.ts';
import type { ReachedPrecision } from '../results/results.ts';
import type { PlanModel, PlanToRun } from './plan.ts';
import {
  finishPlan,
  keepBatch,
  openPlans,
  runBatches,
  type OpenPlan,
  type BatchOptions,
  type PlansRun,
} from './plans-run.ts';
import { precisionSoFar } from './sharpness.ts';

interface OpenDraws {
  /** Its years, replicates and seed are those of all plans. */
  readonly base: Model;
  readonly opened: readonly OpenPlan[];
  readonly collectors: readonly DrawCollector[];
  readonly finished: { first: number; futures: number }[];
  /** By plan the different prices that its draws had. */
  readonly prices: readonly Set<string>[];
}

/** A draw that one plan cannot have is left out of all. */
export async function runDraws(
  crew: Crew,
  plans: readonly PlanToRun[],
  options: CrewOptions,
): Promise<PlansRun | null> {
  const base = plans[0]?.compiled.model;
  if (base === undefined || base.uncertainty === null) return null;
  const { uncertainty, seed, replicates } = base;
  const most = mostDraws(base);
  const number = uncertainty.table === null ? most : Math.min(most, uncertainty.table.length);
  const opened = openPlans(plans, replicates * number, openPooled);
  const collectors = opened.map(({ plan, reduction }) => new DrawCollector(plan.compiled.model, reduction));
  const open: OpenDraws = { base, opened, collectors, finished: [], prices: opened.map(() => new Set<string>()) };
  let [told, done, stopped] = [0, 0, false];
  let precision: ReachedPrecision | null = null;
  const onBatch = (count: number): void =>
    options.onProgress?.((told += count), replicates * base.draws * plans.length);
  for (let draw = 0; draw < number; draw++) {
    const values = drawnValues(uncertainty, seed, draw);
    stopped = !(await runDraw(crew, open, { draw, values, options: { signal: options.signal, onBatch } }));
    if (stopped) break;
    done = draw + 1;
    const { finished } = open;
    if (!endsBlockOfDraws(base, done) || finished.length === 0) continue;
    precision = precisionSoFar(base, opened, { futures: finished.length * replicates, draws: finished });
    if (precision?.reached === true) break;
  }
  if (open.finished.length === 0) return null;
  const runs = opened.flatMap((one, i) => {
    const compiled = stopped ? withSettings(one.plan.compiled, { draws: done }) : one.plan.compiled;
    const collector = collectors[i];
    if (collector === undefined) return [];
    const results = collector.withDraws(summarise(compiled, one.reduction));
    const unknown = { model: collector.enters, money: (open.prices[i]?.size ?? 0) > 1 };
    return [finishPlan(one, { compiled, results, unknown })];
  });
  const futures = open.finished.length * replicates;
  return { runs, draws: open.finished, futures, precision: stopped ? null : precision };
}

interface Draw {
  readonly draw: number;
  readonly values: DrawnValues;
  readonly options: BatchOptions;
}

/** Whether it was finished, be it by telling that it cannot be had. */
async function runDraw(crew: Crew, open: OpenDraws, { draw, values, options }: Draw): Promise<boolean> {
  const { base, opened, collectors, finished, prices } = open;
  const own = opened.map(({ plan }) => plan.under(values));
  const failed = own.find((one): one is PlanModel & { compiled: null } => one.compiled === null);
  if (failed !== undefined) {
    for (const collector of collectors) collector.fail(draw, values, failed.failure);
    return true;
  }
  const images = own.flatMap(({ compiled }) => (compiled === null ? [] : [compiled.image]));
  const request = { steps: base.steps, seed: seedOfDraw(base.seed, draw) };
  const job = { images, request, batches: batchesOf(base.replicates) };
  const taken: (readonly BatchCounts[])[] = [];
  const done = await runBatches(crew, job, (ofPlans) => taken.push(ofPlans), options);
  if (done < job.batches.length) return false;
  const futures = base.replicates;
  const offset = finished.length * futures;
  const money = own.map(({ moneyOf }) => moneyOf);
  for (const ofPlans of taken) {
    ofPlans.forEach((batch, i) => collectors[i]?.take(batch));
    keepBatch(opened, ofPlans, { offset, money });
    for (const batch of ofPlans) crew.release?.(batch);
  }
  collectors.forEach((collector, i) => {
    collector.finish(draw, values, images[i] ?? new ArrayBuffer(0));
    prices[i]?.add(JSON.stringify(own[i]?.compiled?.cost.actions.map(pricesOf) ?? null));
  });
  finished.push({ first: offset, futures });
  return true;
}

function pricesOf({ fixed, perAnimal }: ActionCost): unknown {
  const texts = ({ least, middle, most }: Sums) => [[...least], [...middle], [...most]];
  return [texts(fixed), perAnimal === null ? null : texts(perAnimal)];
}
