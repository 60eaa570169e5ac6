// Solves (I − U)x = b again and again for one nonnegative U whose powers fade: what b comes to, summed over all time.
import { strongComponents } from './components.ts';
import { solveBelow } from './downstream.ts';
import { growthRateOf } from './leading.ts';
import { principalPart } from './principal-part.ts';
import { transpose } from './sparse-product.ts';
import type { SparseMatrix } from './sparse.ts';

export interface Fading {
  /** x = (I − U)⁻¹ b, b ≥ 0. */
  readonly sum: (b: Float64Array) => Float64Array;
  /** x = (I − Uᵀ)⁻¹ b, b ≥ 0. */
  readonly sumTransposed: (b: Float64Array) => Float64Array;
}

/**
 * Block by block along the order in which states send to one another, so that a U without loops but from a state to itself
 * costs one pass a solve. Null where the powers of U do not fade (growth of 1 or more).
 */
export function fadingSums(matrix: SparseMatrix): Fading | null {
  if (!(growthRateOf(matrix) < 1)) return null;
  const forward = blocksOf(matrix);
  const turned = transpose(matrix);
  const backward = forward.map(({ states }) => ({ states, part: principalPart(turned, states) })).reverse();
  return {
    sum: (b) => solveInOrder(matrix, forward, b),
    sumTransposed: (b) => solveInOrder(turned, backward, b),
  };
}

interface Block {
  readonly states: Int32Array;
  readonly part: SparseMatrix;
}

function blocksOf(matrix: SparseMatrix): Block[] {
  return strongComponents(matrix).states.map((states) => ({ states, part: principalPart(matrix, states) }));
}

function solveInOrder(matrix: SparseMatrix, blocks: readonly Block[], b: Float64Array): Float64Array {
  const inflow = b.slice();
  const x = new Float64Array(b.length);
  for (const { states, part } of blocks) {
    const given = Float64Array.from(states, (state) => inflow[state] ?? 0);
    if (!given.some((value) => value > 0)) continue;
    const solved = solveBelow(part, 1, given);
    states.forEach((state, place) => {
      const value = solved[place] ?? 0;
      x[state] = value;
      for (let k = matrix.columnStart[state] ?? 0; k < (matrix.columnStart[state + 1] ?? 0); k++) {
        const to = matrix.rowIndex[k] ?? 0;
        inflow[to] = (inflow[to] ?? 0) + (matrix.values[k] ?? 0) * value;
      }
    });
  }
  return x;
}
