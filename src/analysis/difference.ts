// Which entries make two matrices grow differently: a life table response experiment with fixed treatments.
import { dot } from '../numeric/dot.ts';
import { growthRateOf, leading } from '../numeric/leading.ts';
import { weightedSum } from '../numeric/sparse-product.ts';
import { forEachEntry, type SparseMatrix } from '../numeric/sparse.ts';
import { vectorsOf } from './sensitivity.ts';

export interface EntryContribution {
  readonly row: number;
  readonly column: number;
  readonly difference: number;
  /** What the entry adds to λ of the treated less λ of the reference. */
  readonly contribution: number;
}

export interface GrowthDifference {
  readonly difference: number;
  readonly contributions: readonly EntryContribution[];
  /** The difference less all contributions: what the first-order split leaves unexplained. */
  readonly unexplained: number;
}

/**
 * λ_treated − λ_reference ≈ Σ (a_treated − a_reference) ∂λ/∂a at the matrix half-way (Caswell 1989, from memory). The
 * half-way point makes the error of third order in the differences. Null where that matrix has no unique vectors.
 */
export function growthDifference(treated: SparseMatrix, reference: SparseMatrix): GrowthDifference | null {
  const vectors = vectorsOf(leading(weightedSum([0.5, treated], [0.5, reference])));
  if (!vectors) return null;
  const { right, left } = vectors;
  const scale = 1 / dot(left, right);
  const contributions: EntryContribution[] = [];
  let explained = 0;
  forEachEntry(weightedSum([1, treated], [-1, reference]), (row, column, difference) => {
    const contribution = difference * (left[row] ?? 0) * (right[column] ?? 0) * scale;
    explained += contribution;
    contributions.push({ row, column, difference, contribution });
  });
  const difference = growthRateOf(treated) - growthRateOf(reference);
  return { difference, contributions, unexplained: difference - explained };
}
