// Solves (σI − B)x = b ≥ 0 for one nonnegative block B that grows more slowly than σ.
import { dot } from './dot.ts';
import { applyIncomplete, incompleteFactor } from './incomplete.ts';
import { factorShifted, solveShifted } from './shifted.ts';
import { toDense, type SparseMatrix } from './sparse.ts';
import { multiply } from './sparse-product.ts';

const denseLimit = 300;

/** x ≥ 0. Errors: throws where the block does not grow more slowly than σ, or a large one does not settle. */
export function solveBelow(block: SparseMatrix, shift: number, b: Float64Array): Float64Array {
  const size = block.columns;
  if (size === 1) return Float64Array.of((b[0] ?? 0) / (shift - (block.values[0] ?? 0)));
  if (size > denseLimit) return solveLarge(block, shift, b);
  const factored = factorShifted(toDense(block), shift);
  if (!factored) throw new Error('The block grows as fast as the shift.');
  return solveShifted(factored, b);
}

/** Stabilised biconjugate gradients (van der Vorst 1992) with incomplete elimination. */
function solveLarge(block: SparseMatrix, shift: number, b: Float64Array): Float64Array {
  const factor = incompleteFactor(block, shift);
  const apply = (x: Float64Array): Float64Array => {
    const image = multiply(block, x);
    return x.map((value, i) => shift * value - (image[i] ?? 0));
  };
  const target = 1e-14 * Math.sqrt(dot(b, b));
  let x = applyIncomplete(factor, b);
  for (let attempt = 0; attempt < 6; attempt++) {
    const r = minus(b, 1, apply(x));
    if (Math.sqrt(dot(r, r)) <= target) break;
    x = plus(
      x,
      1,
      improve(apply, (v) => applyIncomplete(factor, v), r),
    );
  }
  const left = minus(b, 1, apply(x));
  if (!(Math.sqrt(dot(left, left)) <= 1e5 * target))
    throw new Error(`A block of ${block.columns} states did not settle.`);
  return x.map((value) => Math.max(0, value));
}

type Operator = (x: Float64Array) => Float64Array;

function improve(apply: Operator, precondition: Operator, residual: Float64Array): Float64Array {
  const shadow = residual;
  const target = 1e-14 * Math.sqrt(dot(residual, residual));
  let r = residual;
  let x: Float64Array = new Float64Array(r.length);
  let direction = r;
  let rho = dot(shadow, r);
  for (let round = 0; round < 400 && Math.sqrt(dot(r, r)) > target; round++) {
    const prepared = precondition(direction);
    const image = apply(prepared);
    const alpha = rho / dot(shadow, image);
    const half = minus(r, alpha, image);
    const preparedHalf = precondition(half);
    const imageHalf = apply(preparedHalf);
    const length = dot(imageHalf, imageHalf);
    const omega = length > 0 ? dot(imageHalf, half) / length : 0;
    x = plus(plus(x, alpha, prepared), omega, preparedHalf);
    r = minus(half, omega, imageHalf);
    const next = dot(shadow, r);
    if (omega === 0 || next === 0 || !Number.isFinite(next)) break;
    direction = plus(r, ((next / rho) * alpha) / omega, minus(direction, omega, image));
    rho = next;
  }
  return x;
}

function plus(a: Float64Array, factor: number, b: Float64Array): Float64Array {
  return a.map((value, i) => value + factor * (b[i] ?? 0));
}

function minus(a: Float64Array, factor: number, b: Float64Array): Float64Array {
  return plus(a, -factor, b);
}
