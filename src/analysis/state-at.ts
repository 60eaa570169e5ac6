// The animals at which the matrix of a model is taken.
import type { AtState } from '../compile/block-matrix.ts';
import { nearZero } from '../compile/year-map.ts';
import type { Model } from '../model/model.ts';
import type { CompiledModel } from '../pipeline.ts';
import { equilibriumFrom } from './equilibrium.ts';
import { quickYear } from './quick-year.ts';

/** P·C animals at the count; null where numbers do not come to stand still and that is where it was asked for. */
export function stateAt(compiled: CompiledModel, at: AtState): Float64Array | null {
  const { startAnimals } = compiled;
  if (at === 'zero') return nearZero(compiled);
  if (at === 'start') return startAnimals;
  if (!dependsOnNumbers(compiled.model)) return null;
  return equilibriumFrom(quickYear(compiled), startAnimals)?.animals ?? null;
}

export function dependsOnNumbers(model: Model): boolean {
  return model.crowding.length > 0 || model.phases.some(({ kind }) => kind === 'ceiling');
}
