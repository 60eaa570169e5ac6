// How much the growth rate changes with each entry of a matrix.
import { dot } from '../numeric/dot.ts';
import type { Leading } from '../numeric/leading.ts';
import { forEachEntry, type SparseMatrix } from '../numeric/sparse.ts';

/** A leading pair that is unique. */
export interface Vectors {
  readonly growthRate: number;
  readonly right: Float64Array;
  readonly left: Float64Array;
}

/** The vectors of a leading pair where it is unique and somebody persists, else null. */
export function vectorsOf({ growthRate, right, left }: Leading): Vectors | null {
  return right && left && growthRate > 0 ? { growthRate, right, left } : null;
}

export interface EntrySensitivities {
  /** ∂λ/∂a of stored entry k of the matrix: growth per unit of the entry. */
  readonly sensitivity: Float64Array;
  /** (a/λ) ∂λ/∂a: share of the growth per share of the entry. They sum to 1. */
  readonly elasticity: Float64Array;
}

/**
 * Sensitivity v_i w_j / ⟨v, w⟩ (Caswell 1978) and elasticity (de Kroon et al. 1986) of the growth to each stored entry.
 * Cost: one pass. Both hold for small changes of one entry alone.
 */
export function entrySensitivities(matrix: SparseMatrix, vectors: Vectors): EntrySensitivities {
  const { growthRate, right, left } = vectors;
  const scale = 1 / dot(left, right);
  const sensitivity = new Float64Array(matrix.values.length);
  const elasticity = new Float64Array(matrix.values.length);
  forEachEntry(matrix, (row, column, value, k) => {
    const change = (left[row] ?? 0) * (right[column] ?? 0) * scale;
    sensitivity[k] = change;
    elasticity[k] = (value / growthRate) * change;
  });
  return { sensitivity, elasticity };
}

/** ∂λ/∂θ = Σ S_ij ∂a_ij/∂θ = vᵀ(∂A/∂θ)w / ⟨v, w⟩, for a number θ that moves the whole matrix along `tangent`. */
export function sensitivityAlong(tangent: SparseMatrix, { right, left }: Vectors): number {
  let sum = 0;
  forEachEntry(tangent, (row, column, value) => (sum += (left[row] ?? 0) * value * (right[column] ?? 0)));
  return sum / dot(left, right);
}
