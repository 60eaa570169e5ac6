// Growth and positive vector of what is left of a large life cycle after folding.
import { davidson } from './davidson.ts';
import { dot } from './dot.ts';
import { applyIncomplete, incompleteFactor } from './incomplete.ts';
import { positivePair, toShares, type PositivePair } from './positive-pair.ts';
import { toDense, type SparseMatrix } from './sparse.ts';
import { multiply } from './sparse-product.ts';

/** Matrices up to this size are solved densely. */
export const denseLimit = 160;
/** And up to this one where the large method does not settle. */
const denseRescueLimit = 2500;
/** Up to this size the vectors are finished densely. */
const densePolishLimit = 450;
/** And above it with at most so many multiplications. */
const polishWork = 4e8;

/** Multiplications of an elimination without fill. */
const mostElimination = 1e9;
/** Largest change of any entry, as a share of it. */
const settledChange = 1e-13;

/** The right pair. Errors: throws where a matrix of more than 2500 states does not settle to 1e-9. */
export function kernelPair(kernel: SparseMatrix, start: Float64Array | null): PositivePair {
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
 * Makes small entries as accurate as large ones, which a method that watches the whole vector leaves in the noise. Where elimination
 * without fill is cheap, x ← x + M⁻¹(Qx − ρx) with M near σI − Q, σ just above ρ: the residual of a row is as accurate as the entry
 * of that row, and M⁻¹ ≥ 0 carries it to the ends of the landscape at once. Entries below the noise begin at 0. Else Gauss-Seidel.
 */
export function polish(kernel: SparseMatrix, turned: SparseMatrix, x: Float64Array): Float64Array {
  const size = kernel.columns;
  if (size <= densePolishLimit) return positivePair(toDense(kernel), x).vector;
  const growthRate = dot(x, multiply(kernel, x)) / dot(x, x);
  const near = eliminationCost(kernel) > mostElimination ? null : corrected(kernel, growthRate, x);
  if (near !== null) return near;
  const y = swept(turned, growthRate, x);
  return y.every((value) => value > 0 && value < Infinity) ? y : x;
}

/** σ of the elimination above the growth, as a share of it. */
const clearance = 1e-4;
/** Smaller shares of the largest entry are noise. */
const noise = 1e-11;
const mostCorrections = 400;
/** Below this largest change, as a share of an entry, one that no longer falls is that of rounding. */
const nearlySettled = 1e-10;

/** Null where it does not settle on a positive vector. */
function corrected(kernel: SparseMatrix, growthRate: number, x: Float64Array): Float64Array | null {
  const factor = incompleteFactor(kernel, growthRate * (1 + clearance));
  const least = noise * x.reduce((most, value) => Math.max(most, value), 0);
  const y = x.map((value) => (value < least ? 0 : value));
  let before = Infinity;
  for (let round = 0; round < mostCorrections; round++) {
    const residual = multiply(kernel, y);
    for (let i = 0; i < y.length; i++) residual[i] = (residual[i] ?? 0) - growthRate * (y[i] ?? 0);
    const step = applyIncomplete(factor, residual);
    let change = 0;
    for (let i = 0; i < y.length; i++) {
      const next = (y[i] ?? 0) + (step[i] ?? 0);
      y[i] = next;
      const share = Math.abs(step[i] ?? 0) / next;
      if (!(share <= change)) change = share >= 0 ? share : Infinity;
    }
    if (change <= settledChange || (change <= nearlySettled && change > 0.95 * before)) {
      return y.every((value) => value > 0 && value < Infinity) ? y : null;
    }
    before = change;
  }
  return null;
}

/** x_i ← Σ_{j≠i} q_ij x_j / (ρ − q_ii), forwards and backwards, where every number added is positive. */
function swept(turned: SparseMatrix, growthRate: number, x: Float64Array): Float64Array {
  const size = turned.columns;
  const y = x.slice();
  const sweeps = Math.min(2000, Math.ceil(polishWork / turned.values.length));
  for (let sweep = 0; sweep < sweeps; sweep++) {
    let change = 0;
    for (let place = 0; place < size; place++) {
      const i = sweep % 2 === 0 ? place : size - 1 - place;
      const value = inflowShare(turned, growthRate, y, i);
      change = Math.max(change, Math.abs(value - (y[i] ?? 0)) / value);
      y[i] = value;
    }
    if (!(change > settledChange)) break;
  }
  return y;
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
export function settle(block: SparseMatrix, start: Float64Array, steps: number): PositivePair {
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
  if (eliminationCost(block) > mostElimination) return (r) => r.slice();
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
