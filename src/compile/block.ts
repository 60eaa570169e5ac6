// The block projection matrix: the product of the phase maps in the order of the year, the last phase leftmost
// (for demography and dispersal this is the vec-permutation model of Hunter & Caswell 2005).
import { principalPart } from '../numeric/principal-part.ts';
import type { AtState, BlockMatrix } from './block-matrix.ts';
import { presentClasses } from './present-classes.ts';
import { nearZero, productOf, runYear, type Compiled } from './year-map.ts';

/** At nobody (`zero`; where births depend on the sexes, at the make-up of few), or at given P·C animals at the count. */
export function buildBlock(compiled: Compiled, at: AtState, state?: Float64Array): BlockMatrix {
  const { model } = compiled;
  const before = state ?? nearZero(compiled);
  const { maps } = runYear(compiled, before);
  const keep = keptStates(compiled);
  const n = model.classes.length;
  return {
    matrix: principalPart(productOf(maps), keep),
    states: keep.map((i) => ({ patch: Math.floor(i / n), class: i % n })),
    patches: model.patches.map((patch) => patch.name),
    classes: model.classes,
    at,
    phaseMaps: maps.map((map, i) => ({ phase: model.phases[i]?.name ?? '', map })),
  };
}

/** Indices p * C + c of the rows and columns of the block matrix. */
export function keptStates({ model }: Compiled): readonly number[] {
  const present = presentClasses(model);
  const n = model.classes.length;
  return model.patches.flatMap((_, p) => model.classes.flatMap((_, c) => (present[c] === 1 ? [p * n + c] : [])));
}
