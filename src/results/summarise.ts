// From raw counts to what a run says.
import type { RawPath, RawRun } from '../kernel/output.ts';
import type { Model } from '../model/model.ts';
import { momentsOf, quantilesOf } from './moments.ts';
import { summariseOutcome } from './outcome.ts';
import type { Provenance } from './provenance.ts';
import type { PathResults, RunResults, YearSummary } from './results.ts';
import { finishedRuns, type FinishedRuns } from './runs.ts';

/** Columns of the raw counts: the whole, then each patch, then each outcome. */
const wholeColumn = 0;
const firstPatchColumn = 1;

export interface RunToSummarise {
  readonly model: Model;
  readonly raw: RawRun;
  readonly provenance: Provenance;
  readonly cautions: readonly string[];
}

export function summariseRun({ model, raw, provenance, cautions }: RunToSummarise): RunResults {
  const finished = finishedRuns(raw);
  const firstOutcome = firstPatchColumn + model.patches.length;
  return {
    format: 'skein-run/1',
    ...provenance,
    seed: model.seed,
    replicates: model.replicates,
    years: model.steps,
    firstYear: model.firstYear,
    abundance: {
      whole: course(model, finished, wholeColumn),
      patches: inFileOrder(model).map((p) => ({
        patch: model.patches[p]?.name ?? '',
        byYear: course(model, finished, firstPatchColumn + p),
        empty: counts(finished).map((t) => shareEmpty(finished.at(t, firstPatchColumn + p))),
      })),
    },
    outcomes: model.outcomes.map((rule, k) =>
      summariseOutcome(finished, { rule, column: firstOutcome + k, firstYear: model.firstYear }),
    ),
    meanLowestCount: lowestCount(finished),
    patchesInUse: patchesInUse(model, finished),
    stopped: { runs: raw.stopped.length, reasons: [...new Set(raw.stopped.map(({ reason }) => reason))] },
    cautions,
  };
}

export interface PathToSummarise {
  readonly model: Model;
  readonly raw: RawPath;
  readonly provenance: Provenance;
  readonly cautions: readonly string[];
}

export function summarisePath({ model, raw, provenance, cautions }: PathToSummarise): PathResults {
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
  return { format: 'skein-path/1', ...provenance, years: model.steps, firstYear, abundance, cautions };
}

/** Indices of the patches in the order of the author's list. */
export function inFileOrder({ patches }: Model): readonly number[] {
  const order = (p: number): number => patches[p]?.fileOrder ?? 0;
  return [...patches.keys()].sort((a, b) => order(a) - order(b));
}

function counts({ steps }: FinishedRuns): readonly number[] {
  return Array.from({ length: steps + 1 }, (_, t) => t);
}

function course(model: Model, finished: FinishedRuns, column: number): readonly YearSummary[] {
  return counts(finished).map((t) => {
    const values = finished.at(t, column);
    return { year: model.firstYear - 1 + t, ...momentsOf(values), quantiles: quantilesOf(values) };
  });
}

function shareEmpty(values: Float64Array): number {
  return values.reduce((sum, value) => sum + (value === 0 ? 1 : 0), 0) / values.length;
}

/** Lowest count of each run, the start included (McCarthy & Thompson 2001). */
function lowestCount(finished: FinishedRuns): RunResults['meanLowestCount'] {
  const lowest = Float64Array.from(finished.at(0, wholeColumn));
  for (let t = 1; t <= finished.steps; t++) {
    finished.at(t, wholeColumn).forEach((animals, r) => (lowest[r] = Math.min(lowest[r] ?? Infinity, animals)));
  }
  const { mean, sd } = momentsOf(lowest);
  return { mean, sd, standardError: sd / Math.sqrt(lowest.length) };
}

function patchesInUse(model: Model, finished: FinishedRuns): RunResults['patchesInUse'] {
  return counts(finished).map((t) => {
    const used = new Float64Array(finished.runs);
    model.patches.forEach((_, p) => {
      finished.at(t, firstPatchColumn + p).forEach((animals, r) => (used[r] = (used[r] ?? 0) + (animals > 0 ? 1 : 0)));
    });
    return { year: model.firstYear - 1 + t, mean: momentsOf(used).mean, quantiles: quantilesOf(used) };
  });
}
