// Growth and both positive vectors of one irreducible nonnegative block, by the method that suits its size.
import { condensedAt, foldingOf, largestStay, unfold, type Folding } from './condense.ts';
import { davidson } from './davidson.ts';
import { applyIncomplete, incompleteFactor } from './incomplete.ts';
import { positivePair, toShares, type PositivePair } from './positive-pair.ts';
import { toDense, type SparseMatrix } from './sparse.ts';
import { multiply, transpose } from './sparse-product.ts';

export interface IrreduciblePair {
  readonly growthRate: number;
  /** Positive, sums to 1. */
  readonly right: Float64Array;
  /** Positive, sums to 1. */
  readonly left: Float64Array;
}

/** Blocks up to this size are solved densely. */
const denseLimit = 160;
/** And up to this one where the large method does not settle. */
const denseRescueLimit = 2500;
/** Up to this size the vectors are finished densely. */
const densePolishLimit = 450;
/** And above it with at most so many multiplications. */
const polishWork = 4e8;

/** Errors: throws where a block of more than 2500 kept states does not settle to 1e-9. */
export function irreduciblePair(block: SparseMatrix): IrreduciblePair {
  const size = block.columns;
  if (size === 1) return { growthRate: block.values[0] ?? 0, right: Float64Array.of(1), left: Float64Array.of(1) };
  if (size > denseLimit) return foldedPair(block);
  const right = positivePair(toDense(block));
  return { growthRate: right.growthRate, right: right.vector, left: positivePair(toDense(transpose(block))).vector };
}

/**
 * Folds the block, finds the σ at which Q(σ) grows by σ, and unfolds both vectors. The growth of Q falls as σ rises, so
 * there is one such σ; secant steps from both sides, then the quotient vᵀBw / vᵀw.
 */
function foldedPair(block: SparseMatrix): IrreduciblePair {
  const folding = foldingOf(block);
  const { shift, vector } = matchShift(block, folding);
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
  readonly shift: number;
  readonly vector: Float64Array;
}

function matchShift(block: SparseMatrix, folding: Folding): Matched {
  const floor = largestStay(block, folding);
  let vector: Float64Array | null = null;
  const excessAt = (shift: number): number => {
    const pair = kernelPair(condensedAt(block, folding, shift), vector);
    vector = pair.vector;
    return shift - pair.growthRate;
  };
  let high = Infinity;
  let low = floor;
  let shift = Math.max(settle(block, new Float64Array(block.columns).fill(1), 30).growthRate, floor * 1.01);
  let before: { readonly shift: number; readonly excess: number } | null = null;
  for (let round = 0; round < 60; round++) {
    const excess = excessAt(shift);
    if (excess > 0) high = Math.min(high, shift);
    else low = Math.max(low, shift);
    if (Math.abs(excess) <= 2e-13 * shift) break;
    const slope = before && before.shift !== shift ? (excess - before.excess) / (shift - before.shift) : 2;
    const next: number = shift - excess / Math.max(1, slope);
    before = { shift, excess };
    const inside = next > low && next < high;
    const step: number = inside ? next : high < Infinity ? (low + high) / 2 : shift * 1.1;
    if (Math.abs(step - shift) <= 1e-15 * shift) break;
    shift = step;
  }
  return { shift, vector: vector ?? new Float64Array(folding.kept.length).fill(1) };
}

/** The right pair of what is left after folding. */
function kernelPair(kernel: SparseMatrix, start: Float64Array | null): PositivePair {
  const size = kernel.columns;
  if (size <= denseLimit) return positivePair(toDense(kernel), start ?? undefined);
  const settled = start ?? settle(kernel, new Float64Array(size).fill(1), 30).vector;
  const found = davidson({
    size,
    multiply: (x) => multiply(kernel, x),
    preconditioner: (shift) => preconditionerFor(kernel, shift),
    start: settled,
  });
  if (found.residual <= 1e-9) {
    const smooth = settle(kernel, found.vector.map(Math.abs), 2);
    return { growthRate: found.growthRate, vector: smooth.vector };
  }
  if (size <= denseRescueLimit) return positivePair(toDense(kernel), settled);
  throw new Error(`The growth of a block of ${size} states did not settle (residual ${found.residual}).`);
}

/**
 * Makes small entries as accurate as large ones, which a method that watches the whole vector leaves in the noise:
 * x_i ← Σ_{j≠i} q_ij x_j / (ρ − q_ii), forwards and backwards, where every number added is positive (Gauss-Seidel).
 */
function polish(kernel: SparseMatrix, turned: SparseMatrix, x: Float64Array): Float64Array {
  const size = kernel.columns;
  if (size <= densePolishLimit) return positivePair(toDense(kernel), x).vector;
  const growthRate = dot(x, multiply(kernel, x)) / dot(x, x);
  const y = x.slice();
  const sweeps = Math.min(2000, Math.ceil(polishWork / kernel.values.length));
  for (let sweep = 0; sweep < sweeps; sweep++) {
    let change = 0;
    for (let place = 0; place < size; place++) {
      const i = sweep % 2 === 0 ? place : size - 1 - place;
      const value = inflowShare(turned, growthRate, y, i);
      change = Math.max(change, Math.abs(value - (y[i] ?? 0)) / value);
      y[i] = value;
    }
    if (!(change > 1e-13)) break;
  }
  return y.every((value) => value > 0 && value < Infinity) ? y : x;
}

/** `turned` holds the rows of the kernel as columns. */
function inflowShare(turned: SparseMatrix, growthRate: number, x: Float64Array, i: number): number {
  let inflow = 0;
  let stay = 0;
  for (let k = turned.columnStart[i] ?? 0; k < (turned.columnStart[i + 1] ?? 0); k++) {
    const j = turned.rowIndex[k] ?? 0;
    if (j === i) stay = turned.values[k] ?? 0;
    else inflow += (turned.values[k] ?? 0) * (x[j] ?? 0);
  }
  return inflow / (growthRate - stay);
}

/** Some steps of x → (B + ρI)x, which keep a positive vector positive and forget the start. */
function settle(block: SparseMatrix, start: Float64Array, steps: number): PositivePair {
  let vector = toShares(start);
  let growthRate = 0;
  for (let step = 0; step < steps; step++) {
    const image = multiply(block, vector);
    const rate = image.reduce((sum, value) => sum + value, 0);
    growthRate = rate;
    vector = toShares(vector.map((value, i) => rate * value + (image[i] ?? 0)));
  }
  return { growthRate, vector };
}

/** Incomplete elimination where it is cheap, else none. */
function preconditionerFor(block: SparseMatrix, shift: number): (r: Float64Array) => Float64Array {
  if (eliminationCost(block) > 1e9) return (r) => r.slice();
  const factor = incompleteFactor(block, shift);
  return (r) => applyIncomplete(factor, r);
}

function eliminationCost(block: SparseMatrix): number {
  let cost = 0;
  for (let j = 0; j < block.columns; j++) {
    const length = (block.columnStart[j + 1] ?? 0) - (block.columnStart[j] ?? 0);
    cost += length * length;
  }
  return cost;
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += (a[i] ?? 0) * (b[i] ?? 0);
  return sum;
}
