// All eigenvalues of a small matrix. The one file that knows the library for dense eigenproblems.
import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { DenseMatrix } from './sparse.ts';

export interface Complex {
  readonly re: number;
  readonly im: number;
}

export interface EigenPairs {
  readonly values: readonly Complex[];
  /** Column j at i * n + j; a complex pair holds its real and imaginary parts in its two columns. */
  readonly vectors: Float64Array;
}

export function modulus({ re, im }: Complex): number {
  const [a, b] = [Math.abs(re), Math.abs(im)];
  const large = Math.max(a, b);
  if (large === 0) return 0;
  const ratio = Math.min(a, b) / large;
  return large * Math.sqrt(1 + ratio * ratio);
}

/** All eigenvalues of a dense square matrix, largest modulus first. Cost about 25 n³: 1.3 s at n = 400. */
export function eigenvalues(matrix: DenseMatrix): Complex[] {
  return [...eigenPairs(matrix).values].sort((a, b) => modulus(b) - modulus(a) || b.re - a.re || b.im - a.im);
}

/** Eigenvalues and right vectors as the library gives them, unsorted. */
export function eigenPairs(matrix: DenseMatrix): EigenPairs {
  const n = matrix.rows;
  const found = new EigenvalueDecomposition(Matrix.from1DArray(n, n, matrix.values), { assumeSymmetric: false });
  const imaginary = found.imaginaryEigenvalues;
  const values = found.realEigenvalues.map((re, k) => ({ re, im: imaginary[k] ?? 0 }));
  return { values, vectors: Float64Array.from(found.eigenvectorMatrix.to1DArray()) };
}

/** Eigenvalues (ascending) and orthonormal vectors (columns) of a symmetric matrix. */
export function symmetricEigen(matrix: DenseMatrix): { readonly values: Float64Array; readonly vectors: Float64Array } {
  const n = matrix.rows;
  const found = new EigenvalueDecomposition(Matrix.from1DArray(n, n, matrix.values), { assumeSymmetric: true });
  return {
    values: Float64Array.from(found.realEigenvalues),
    vectors: Float64Array.from(found.eigenvectorMatrix.to1DArray()),
  };
}
