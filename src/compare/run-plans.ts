// Runs all plans under common chance: every plan meets the same weather and luck in the future of the same number. They go on
// together part by part, so that what is finished when the work is stopped is finished for all of them.
import { lanes, type Batch } from '../kernel/batch.ts';
import type { Crew } from '../kernel/crew.ts';
import type { Model } from '../model/model.ts';
import { summarise, withSettings, type CrewOptions } from '../pipeline.ts';
import { blocksOf, expectedReplicates, mostReplicates } from '../results/precision.ts';
import type { ReachedPrecision } from '../results/results.ts';
import { openReduction } from '../results/summarise.ts';
import type { PlanToRun } from './plan.ts';
import {
  finishPlan,
  keepParts,
  openPlans,
  runPart,
  type OpenPlan,
  type PartOptions,
  type PlansRun,
} from './plans-run.ts';
import { runDraws } from './run-draws.ts';
import { precisionSoFar } from './sharpness.ts';

/**
 * Null where not even the first part was finished. The first plan is the one that the patches of all others are set beside, and
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
  for (const block of blocksOf(base)) {
    for (const batches of partsOf(block, plans)) {
      const finished = await runAll(crew, { base, opened, batches }, { signal: options.signal, onBatch });
      stopped = !finished;
      if (stopped) break;
      done += batches.reduce((sum, batch) => sum + batch.lanes, 0);
    }
    if (stopped) break;
    precision = precisionSoFar(base, opened, { futures: done, draws: [] });
    if (precision === null || precision.reached) break;
    expected = expectedReplicates(done, precision);
  }
  if (done === 0) return null;
  const runs = opened.map((one) => {
    const { compiled } = one.plan;
    const cut = stopped ? withSettings(compiled, { replicates: done }) : compiled;
    return finishPlan(one, cut, summarise({ ...cut, model: { ...cut.model, replicates: done } }, one.reduction));
  });
  return { runs, draws: [], futures: done, precision: stopped ? null : precision };
}

/** Numbers that the batches of one part may hold, all plans together. */
const mostNumbers = 1 << 23;
const mostBatches = 64;
const fewestBatches = 4;

function partsOf(batches: readonly Batch[], plans: readonly PlanToRun[]): readonly (readonly Batch[])[] {
  const numbers = plans.reduce(
    (sum, { compiled: { model } }) => sum + lanes * (model.steps + 1) * (model.patches.length + 4),
    0,
  );
  const size = Math.max(fewestBatches, Math.min(mostBatches, Math.floor(mostNumbers / numbers)));
  return Array.from({ length: Math.ceil(batches.length / size) }, (_, i) => batches.slice(i * size, (i + 1) * size));
}

interface Part {
  /** Its years and seed are those of all plans. */
  readonly base: Model;
  readonly opened: readonly OpenPlan[];
  readonly batches: readonly Batch[];
}

/** Whether the part was finished for every plan; only then is it kept. */
async function runAll(crew: Crew, { base, opened, batches }: Part, options: PartOptions): Promise<boolean> {
  const { steps, seed } = base;
  const images = opened.map(({ plan }) => plan.compiled.image);
  const parts = await runPart(crew, { images, request: { steps, seed }, batches }, options);
  if (parts === null) return false;
  opened.forEach((one, i) => {
    for (const batch of parts[i] ?? []) one.reduction.take(batch);
  });
  keepParts(
    opened,
    opened.map(({ plan: { moneyOf } }, i) => ({ own: parts[i] ?? [], offset: 0, moneyOf })),
  );
  for (const batch of parts.flat()) crew.release?.(batch);
  return true;
}
