// The possible correlation matrix closest to an impossible one.
import { symmetricEigen } from './eigenvalues.ts';
import type { DenseMatrix } from './sparse.ts';

export interface NearestCorrelation {
  readonly matrix: DenseMatrix;
  /** Square root of the sum of squared changes. */
  readonly distance: number;
  readonly rounds: number;
}

/**
 * Alternating projections on the matrices without negative directions and on those with unit diagonal, with Dykstra's
 * correction (Higham 2002, IMA J. Numer. Anal. 22:329-343). Linear convergence; one symmetric eigenproblem a round.
 * The input must be symmetric; its diagonal may be anything. Ends when a round changes less than `tolerance` a row.
 */
export function nearestCorrelation(given: DenseMatrix, tolerance = 1e-12, maxRounds = 5000): NearestCorrelation {
  const n = given.rows;
  checkSymmetric(given);
  let unit: Float64Array = given.values;
  let correction: Float64Array = new Float64Array(n * n);
  let rounds = 0;
  let change = Infinity;
  while (change > tolerance * n && rounds < maxRounds) {
    rounds++;
    const shifted = unit.map((value, k) => value - (correction[k] ?? 0));
    const positive = withoutNegativeDirections({ rows: n, columns: n, values: shifted });
    correction = positive.map((value, k) => value - (shifted[k] ?? 0));
    const next = positive.map((value, k) => (k % (n + 1) === 0 ? 1 : value));
    change = distanceOf(next, unit);
    unit = next;
  }
  return { matrix: { rows: n, columns: n, values: unit }, distance: distanceOf(unit, given.values), rounds };
}

function checkSymmetric({ rows, columns, values }: DenseMatrix): void {
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < i; j++) {
      if (rows !== columns || values[i * columns + j] !== values[j * columns + i]) {
        throw new RangeError('A correlation matrix must be symmetric.');
      }
    }
  }
}

function withoutNegativeDirections(matrix: DenseMatrix): Float64Array {
  const n = matrix.rows;
  const { values, vectors } = symmetricEigen(matrix);
  const result = new Float64Array(n * n);
  values.forEach((value, k) => {
    if (!(value > 0)) return;
    for (let i = 0; i < n; i++) {
      const factor = value * (vectors[i * n + k] ?? 0);
      for (let j = 0; j < n; j++) {
        const place = i * n + j;
        result[place] = (result[place] ?? 0) + factor * (vectors[j * n + k] ?? 0);
      }
    }
  });
  return result;
}

function distanceOf(a: Float64Array, b: Float64Array): number {
  return Math.sqrt(a.reduce((sum, value, k) => sum + (value - (b[k] ?? 0)) * (value - (b[k] ?? 0)), 0));
}
