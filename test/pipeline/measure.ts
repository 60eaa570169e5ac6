// What the tests of the pipeline look at: the block matrix as rows, its growth, and the path as plain numbers.
import { buildBlock } from '../../src/compile/block.ts';
import { leading, type Leading } from '../../src/numeric/leading.ts';
import { entryAt, type SparseMatrix } from '../../src/numeric/sparse.ts';
import { followPath, type CompiledModel } from '../../src/pipeline.ts';

export function rowsOf(matrix: SparseMatrix): number[][] {
  return Array.from({ length: matrix.rows }, (_, row) =>
    Array.from({ length: matrix.columns }, (_unused, column) => entryAt(matrix, row, column)),
  );
}

/** Near zero, empty classes left out. */
export function blockRows(compiled: CompiledModel): number[][] {
  return rowsOf(buildBlock(compiled, 'zero').matrix);
}

export function leadingOf(compiled: CompiledModel): Leading {
  return leading(buildBlock(compiled, 'zero').matrix);
}

/** At count t the animals of every class in the first patch of the list, then in the second, and so on. */
export function pathOf(compiled: CompiledModel): number[][] {
  const { abundance, years } = followPath(compiled);
  const width = abundance.length / (years + 1);
  return Array.from({ length: years + 1 }, (_, t) =>
    abundance.slice(t * width, (t + 1) * width).map(({ animals }) => animals),
  );
}

/** Infinite where the lengths differ. */
export function largestDifference(found: ArrayLike<number>, wanted: ArrayLike<number>): number {
  if (found.length !== wanted.length) return Infinity;
  return Array.from(found).reduce((most, value, i) => Math.max(most, Math.abs(value - (wanted[i] ?? NaN))), 0);
}
