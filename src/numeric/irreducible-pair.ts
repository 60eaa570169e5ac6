// Growth and both positive vectors of one irreducible nonnegative block, by the method that suits its size.
import { strongComponents } from './components.ts';
import { foldedGrowth, foldedPair, rateOfFolded, type Guess, type IrreduciblePair } from './folded-pair.ts';
import { denseLimit } from './kernel-pair.ts';
import { positivePair } from './positive-pair.ts';
import { transpose } from './sparse-product.ts';
import { toDense, type SparseMatrix } from './sparse.ts';

/** Errors: throws where a block of more than 2500 kept states does not settle to 1e-9. */
export function irreduciblePair(block: SparseMatrix): IrreduciblePair {
  const size = block.columns;
  if (size === 1) return { growthRate: block.values[0] ?? 0, right: Float64Array.of(1), left: Float64Array.of(1) };
  if (size > denseLimit) return foldedPair(block);
  const right = positivePair(toDense(block));
  return { growthRate: right.growthRate, right: right.vector, left: positivePair(toDense(transpose(block))).vector };
}

/** Growth alone of one irreducible block. */
export function irreducibleRate(block: SparseMatrix): number {
  if (block.columns === 1) return block.values[0] ?? 0;
  return block.columns > denseLimit ? rateOfFolded(block, 2e-13) : positivePair(toDense(block)).growthRate;
}

/**
 * Growth alone of a matrix that is near one already solved, much faster than from nothing; relative accuracy 1e-11.
 * Null where the matrix is not irreducible: then it must be split first.
 */
export function irreducibleGrowth(matrix: SparseMatrix, guess: Guess): number | null {
  if (matrix.columns < 2 || strongComponents(matrix).states.length > 1) return null;
  if (matrix.columns > denseLimit) return foldedGrowth(matrix, guess, 1e-11);
  return positivePair(toDense(matrix), guess.right).growthRate;
}
