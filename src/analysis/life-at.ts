// The matrix of a year at a state, with births apart from what becomes of the animals themselves.
import { buildBlock } from '../compile/block.ts';
import type { AtState, BlockMatrix } from '../compile/block-matrix.ts';
import { phaseMap } from '../compile/phase-map.ts';
import { linearisedBlock } from '../compile/slopes/linearised.ts';
import { productOf, runYear, type Compiled } from '../compile/year-map.ts';
import { principalPart } from '../numeric/principal-part.ts';
import { multiply, product, weightedSum } from '../numeric/sparse-product.ts';
import type { SparseMatrix } from '../numeric/sparse.ts';
import { placesOf } from './label.ts';
import type { LifeSplit } from './life-history.ts';

export interface LifeAt {
  readonly block: BlockMatrix;
  readonly split: LifeSplit;
  /** Whether the matrix is the slope of a year that no matrix does. */
  readonly linearised: boolean;
}

/** At P·C animals. */
export function lifeAt(compiled: Compiled, at: AtState, state: Float64Array): LifeAt {
  const linearised = at === 'zero' ? linearisedBlock(compiled) : null;
  const block = linearised ?? buildBlock(compiled, at, state);
  const split = splitAt(compiled, block, state);
  return { block, split: linearised === null ? split : apart(linearised, split), linearised: linearised !== null };
}

/** The young that one more animal brings are all that is not the animals themselves. */
function apart({ matrix }: BlockMatrix, { fates }: LifeSplit): LifeSplit {
  const births = weightedSum([1, matrix], [-1, fates]);
  return { fates, births: { ...births, values: births.values.map((young) => Math.max(0, young)) } };
}

/**
 * U is the product of what each phase does to the animals themselves; F sums, over the phases with births, what later phases
 * make of the young of animals that came through the earlier ones: A = U + F.
 */
function splitAt(compiled: Compiled, block: BlockMatrix, state: Float64Array): LifeSplit {
  const { maps, multipliers } = runYear(compiled, state);
  const { model, landscape } = compiled;
  let here = state;
  let fates: SparseMatrix | null = null;
  let births: SparseMatrix | null = null;
  maps.forEach((map, index) => {
    const request = { model, landscape, step: 1, multipliers, state: here };
    const young = phaseMap(index, { ...request, part: 'births' });
    const own = phaseMap(index, { ...request, part: 'fates' });
    const born: SparseMatrix = fates ? product(young, fates) : young;
    births = births ? weightedSum([1, product(map, births)], [1, born]) : born;
    fates = fates ? product(own, fates) : own;
    here = multiply(map, here);
  });
  const places = placesOf(block);
  const none = productOf(maps);
  return { fates: principalPart(fates ?? none, places), births: principalPart(births ?? none, places) };
}
