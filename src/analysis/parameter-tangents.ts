// How the matrix moves with each named number of a model, through expressions, kernels and all.
import { buildBlock } from '../compile/block.ts';
import type { BlockMatrix } from '../compile/block-matrix.ts';
import { weightedSum } from '../numeric/sparse-product.ts';
import type { SparseMatrix } from '../numeric/sparse.ts';
import { compileSpec, type CompiledModel } from '../pipeline.ts';
import { applySettings } from '../spec/settings.ts';
import type { ParameterTangent } from './input.ts';

/** Relative step; the error of the difference is about its square. */
const step = 1e-5;

/**
 * ∂A/∂θ by central differences of the compiled matrix, at the same state and with the coefficients of crowding held as the
 * base model solved them. At the edge of what a number may be, from one side. Numbers that nothing uses are left out.
 */
export function parameterTangents(base: CompiledModel, block: BlockMatrix, state: Float64Array): ParameterTangent[] {
  return base.model.parameters.flatMap(({ name, value }) => {
    const width = step * Math.max(Math.abs(value), 1e-3);
    const [above, below] = [value + width, value - width].map((moved) =>
      matrixWith({ base, block, state }, name, moved),
    );
    const matrixTangent = difference([below ?? null, block.matrix, above ?? null], width);
    return matrixTangent === null || matrixTangent.values.length === 0 ? [] : [{ name, value, matrixTangent }];
  });
}

interface Around {
  readonly base: CompiledModel;
  readonly block: BlockMatrix;
  readonly state: Float64Array;
}

/** Null where the model does not allow the number. */
function matrixWith({ base, block, state }: Around, name: string, value: number): SparseMatrix | null {
  const applied = applySettings(base.spec, { set: [{ name, value: String(value) }] });
  const compiled = applied.ok ? compileSpec(applied.spec).compiled : null;
  if (!compiled) return null;
  const { model, landscape } = compiled;
  return buildBlock({ model, landscape, coefficients: base.coefficients }, block.at, state).matrix;
}

function difference(
  [below, here, above]: readonly [SparseMatrix | null, SparseMatrix, SparseMatrix | null],
  width: number,
): SparseMatrix | null {
  if (!below && !above) return null;
  const span = below && above ? 2 * width : width;
  return weightedSum([1 / span, above ?? here], [-1 / span, below ?? here]);
}
