// An approximate inverse of σI − B for large sparse nonnegative B: elimination that keeps only the places already there.
import { sparseFromTriplets, type SparseMatrix } from './sparse.ts';
import { transpose } from './sparse-product.ts';

/** Row by row: the entries of row i at rowStart[i] to rowStart[i + 1], columns ascending, the diagonal at diagonal[i]. */
export interface IncompleteFactor {
  readonly size: number;
  readonly rowStart: Int32Array;
  readonly columnIndex: Int32Array;
  readonly diagonal: Int32Array;
  readonly values: Float64Array;
}

/**
 * Incomplete LU without fill of σI − B (Meijerink & van der Vorst 1977 prove that it exists where σ is above the growth).
 * A pivot that is not positive is replaced by σ, so the result is always usable; it is only an approximation.
 */
export function incompleteFactor(b: SparseMatrix, shift: number): IncompleteFactor {
  const rows = transpose(withDiagonal(b, shift));
  const { columnStart: rowStart, rowIndex: columnIndex, values } = rows;
  const size = rows.columns;
  const diagonal = new Int32Array(size);
  const placeInRow = new Int32Array(size).fill(-1);
  for (let i = 0; i < size; i++) {
    const [start, end] = [rowStart[i] ?? 0, rowStart[i + 1] ?? 0];
    for (let k = start; k < end; k++) placeInRow[columnIndex[k] ?? 0] = k;
    diagonal[i] = placeInRow[i] ?? 0;
    for (let k = start; k < (diagonal[i] ?? 0); k++) {
      const pivotRow = columnIndex[k] ?? 0;
      const ratio = (values[k] ?? 0) / (values[diagonal[pivotRow] ?? 0] ?? 1);
      values[k] = ratio;
      for (let m = (diagonal[pivotRow] ?? 0) + 1; m < (rowStart[pivotRow + 1] ?? 0); m++) {
        const place = placeInRow[columnIndex[m] ?? 0] ?? -1;
        if (place >= 0) values[place] = (values[place] ?? 0) - ratio * (values[m] ?? 0);
      }
    }
    if (!((values[diagonal[i] ?? 0] ?? 0) > 1e-12 * shift)) values[diagonal[i] ?? 0] = shift;
    for (let k = start; k < end; k++) placeInRow[columnIndex[k] ?? 0] = -1;
  }
  return { size, rowStart, columnIndex, diagonal, values };
}

/** Solves L U x = b. */
export function applyIncomplete(factor: IncompleteFactor, b: Float64Array): Float64Array {
  const { size, rowStart, columnIndex, diagonal, values } = factor;
  const x = b.slice();
  for (let i = 0; i < size; i++) {
    let sum = x[i] ?? 0;
    for (let k = rowStart[i] ?? 0; k < (diagonal[i] ?? 0); k++) sum -= (values[k] ?? 0) * (x[columnIndex[k] ?? 0] ?? 0);
    x[i] = sum;
  }
  for (let i = size - 1; i >= 0; i--) {
    const middle = diagonal[i] ?? 0;
    let sum = x[i] ?? 0;
    for (let k = middle + 1; k < (rowStart[i + 1] ?? 0); k++) sum -= (values[k] ?? 0) * (x[columnIndex[k] ?? 0] ?? 0);
    x[i] = sum / (values[middle] ?? 1);
  }
  return x;
}

/** σI − B with every diagonal place stored, even where it holds 0. */
function withDiagonal(b: SparseMatrix, shift: number): SparseMatrix {
  const size = b.columns;
  const total = b.values.length + size;
  const [row, column, values] = [new Int32Array(total), new Int32Array(total), new Float64Array(total)];
  let filled = 0;
  for (let j = 0; j < size; j++) {
    for (let k = b.columnStart[j] ?? 0; k < (b.columnStart[j + 1] ?? 0); k++) {
      row[filled] = b.rowIndex[k] ?? 0;
      column[filled] = j;
      values[filled++] = -(b.values[k] ?? 0);
    }
    row[filled] = j;
    column[filled] = j;
    values[filled++] = shift;
  }
  const summed = sparseFromTriplets({ rows: size, columns: size, rowIndex: row, columnIndex: column, values });
  if (hasWholeDiagonal(summed)) return summed;
  for (let k = 0; k < total; k++) {
    if (row[k] === column[k] && values[k] === shift) values[k] = shift * (1 + 1e-9);
  }
  return sparseFromTriplets({ rows: size, columns: size, rowIndex: row, columnIndex: column, values });
}

function hasWholeDiagonal(matrix: SparseMatrix): boolean {
  for (let j = 0; j < matrix.columns; j++) {
    const [start, end] = [matrix.columnStart[j] ?? 0, matrix.columnStart[j + 1] ?? 0];
    if (!matrix.rowIndex.subarray(start, end).includes(j)) return false;
  }
  return true;
}
