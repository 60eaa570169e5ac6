// Growth and both positive vectors of a large irreducible block: fold, match the shift, unfold.
import { condensedAt, foldingOf, largestStay, unfold, type Folding } from './condense.ts';
import { dot } from './dot.ts';
import { kernelPair, polish, settle } from './kernel-pair.ts';
import { toShares } from './positive-pair.ts';
import type { SparseMatrix } from './sparse.ts';
import { multiply, transpose } from './sparse-product.ts';

export interface IrreduciblePair {
  readonly growthRate: number;
  /** Positive, sums to 1. */
  readonly right: Float64Array;
  /** Positive, sums to 1. */
  readonly left: Float64Array;
}

/**
 * Folds the block, finds the σ at which Q(σ) grows by σ, and unfolds both vectors. The growth of Q falls as σ rises, so
 * there is one such σ; secant steps from both sides, then the quotient vᵀBw / vᵀw.
 */
export function foldedPair(block: SparseMatrix): IrreduciblePair {
  const { folding, shift, vector } = foldAndMatch(block, { guess: null, tolerance: 2e-13 });
  const turned = transpose(block);
  const back: Folding = { kept: folding.kept, folded: folding.folded.slice().reverse() };
  const kernel = condensedAt(block, folding, shift);
  const kernelTurned = transpose(kernel);
  const leftKept = kernelPair(kernelTurned, null).vector;
  const right = toShares(unfold(block, folding, shift, polish(kernel, kernelTurned, vector)));
  const left = toShares(unfold(turned, back, shift, polish(kernelTurned, kernel, leftKept)));
  return { growthRate: dot(left, multiply(block, right)) / dot(left, right), right, left };
}

interface Matched {
  readonly folding: Folding;
  readonly shift: number;
  readonly vector: Float64Array;
}

/** Something near the answer, such as that of a matrix that differs little. */
export interface Guess {
  readonly growthRate: number;
  /** Over all states, positive. */
  readonly right: Float64Array;
}

/** The growth alone, from a guess. `tolerance` is relative. */
export function foldedGrowth(block: SparseMatrix, guess: Guess, tolerance: number): number {
  return foldAndMatch(block, { guess, tolerance }).shift;
}

/** The growth alone. `tolerance` is relative. */
export function rateOfFolded(block: SparseMatrix, tolerance: number): number {
  return foldAndMatch(block, { guess: null, tolerance }).shift;
}

interface Wanted {
  readonly guess: Guess | null;
  readonly tolerance: number;
}

/** Growth must be above what stays in a folded state by this share, or the state is kept. */
const clearance = 1e-3;

/** A folded state in which nearly as much stays as the whole grows by would make Q(σ) too steep: those are kept instead. */
function foldAndMatch(block: SparseMatrix, wanted: Wanted): Matched {
  const first = foldingOf(block);
  const floor = largestStay(block, first);
  const matched = matchShift(block, first, wanted);
  if (matched.shift > floor * (1 + clearance)) return matched;
  return matchShift(block, foldingOf(block, floor * 0.9), wanted);
}

function matchShift(block: SparseMatrix, folding: Folding, { guess, tolerance }: Wanted): Matched {
  const floor = largestStay(block, folding);
  let vector: Float64Array | null = guess && Float64Array.from(folding.kept, (state) => guess.right[state] ?? 0);
  const excessAt = (shift: number): number => {
    const pair = kernelPair(condensedAt(block, folding, shift), vector);
    vector = pair.vector;
    return shift - pair.growthRate;
  };
  let high = Infinity;
  let low = floor;
  let shift = Math.max(guess?.growthRate ?? settle(block, ones(block.columns), 30).growthRate, floor * 1.01);
  let before: { readonly shift: number; readonly excess: number } | null = null;
  for (let round = 0; round < 60; round++) {
    const excess = excessAt(shift);
    if (excess > 0) high = Math.min(high, shift);
    else low = Math.max(low, shift);
    if (Math.abs(excess) <= tolerance * shift) break;
    const slope = before && before.shift !== shift ? (excess - before.excess) / (shift - before.shift) : 2;
    const next: number = shift - excess / Math.max(1, slope);
    before = { shift, excess };
    const inside = next > low && next < high;
    const step: number = inside ? next : high < Infinity ? (low + high) / 2 : shift * 1.1;
    if (Math.abs(step - shift) <= 1e-15 * shift) break;
    shift = step;
  }
  return { folding, shift, vector: vector ?? ones(folding.kept.length) };
}

function ones(size: number): Float64Array {
  return new Float64Array(size).fill(1);
}
