// The story of the tool: from a spec to a model, its landscape, its compiled year and image, and to what a run says.
import { solveCapacities } from './compile/capacity.ts';
import { buildImage } from './compile/image/build.ts';
import { startAnimals } from './compile/start.ts';
import type { Compiled } from './compile/year-map.ts';
import { runPath } from './kernel/path.ts';
import { batchesOf } from './kernel/batch.ts';
import { openRunner } from './kernel/run.ts';
import { buildLandscape } from './landscape/build.ts';
import { resolveModel } from './model/resolve.ts';
import { standingCautions } from './results/cautions.ts';
import { provenanceOf, type Provenance } from './results/provenance.ts';
import type { PathResults, RunResults } from './results/results.ts';
import { openReduction, summarisePath, summariseRun } from './results/summarise.ts';
import type { Finding } from './spec/finding.ts';
import type { Spec } from './spec/schema/spec.ts';

/** Everything that is made from a spec before the first year is run. */
export interface CompiledModel extends Compiled {
  readonly spec: Spec;
  /** Whole animals at count 0, P·C. */
  readonly startAnimals: Float64Array;
  readonly image: ArrayBuffer;
  readonly provenance: Provenance;
}

export interface Compilation {
  /** Null where a mistake stands in the way. */
  readonly compiled: CompiledModel | null;
  /** Errors, warnings and notes. */
  readonly findings: readonly Finding[];
}

export function compileSpec(spec: Spec): Compilation {
  const resolved = resolveModel(spec);
  const { model } = resolved;
  if (model === null) return { compiled: null, findings: resolved.findings };
  const { landscape, findings: ofLandscape } = buildLandscape(model);
  const { coefficients, findings: ofCapacities } = solveCapacities(model);
  const { animals, findings: ofStart } = startAnimals({ model, landscape, coefficients });
  const findings = [...resolved.findings, ...ofLandscape, ...ofCapacities, ...ofStart];
  if (findings.some((finding) => finding.severity === 'error')) return { compiled: null, findings };
  const image = buildImage({ model, landscape, coefficients, startAnimals: animals });
  const provenance = provenanceOf(model.title, spec);
  return { compiled: { spec, model, landscape, coefficients, startAnimals: animals, image, provenance }, findings };
}

export interface RunOptions {
  /** Told after each batch how many replicates are done. */
  readonly onProgress?: (done: number, of: number) => void;
}

/** Stochastic replicates of one scenario. */
export function runModel({ model, image, provenance }: CompiledModel, { onProgress }: RunOptions = {}): RunResults {
  const { replicates, steps, seed } = model;
  const run = openRunner(image, { steps, seed });
  const reduction = openReduction(model);
  for (const batch of batchesOf(replicates)) {
    reduction.take(run(batch));
    onProgress?.(batch.first + batch.lanes, replicates);
  }
  return summariseRun({ model, reduction, provenance, cautions: standingCautions(model) });
}

/** The path without chance. */
export function followPath({ model, image, provenance }: CompiledModel): PathResults {
  const raw = runPath(image, { steps: model.steps });
  return summarisePath({ model, raw, provenance, cautions: standingCautions(model) });
}
