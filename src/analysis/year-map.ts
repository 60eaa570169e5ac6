// A year that depends on how many there are: what the analyses near capacity ask of it.
import type { DenseMatrix, SparseMatrix } from '../numeric/sparse.ts';

export interface YearMap {
  /** Number of states. */
  readonly states: number;
  /** The state a year on. */
  readonly apply: (animals: Float64Array) => Float64Array;
  /** The matrix A(n) with apply(n) = A(n) n. */
  readonly matrixAt: (animals: Float64Array) => SparseMatrix;
  /** ∂apply/∂n. Where it is missing, differences are taken. */
  readonly jacobianAt?: (animals: Float64Array) => SparseMatrix;
}

/** ∂apply/∂n at `animals`, entry (i, j) at i * n + j: given, or by central differences (relative error about 1e-9). */
export function jacobianOf(map: YearMap, animals: Float64Array): DenseMatrix {
  const n = map.states;
  const values = new Float64Array(n * n);
  const given = map.jacobianAt?.(animals);
  if (given) {
    for (let j = 0; j < n; j++) {
      for (let k = given.columnStart[j] ?? 0; k < (given.columnStart[j + 1] ?? 0); k++) {
        values[(given.rowIndex[k] ?? 0) * n + j] = given.values[k] ?? 0;
      }
    }
    return { rows: n, columns: n, values };
  }
  const total = animals.reduce((sum, value) => sum + value, 0);
  for (let j = 0; j < n; j++) {
    const here = animals[j] ?? 0;
    const wanted = 1e-5 * Math.max(here, total / n, 1e-6);
    const step = Math.min(wanted, here > 0 ? here / 2 : wanted);
    const up = map.apply(shifted(animals, j, step));
    const down = here > 0 ? map.apply(shifted(animals, j, -step)) : map.apply(animals);
    const width = here > 0 ? 2 * step : step;
    for (let i = 0; i < n; i++) values[i * n + j] = ((up[i] ?? 0) - (down[i] ?? 0)) / width;
  }
  return { rows: n, columns: n, values };
}

function shifted(animals: Float64Array, place: number, by: number): Float64Array {
  const x = animals.slice();
  x[place] = (x[place] ?? 0) + by;
  return x;
}
