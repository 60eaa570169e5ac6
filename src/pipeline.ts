// The story of the tool: from a spec to a model, its landscape, its compiled year and image, and to what a run says.
import { buildBlock } from './compile/block.ts';
import { compileSpec, type CompiledModel } from './compilation.ts';
import { growingOnly } from './compile/handling.ts';
import { buildImage } from './compile/image/build.ts';
import { runLongRun } from './kernel/long-run.ts';
import { runPath } from './kernel/path.ts';
import { batchesOf } from './kernel/batch.ts';
import type { Crew } from './kernel/crew.ts';
import type { BatchCounts } from './kernel/output.ts';
import { openRunner } from './kernel/run.ts';
import type { Model } from './model/model.ts';
import { growthRateOf } from './numeric/leading.ts';
import { standingCautions } from './results/cautions.ts';
import { DrawCollector } from './results/draws/collect.ts';
import { drawnValues, seedOfDraw, withValues, type DrawnValues } from './results/draws/plan.ts';
import { provenanceOf } from './results/provenance.ts';
import type { Reduction } from './results/reduction/reduction.ts';
import { longRunGrowth, longRunRequest, yearsDiffer } from './results/long-run.ts';
import {
  blocksOf,
  endsBlockOfDraws,
  expectedReplicates,
  mostDraws,
  precisionOf,
  withPrecision,
} from './results/precision.ts';
import { rareResults } from './results/rare/splitting.ts';
import type { PathGrowth, PathResults, RareResult, ReachedPrecision, RunResults } from './results/results.ts';
import { openReduction, summariseOutcomes, summarisePath, summariseRun } from './results/summarise.ts';

export {
  compileBase,
  compileScenario,
  compileSpec,
  type Compilation,
  type CompiledBase,
  type CompiledModel,
} from './compilation.ts';

export interface RunOptions {
  /** Told after each batch how many replicates are done. */
  readonly onProgress?: (done: number, of: number) => void;
}

export interface CrewOptions extends RunOptions {
  readonly signal?: AbortSignal;
}

/** Stochastic replicates of one scenario, in this thread. */
export function runModel(compiled: CompiledModel, options: RunOptions = {}): RunResults {
  if (drawing(compiled)) return runDraws(compiled, options);
  const { onProgress } = options;
  const { model, image } = compiled;
  const run = openRunner(image, { steps: model.steps, seed: model.seed, reuse: true });
  const reduction = openReduction(model);
  let [done, expected] = [0, model.replicates];
  for (const block of blocksOf(model)) {
    for (const batch of block) {
      reduction.take(run(batch));
      done += batch.lanes;
      onProgress?.(done, expected);
    }
    const reached = precisionSoFar(model, reduction);
    if (reached?.reached !== false) break;
    expected = expectedReplicates(done, reached);
  }
  const results = withPrecision(model, summarise({ ...compiled, model: { ...model, replicates: done } }, reduction));
  return model.rare === true ? { ...results, rare: splitAll(compiled) } : results;
}

/** The outcomes by splitting, in this thread. */
function splitAll({ model, image }: CompiledModel): readonly RareResult[] {
  const work = rareResults(model, image);
  for (;;) {
    const { done, value } = work.next();
    if (done === true) return value;
  }
}

/** Null where no precision was asked for. */
function precisionSoFar(model: Model, reduction: Reduction): ReachedPrecision | null {
  return model.precision === undefined ? null : precisionOf(model, summariseOutcomes(model, reduction));
}

/** What was finished of a run. */
export interface FinishedRun {
  /** With as many replicates as were finished. */
  readonly compiled: CompiledModel;
  /** Null where not even the first batch was finished. */
  readonly results: RunResults | null;
}

/**
 * The same by a crew, with the same results. Where it is told to stop, what comes back is the run with as many replicates as
 * were finished, as if only they had been asked for.
 */
export async function runModelWith(
  crew: Crew,
  compiled: CompiledModel,
  options: CrewOptions = {},
): Promise<FinishedRun> {
  if (drawing(compiled)) return runDrawsWith(crew, compiled, options);
  const { model, image } = compiled;
  const { replicates, steps, seed } = model;
  const reduction = openReduction(model);
  let [told, done, expected] = [0, 0, replicates];
  const take = (batch: BatchCounts): void => {
    reduction.take(batch);
    crew.release?.(batch);
    options.onProgress?.((told += batch.lanes), expected);
  };
  for (const batches of blocksOf(model)) {
    const finished = await crew.run({ images: [image], request: { steps, seed }, batches }, take, options);
    done += batches.slice(0, finished).reduce((sum, { lanes }) => sum + lanes, 0);
    if (finished < batches.length) {
      const cut = withSettings(compiled, { replicates: done });
      return { compiled: cut, results: done === 0 ? null : summarise(cut, reduction) };
    }
    const reached = precisionSoFar(model, reduction);
    if (reached?.reached !== false) break;
    expected = expectedReplicates(done, reached);
  }
  const results = summarise({ ...compiled, model: { ...model, replicates: done } }, reduction);
  const plain = withPrecision(model, results);
  if (model.rare !== true) return { compiled, results: plain };
  const rare = await splitUnlessStopped(compiled, options);
  if (rare === null) return { compiled: withSettings(compiled, { replicates: done }), results: plain };
  return { compiled, results: { ...plain, rare } };
}

/** Null where it was told to stop before all repeats were done. */
async function splitUnlessStopped(
  { model, image }: CompiledModel,
  { signal, onProgress }: CrewOptions,
): Promise<readonly RareResult[] | null> {
  const work = rareResults(model, image);
  for (;;) {
    const { done, value } = work.next();
    if (done === true) return value;
    onProgress?.(Math.round(value * model.replicates), model.replicates);
    await new Promise((resolve) => setTimeout(resolve));
    if (signal?.aborted === true) return null;
  }
}

/** As if less had been asked for: what was finished of a run. */
export function withSettings(compiled: CompiledModel, done: { replicates: number } | { draws: number }): CompiledModel {
  const { named, ...core } = compiled.spec;
  const run = { ...core.run, ...done };
  // What is left was not to be precise, nor to be split.
  delete run.precision;
  delete run['at-most'];
  delete run.rare;
  const spec = { ...core, run, named };
  const model = { ...compiled.model, ...done, precision: undefined, rare: undefined };
  return { ...compiled, spec, model, provenance: provenanceOf(model.title, spec) };
}

/** Of a reduction that holds the runs of this model. */
export function summarise({ model, provenance }: CompiledModel, reduction: Reduction): RunResults {
  return summariseRun({ model, reduction, provenance, cautions: standingCautions(model) });
}

function drawing({ model }: CompiledModel): boolean {
  return model.draws > 0 && model.uncertainty !== null;
}

/** One draw of what is not known: its values, and the image of the model that has them, or why there is none. */
interface Draw {
  readonly draw: number;
  readonly values: DrawnValues;
  readonly image: ArrayBuffer | null;
  readonly failure: string;
}

function* drawsOf({ spec, model }: CompiledModel): Generator<Draw> {
  const { uncertainty, seed } = model;
  const draws = mostDraws(model);
  if (uncertainty === null) return;
  const number = uncertainty.table === null ? draws : Math.min(draws, uncertainty.table.length);
  for (let draw = 0; draw < number; draw++) {
    const values = drawnValues(uncertainty, seed, draw);
    const { compiled, findings } = compileSpec(withValues(spec, values));
    const failure = findings.find(({ severity }) => severity === 'error')?.message ?? '';
    yield { draw, values, image: compiled?.image ?? null, failure };
  }
}

/** For all draws together. */
export function openPooled(model: Model): Reduction {
  return openReduction({ ...model, replicates: model.replicates * mostDraws(model) });
}

interface DrawsSoFar {
  readonly reduction: Reduction;
  readonly collector: DrawCollector;
  readonly draws: number;
}

/** Looked at after whole blocks of draws only. */
function isPrecise(compiled: CompiledModel, { reduction, collector, draws }: DrawsSoFar): boolean {
  if (!endsBlockOfDraws(compiled.model, draws) || collector.done === 0) return false;
  const { outcomes } = collector.withDraws(summarise(compiled, reduction));
  return precisionOf(compiled.model, outcomes)?.reached === true;
}

function runDraws(compiled: CompiledModel, { onProgress }: RunOptions): RunResults {
  const { model } = compiled;
  const reduction = openPooled(model);
  const collector = new DrawCollector(model, reduction);
  for (const { draw, values, image, failure } of drawsOf(compiled)) {
    if (image === null) collector.fail(draw, values, failure);
    else {
      const run = openRunner(image, { steps: model.steps, seed: seedOfDraw(model.seed, draw), reuse: true });
      for (const batch of batchesOf(model.replicates)) collector.take(run(batch));
      collector.finish(draw, values, image);
    }
    onProgress?.((draw + 1) * model.replicates, model.draws * model.replicates);
    if (isPrecise(compiled, { reduction, collector, draws: draw + 1 })) break;
  }
  return withPrecision(model, collector.withDraws(summarise(compiled, reduction)));
}

/** By a crew; told to stop, the draws that were finished whole are kept. */
async function runDrawsWith(crew: Crew, compiled: CompiledModel, options: CrewOptions): Promise<FinishedRun> {
  const { model } = compiled;
  const reduction = openPooled(model);
  const collector = new DrawCollector(model, reduction);
  const batches = batchesOf(model.replicates);
  let cut = compiled;
  for (const { draw, values, image, failure } of drawsOf(compiled)) {
    if (image === null) collector.fail(draw, values, failure);
    else {
      const taken: BatchCounts[] = [];
      const request = { steps: model.steps, seed: seedOfDraw(model.seed, draw) };
      const finished = await crew.run({ images: [image], request, batches }, (batch) => taken.push(batch), options);
      if (finished < batches.length) {
        cut = withSettings(compiled, { draws: draw });
        break;
      }
      for (const batch of taken) collector.take(batch);
      collector.finish(draw, values, image);
    }
    options.onProgress?.((draw + 1) * model.replicates, model.draws * model.replicates);
    if (isPrecise(compiled, { reduction, collector, draws: draw + 1 })) break;
  }
  const results =
    collector.done === 0 ? null : withPrecision(cut.model, collector.withDraws(summarise(cut, reduction)));
  return { compiled: cut, results };
}

/** The path without chance, and beside it growth with chance in the long run, which can have the other sign. */
export function followPath(compiled: CompiledModel): PathResults {
  const { model, image, provenance } = compiled;
  const raw = runPath(image, { steps: model.steps });
  return summarisePath({
    model,
    raw,
    growth: growthWithChance(compiled),
    provenance,
    cautions: standingCautions(model),
  });
}

/** Near zero: of an average year, and in the long run of years that differ. */
export function growthWithChance(compiled: CompiledModel): PathGrowth {
  const withoutChance = growthRateOf(buildBlock(compiled, 'zero').matrix);
  const none = (reason: string): PathGrowth => ({ withoutChance, withChance: null, reason });
  if (!yearsDiffer(compiled.model)) return none('No rate varies from year to year and no catastrophe strikes.');
  const model = growingOnly(compiled.model);
  const image = model === compiled.model ? compiled.image : buildImage({ ...compiled, model });
  const request = longRunRequest(model, image);
  const withChance = longRunGrowth(runLongRun(image, request), request.years);
  return withChance === null ? none('In some years nobody is left.') : { withoutChance, withChance, reason: null };
}
