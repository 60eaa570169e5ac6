// How the matrix moves with a named number, by central differences of the compiled matrix: where exact slopes do not reach.
import { buildBlock } from '../compile/block.ts';
import type { BlockMatrix } from '../compile/block-matrix.ts';
import type { CrowdingRule } from '../compile/slopes/coefficient-slopes.ts';
import { weightedSum } from '../numeric/sparse-product.ts';
import type { SparseMatrix } from '../numeric/sparse.ts';
import { compileSpec, type CompiledModel } from '../pipeline.ts';
import { applySettings } from '../spec/settings.ts';

/** Relative step; the error of the difference is about its square. */
const step = 1e-5;

export interface Around {
  readonly base: CompiledModel;
  readonly block: BlockMatrix;
  readonly state: Float64Array;
}

export interface MovedNumber {
  readonly name: string;
  readonly value: number;
  readonly rule: CrowdingRule;
}

/** At the edge of what the number may be, from one side. Null where the model allows no other number. */
export function differenceTangent(around: Around, moved: MovedNumber): SparseMatrix | null {
  const width = step * Math.max(Math.abs(moved.value), 0.01);
  const [above = null, below = null] = [moved.value + width, moved.value - width].map((value) =>
    matrixWith(around, { ...moved, value }),
  );
  if (!below && !above) return null;
  const span = below && above ? 2 * width : width;
  return weightedSum([1 / span, above ?? around.block.matrix], [-1 / span, below ?? around.block.matrix]);
}

/** Null where the model does not allow the number. */
function matrixWith({ base, block, state }: Around, { name, value, rule }: MovedNumber): SparseMatrix | null {
  const applied = applySettings(base.spec, { set: [{ name, value: String(value) }] });
  const compiled = applied.ok ? compileSpec(applied.spec).compiled : null;
  if (!compiled) return null;
  const coefficients = rule === 'held' ? base.coefficients : compiled.coefficients;
  return buildBlock({ ...compiled, coefficients }, block.at, state).matrix;
}
