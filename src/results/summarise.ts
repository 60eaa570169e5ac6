// From raw counts to what a run says.
import type { RawPath } from '../kernel/output.ts';
import { isHandling } from '../compile/image/handling.ts';
import type { Model } from '../model/model.ts';
import { watchedCounts } from '../model/watched.ts';
import { summariseHandled } from './handled.ts';
import { summariseObserved } from './observed.ts';
import { summariseOutcome } from './outcome.ts';
import { mostReplicates } from './precision.ts';
import type { Provenance } from './provenance.ts';
import { exactBelow, relativeError } from './reduction/bins.ts';
import type { Counts } from './reduction/counts.ts';
import { Reduction } from './reduction/reduction.ts';
import type { OutcomeResult, PathGrowth, PathResults, RunResults, Sketched, YearSummary } from './results.ts';

/** For as many replicates as can come. */
export function openReduction(model: Model): Reduction {
  const { patches, steps, outcomes } = model;
  const replicates = mostReplicates(model);
  const watched = watchedCounts(model).length;
  const handled = model.phases.filter(isHandling).length;
  return new Reduction({ patches: patches.length, steps, replicates, outcomes, watched, handled });
}

export interface RunToSummarise {
  readonly model: Model;
  readonly reduction: Reduction;
  readonly provenance: Provenance;
  readonly cautions: readonly string[];
}

export function summariseRun({ model, reduction, provenance, cautions }: RunToSummarise): RunResults {
  const { runs, stopped } = reduction;
  const { firstYear } = model;
  const outcomes = summariseOutcomes(model, reduction);
  const observed = summariseObserved(model, reduction);
  return {
    format: 'skein-run/1',
    ...provenance,
    seed: model.seed,
    replicates: model.replicates,
    years: model.steps,
    firstYear,
    abundance: {
      whole: counts(model).map((t) => yearSummary(model, t, reduction.whole.summary(t, runs))),
      patches: inFileOrder(model).map((p) => patchCourse(model, reduction, p)),
    },
    outcomes,
    handled: summariseHandled(model, reduction),
    meanLowestCount: lowestCount(reduction),
    patchesInUse: patchesInUse(model, reduction),
    ...(observed === undefined ? {} : { observed }),
    sketched: sketchedQuantiles(reduction),
    ...(model.uncertainty !== null && model.draws === 0 ? { notDrawn: true as const } : {}),
    stopped: { runs: stopped.length, reasons: [...new Set(stopped.map(({ reason }) => reason))] },
    cautions,
  };
}

export function summariseOutcomes(
  { outcomes, firstYear }: Model,
  { hits: all, runs }: Reduction,
): readonly OutcomeResult[] {
  return outcomes.flatMap((rule, k) => {
    const hits = all[k];
    return hits === undefined ? [] : [summariseOutcome({ rule, hits, runs, firstYear })];
  });
}

export interface PathToSummarise {
  readonly model: Model;
  readonly raw: RawPath;
  readonly growth: PathGrowth;
  readonly provenance: Provenance;
  readonly cautions: readonly string[];
}

export function summarisePath({ model, raw, growth, provenance, cautions }: PathToSummarise): PathResults {
  const { patches, classes, firstYear } = model;
  const order = inFileOrder(model);
  const abundance = Array.from({ length: raw.steps + 1 }, (_, t) =>
    order.flatMap((p) =>
      classes.map((name, c) => ({
        year: firstYear - 1 + t,
        patch: patches[p]?.name ?? '',
        class: name,
        animals: raw.animals[(t * patches.length + p) * classes.length + c] ?? 0,
      })),
    ),
  ).flat();
  return { format: 'skein-path/1', ...provenance, years: model.steps, firstYear, abundance, growth, cautions };
}

/** Indices of the patches in the order of the author's list. */
export function inFileOrder({ patches }: Model): readonly number[] {
  const order = (p: number): number => patches[p]?.fileOrder ?? 0;
  return [...patches.keys()].sort((a, b) => order(a) - order(b));
}

function counts({ steps }: Model): readonly number[] {
  return Array.from({ length: steps + 1 }, (_, t) => t);
}

function yearSummary({ firstYear }: Model, t: number, summary: ReturnType<Counts['summary']>): YearSummary {
  return { year: firstYear - 1 + t, ...summary };
}

function patchCourse(
  model: Model,
  { patches, runs }: Reduction,
  p: number,
): RunResults['abundance']['patches'][number] {
  const cell = (t: number): number => t * model.patches.length + p;
  return {
    patch: model.patches[p]?.name ?? '',
    byYear: counts(model).map((t) => yearSummary(model, t, patches.summary(cell(t), runs))),
    empty: counts(model).map((t) => patches.empty(cell(t)) / runs),
  };
}

/** Lowest count of each run, the start included (McCarthy & Thompson 2001). */
function lowestCount(reduction: Reduction): RunResults['meanLowestCount'] {
  const { mean, sd } = reduction.lowestCount();
  return { mean, sd, standardError: sd / Math.sqrt(reduction.runs) };
}

function patchesInUse(model: Model, { inUse, runs }: Reduction): RunResults['patchesInUse'] {
  return counts(model).map((t) => {
    const { mean, quantiles } = inUse.summary(t, runs);
    return { year: model.firstYear - 1 + t, mean, quantiles };
  });
}

function sketchedQuantiles({ whole, patches, inUse, watched }: Reduction): readonly Sketched[] {
  const all = [
    ['abundance.whole', whole],
    ['abundance.patches', patches],
    ['patchesInUse', inUse],
    ...(watched === null ? [] : [['observed.abundance', watched] as const]),
  ] as const;
  return all.flatMap(([quantilesOf, { exact }]) => (exact ? [] : [{ quantilesOf, exactBelow, relativeError }]));
}
