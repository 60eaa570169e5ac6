// Sparse matrices by column, the form in which the block projection matrix travels, and dense ones by row.

/** Compressed columns: the entries of column j stand at columnStart[j] to columnStart[j + 1], rows ascending, no zeros. */
export interface SparseMatrix {
  readonly rows: number;
  readonly columns: number;
  readonly columnStart: Int32Array;
  readonly rowIndex: Int32Array;
  readonly values: Float64Array;
}

/** Row by row: entry (i, j) at i * columns + j. */
export interface DenseMatrix {
  readonly rows: number;
  readonly columns: number;
  readonly values: Float64Array;
}

/** Entry k is `values[k]` in row `rowIndex[k]` and column `columnIndex[k]`; any order, repeated places are summed. */
export interface Triplets {
  readonly rows: number;
  readonly columns: number;
  readonly rowIndex: ArrayLike<number>;
  readonly columnIndex: ArrayLike<number>;
  readonly values: ArrayLike<number>;
}

/** Sorts by two stable counting passes (row, then column), sums repeats in the order given and leaves zeros out. */
export function sparseFromTriplets(triplets: Triplets): SparseMatrix {
  const { rows, columns, rowIndex, columnIndex, values } = triplets;
  const count = values.length;
  checkPlaces(triplets);
  const byRow = countingOrder(rowIndex, rows, indices(count));
  const order = countingOrder(columnIndex, columns, byRow);
  const columnStart = new Int32Array(columns + 1);
  const outRow = new Int32Array(count);
  const outValue = new Float64Array(count);
  let filled = 0;
  let k = 0;
  for (let column = 0; column < columns; column++) {
    while (k < count && columnIndex[order[k] ?? 0] === column) {
      const row = rowIndex[order[k] ?? 0] ?? 0;
      let sum = 0;
      for (; k < count && columnIndex[order[k] ?? 0] === column && rowIndex[order[k] ?? 0] === row; k++) {
        sum += values[order[k] ?? 0] ?? 0;
      }
      if (sum === 0) continue;
      outRow[filled] = row;
      outValue[filled++] = sum;
    }
    columnStart[column + 1] = filled;
  }
  return { rows, columns, columnStart, rowIndex: outRow.slice(0, filled), values: outValue.slice(0, filled) };
}

/** A sparse matrix from rows of numbers, as matrices are printed. */
export function sparseFromRows(rows: readonly (readonly number[])[]): SparseMatrix {
  const columns = rows[0]?.length ?? 0;
  if (rows.some((row) => row.length !== columns)) throw new RangeError('The rows differ in length.');
  return sparseFromDense({ rows: rows.length, columns, values: Float64Array.from(rows.flat()) });
}

export function sparseFromDense(dense: DenseMatrix): SparseMatrix {
  const { rows, columns, values } = dense;
  const columnStart = new Int32Array(columns + 1);
  const rowIndex: number[] = [];
  const kept: number[] = [];
  for (let j = 0; j < columns; j++) {
    for (let i = 0; i < rows; i++) {
      const value = values[i * columns + j] ?? 0;
      if (value === 0) continue;
      rowIndex.push(i);
      kept.push(value);
    }
    columnStart[j + 1] = kept.length;
  }
  return { rows, columns, columnStart, rowIndex: Int32Array.from(rowIndex), values: Float64Array.from(kept) };
}

export function toDense(matrix: SparseMatrix): DenseMatrix {
  const { rows, columns, columnStart, rowIndex, values } = matrix;
  const dense = new Float64Array(rows * columns);
  for (let j = 0; j < columns; j++) {
    for (let k = columnStart[j] ?? 0; k < (columnStart[j + 1] ?? 0); k++) {
      dense[(rowIndex[k] ?? 0) * columns + j] = values[k] ?? 0;
    }
  }
  return { rows, columns, values: dense };
}

/** Entry (row, column), 0 where nothing is stored. Binary search in the column. */
export function entryAt(matrix: SparseMatrix, row: number, column: number): number {
  let low = matrix.columnStart[column] ?? 0;
  let high = (matrix.columnStart[column + 1] ?? 0) - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    const here = matrix.rowIndex[middle] ?? 0;
    if (here === row) return matrix.values[middle] ?? 0;
    if (here < row) low = middle + 1;
    else high = middle - 1;
  }
  return 0;
}

/** Calls `visit` for every stored entry, column by column. `index` is the place in `values`. */
export function forEachEntry(
  matrix: SparseMatrix,
  visit: (row: number, column: number, value: number, index: number) => void,
): void {
  const { columns, columnStart, rowIndex, values } = matrix;
  for (let j = 0; j < columns; j++) {
    const end = columnStart[j + 1] ?? 0;
    for (let k = columnStart[j] ?? 0; k < end; k++) visit(rowIndex[k] ?? 0, j, values[k] ?? 0, k);
  }
}

function checkPlaces({ rows, columns, rowIndex, columnIndex, values }: Triplets): void {
  if (rowIndex.length !== values.length || columnIndex.length !== values.length) {
    throw new RangeError('Rows, columns and values of the triplets differ in number.');
  }
  for (let k = 0; k < values.length; k++) {
    const row = rowIndex[k] ?? -1;
    const column = columnIndex[k] ?? -1;
    if (!(row >= 0 && row < rows && column >= 0 && column < columns)) {
      throw new RangeError(`Entry ${k} is at (${row}, ${column}), outside ${rows} × ${columns}.`);
    }
  }
}

function indices(count: number): Int32Array {
  return Int32Array.from({ length: count }, (_, k) => k);
}

function countingOrder(keys: ArrayLike<number>, keyCount: number, order: Int32Array): Int32Array {
  const next = new Int32Array(keyCount + 1);
  for (let k = 0; k < order.length; k++) {
    const key = (keys[k] ?? 0) + 1;
    next[key] = (next[key] ?? 0) + 1;
  }
  for (let key = 0; key < keyCount; key++) next[key + 1] = (next[key + 1] ?? 0) + (next[key] ?? 0);
  const sorted = new Int32Array(order.length);
  for (const k of order) {
    const key = keys[k] ?? 0;
    const place = next[key] ?? 0;
    sorted[place] = k;
    next[key] = place + 1;
  }
  return sorted;
}
