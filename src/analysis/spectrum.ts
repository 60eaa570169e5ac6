// All eigenvalues of a life cycle, how fast it settles and with which rhythm.
import { angleOf } from '../numeric/angle.ts';
import { eigenvalues, modulus, type Complex } from '../numeric/eigenvalues.ts';
import { irreduciblePair } from '../numeric/irreducible-pair.ts';
import type { Leading, LeadingBlock } from '../numeric/leading.ts';
import { principalPart } from '../numeric/principal-part.ts';
import { toDense, type DenseMatrix, type SparseMatrix } from '../numeric/sparse.ts';

export interface Spectrum {
  /** Largest modulus first. */
  readonly eigenvalues: readonly Complex[];
  /** λ₁ / |λ₂|: by this factor a year what is not in stable proportion fades. Null without a second eigenvalue or growth. */
  readonly dampingRatio: number | null;
  /** 2π / |arg λ₂|: years from wave to wave; null where λ₂ is positive (no waves) or does not exist. */
  readonly oscillationSteps: number | null;
}

/** Above this many states in one block the eigenvalues are not computed: 1.3 s at 400, growing with the cube. */
export const largestDenseBlock = 400;

/**
 * The eigenvalues of each irreducible block, together those of the matrix. Each block is first scaled by √(w/v), which
 * makes its row and column sums alike, because the eigenvalue routine does not balance.
 * Null where a block is larger than `largestDenseBlock`.
 */
export function spectrum(matrix: SparseMatrix, leading: Leading): Spectrum | null {
  if (leading.blocks.some((block) => block.states.length > largestDenseBlock)) return null;
  const all = leading.blocks.flatMap((block) => ofBlock(matrix, block));
  all.sort((a, b) => modulus(b) - modulus(a) || b.re - a.re || b.im - a.im);
  const second = all[1];
  const positive = leading.growthRate > 0;
  const size = second ? modulus(second) : 0;
  return {
    eigenvalues: all,
    dampingRatio: positive && size > 1e-12 * leading.growthRate ? dampingOf(leading.growthRate, size) : null,
    oscillationSteps: positive && second ? rhythmOf(second) : null,
  };
}

function ofBlock(matrix: SparseMatrix, block: LeadingBlock): Complex[] {
  if (block.states.length === 1) return [{ re: block.growthRate, im: 0 }];
  return eigenvalues(balanced(principalPart(matrix, block.states)));
}

function balanced(block: SparseMatrix): DenseMatrix {
  const { right, left } = irreduciblePair(block);
  const scale = right.map((share, i) => Math.sqrt(share / (left[i] ?? 1)));
  const { rows, columns, values } = toDense(block);
  const scaled = values.map((value, k) => (value * (scale[k % columns] ?? 1)) / (scale[Math.floor(k / columns)] ?? 1));
  return { rows, columns, values: scaled };
}

function dampingOf(growthRate: number, second: number): number {
  const ratio = growthRate / second;
  return Math.abs(ratio - 1) < 1e-10 ? 1 : ratio;
}

function rhythmOf({ re, im }: Complex): number | null {
  const angle = angleOf(re, im);
  return angle > 1e-9 ? (2 * Math.PI) / angle : null;
}
