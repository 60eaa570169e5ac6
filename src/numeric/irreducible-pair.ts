// Growth and positive vector of one irreducible nonnegative block, by the method that suits its size.
import { davidson } from './davidson.ts';
import { applyIncomplete, incompleteFactor } from './incomplete.ts';
import { positivePair, toShares, type PositivePair } from './positive-pair.ts';
import { toDense, type SparseMatrix } from './sparse.ts';
import { multiply } from './sparse-product.ts';

/** Blocks up to this size are solved densely. */
const denseLimit = 160;
/** And up to this one where the large method does not settle. */
const denseRescueLimit = 2500;

/**
 * The pair of an irreducible block; `start` shortens the way where something near is known.
 * Errors: throws where a block of more than 2500 states does not settle to 1e-9.
 */
export function irreduciblePair(block: SparseMatrix, start?: Float64Array): PositivePair {
  const size = block.columns;
  if (size === 1) return { growthRate: block.values[0] ?? 0, vector: Float64Array.of(1) };
  if (size <= denseLimit) return positivePair(toDense(block), start);
  const settled = settle(block, start ?? new Float64Array(size).fill(1), 30);
  const shift = settled.growthRate * 1.001;
  const preconditioner = preconditionerFor(block, shift);
  const found = davidson({
    size,
    multiply: (x) => multiply(block, x),
    precondition: preconditioner,
    start: settled.vector,
  });
  if (found.residual > 1e-9) {
    if (size <= denseRescueLimit) return positivePair(toDense(block), settled.vector);
    throw new Error(`The growth of a block of ${size} states did not settle (residual ${found.residual}).`);
  }
  const smooth = settle(block, found.vector.map(Math.abs), 3);
  return { growthRate: found.growthRate, vector: smooth.vector };
}

/** Some steps of x → (B + ρI)x, which keep a positive vector positive and forget the start. */
function settle(block: SparseMatrix, start: Float64Array, steps: number): PositivePair {
  let vector = toShares(start);
  let growthRate = 0;
  for (let step = 0; step < steps; step++) {
    const image = multiply(block, vector);
    growthRate = sum(image);
    const weight = growthRate;
    vector = toShares(vector.map((value, i) => weight * value + (image[i] ?? 0)));
  }
  return { growthRate, vector };
}

/** Incomplete elimination where it is cheap, else the diagonal. */
export function preconditionerFor(block: SparseMatrix, shift: number): (r: Float64Array) => Float64Array {
  if (eliminationCost(block) <= 3e8) {
    const factor = incompleteFactor(block, shift);
    return (r) => applyIncomplete(factor, r);
  }
  return (r) => r.slice();
}

function eliminationCost(block: SparseMatrix): number {
  let cost = 0;
  for (let j = 0; j < block.columns; j++) {
    const length = (block.columnStart[j + 1] ?? 0) - (block.columnStart[j] ?? 0);
    cost += length * length;
  }
  return cost;
}

function sum(x: Float64Array): number {
  let total = 0;
  for (const value of x) total += value;
  return total;
}
