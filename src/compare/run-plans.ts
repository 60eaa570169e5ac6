// Runs all plans under common chance: every plan meets the same weather and luck in the future of the same number. They go on
// together batch by batch, so that what is finished when the work is stopped is finished for all of them.
import type { Crew } from '../kernel/crew.ts';
import type { BatchCounts } from '../kernel/output.ts';
import { summarise, withSettings, type CrewOptions } from '../pipeline.ts';
import { blocksOf, expectedReplicates, mostReplicates } from '../results/precision.ts';
import type { ReachedPrecision } from '../results/results.ts';
import { openReduction } from '../results/summarise.ts';
import type { PlanToRun } from './plan.ts';
import { finishPlan, keepBatch, openPlans, runBatches, type PlansRun } from './plans-run.ts';
import { runDraws } from './run-draws.ts';
import { precisionSoFar } from './sharpness.ts';

/**
 * Null where not even the first batch was finished. The first plan is the one that the patches of all others are set beside, and
 * its model says how many replicates there are, how precise the differences are to be, and what is drawn.
 */
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

async function runTogether(crew: Crew, plans: readonly PlanToRun[], options: CrewOptions): Promise<PlansRun | null> {
  const base = plans[0]?.compiled.model;
  if (base === undefined) return null;
  const opened = openPlans(plans, mostReplicates(base), openReduction);
  let [done, told, expected, stopped] = [0, 0, base.replicates, false];
  let precision: ReachedPrecision | null = null;
  const onBatch = (count: number): void => options.onProgress?.((told += count), expected * plans.length);
  const job = { images: plans.map(({ compiled }) => compiled.image), request: { steps: base.steps, seed: base.seed } };
  const money = plans.map(({ moneyOf }) => moneyOf);
  const take = (ofPlans: readonly BatchCounts[]): void => {
    opened.forEach(({ reduction }, i) => {
      const batch = ofPlans[i];
      if (batch !== undefined) reduction.take(batch);
    });
    keepBatch(opened, ofPlans, { offset: 0, money });
    for (const batch of ofPlans) crew.release?.(batch);
  };
  for (const batches of blocksOf(base)) {
    const finished = await runBatches(crew, { ...job, batches }, take, { signal: options.signal, onBatch });
    done += batches.slice(0, finished).reduce((sum, batch) => sum + batch.lanes, 0);
    stopped = finished < batches.length;
    if (stopped) break;
    precision = precisionSoFar(base, opened, { futures: done, draws: [] });
    if (precision === null || precision.reached) break;
    expected = expectedReplicates(done, precision);
  }
  if (done === 0) return null;
  const runs = opened.map((one) => {
    const { compiled } = one.plan;
    const cut = stopped ? withSettings(compiled, { replicates: done }) : compiled;
    const results = summarise({ ...cut, model: { ...cut.model, replicates: done } }, one.reduction);
    return finishPlan(one, { compiled: cut, results });
  });
  return { runs, draws: [], futures: done, precision: stopped ? null : precision };
}
