// The analysis of a compiled model, with what decides it.
import type { AtState } from '../compile/block-matrix.ts';
import type { CompiledModel } from '../pipeline.ts';
import { against, type Compared } from './against.ts';
import { analyse } from './analyse.ts';
import type { Answer } from './answer.ts';
import { analysisInputOf } from './model-input.ts';
import type { Analysis } from './schema.ts';

export interface AnalyseOptions {
  readonly at: AtState;
  /** What the growth is compared with. */
  readonly against?: Compared;
  readonly wantEigenvalues?: boolean;
}

/** Null with the reason where the model does not come to stand still and that is where it was asked for. */
export function analyseModel(
  compiled: CompiledModel,
  { at, against: other, wantEigenvalues = false }: AnalyseOptions,
): Answer<Analysis> {
  const input = analysisInputOf(compiled, at);
  if (input.value === null) return input;
  const compared = other === undefined ? {} : { against: against(compiled, other, at) };
  return { value: { ...analyse({ ...input.value, ...compared, wantEigenvalues }), ...compiled.provenance } };
}
