// Products of sparse matrices, with vectors and with one another.
import { sparseFromTriplets, type SparseMatrix } from './sparse.ts';

/** y = A x. Cost: one multiplication an entry. `into` is overwritten when given. */
export function multiply(matrix: SparseMatrix, x: Float64Array, into?: Float64Array): Float64Array {
  const { rows, columns, columnStart, rowIndex, values } = matrix;
  checkLength(x, columns);
  const y = into ?? new Float64Array(rows);
  y.fill(0);
  for (let j = 0; j < columns; j++) {
    const factor = x[j] ?? 0;
    if (factor === 0) continue;
    const end = columnStart[j + 1] ?? 0;
    for (let k = columnStart[j] ?? 0; k < end; k++) {
      const i = rowIndex[k] ?? 0;
      y[i] = (y[i] ?? 0) + (values[k] ?? 0) * factor;
    }
  }
  return y;
}

/** y = Aᵀ x. Cost: one multiplication an entry. `into` is overwritten when given. */
export function multiplyTransposed(matrix: SparseMatrix, x: Float64Array, into?: Float64Array): Float64Array {
  const { rows, columns, columnStart, rowIndex, values } = matrix;
  checkLength(x, rows);
  const y = into ?? new Float64Array(columns);
  for (let j = 0; j < columns; j++) {
    let sum = 0;
    const end = columnStart[j + 1] ?? 0;
    for (let k = columnStart[j] ?? 0; k < end; k++) sum += (values[k] ?? 0) * (x[rowIndex[k] ?? 0] ?? 0);
    y[j] = sum;
  }
  return y;
}

export function transpose(matrix: SparseMatrix): SparseMatrix {
  const { rows, columns, columnStart, rowIndex, values } = matrix;
  const start = new Int32Array(rows + 1);
  for (const row of rowIndex) start[row + 1] = (start[row + 1] ?? 0) + 1;
  for (let i = 0; i < rows; i++) start[i + 1] = (start[i + 1] ?? 0) + (start[i] ?? 0);
  const next = start.slice(0, rows);
  const outIndex = new Int32Array(values.length);
  const outValue = new Float64Array(values.length);
  for (let j = 0; j < columns; j++) {
    const end = columnStart[j + 1] ?? 0;
    for (let k = columnStart[j] ?? 0; k < end; k++) {
      const row = rowIndex[k] ?? 0;
      const place = next[row] ?? 0;
      next[row] = place + 1;
      outIndex[place] = j;
      outValue[place] = values[k] ?? 0;
    }
  }
  return { rows: columns, columns: rows, columnStart: start, rowIndex: outIndex, values: outValue };
}

/** A B, column by column; entries that come out as exactly 0 are left out. Cost: Σ over entries of B of the column of A it meets. */
export function product(a: SparseMatrix, b: SparseMatrix): SparseMatrix {
  if (a.columns !== b.rows) throw new RangeError(`Cannot multiply ${shapeOf(a)} by ${shapeOf(b)}.`);
  const work = {
    a,
    b,
    sum: new Float64Array(a.rows),
    seenIn: new Int32Array(a.rows).fill(-1),
    touched: new Int32Array(a.rows),
  };
  const columnStart = new Int32Array(b.columns + 1);
  const room = a.values.length + b.values.length + a.rows;
  let [rowIndex, values] = [new Int32Array(room), new Float64Array(room)];
  let filled = 0;
  for (let j = 0; j < b.columns; j++) {
    const count = addColumn(work, j);
    if (filled + count > rowIndex.length) {
      const more = Math.max(2 * rowIndex.length, filled + count);
      [rowIndex, values] = [widened(rowIndex, new Int32Array(more)), widened(values, new Float64Array(more))];
    }
    for (let k = 0; k < count; k++) {
      const i = work.touched[k] ?? 0;
      const value = work.sum[i] ?? 0;
      if (value === 0) continue;
      rowIndex[filled] = i;
      values[filled++] = value;
    }
    columnStart[j + 1] = filled;
  }
  return {
    rows: a.rows,
    columns: b.columns,
    columnStart,
    rowIndex: rowIndex.slice(0, filled),
    values: values.slice(0, filled),
  };
}

function widened<T extends Int32Array | Float64Array>(from: T, into: T): T {
  into.set(from);
  return into;
}

interface ProductWork {
  readonly a: SparseMatrix;
  readonly b: SparseMatrix;
  readonly sum: Float64Array;
  readonly seenIn: Int32Array;
  /** Rows of the column, ascending, as many as were told. */
  readonly touched: Int32Array;
}

function addColumn({ a, b, sum, seenIn, touched }: ProductWork, j: number): number {
  let count = 0;
  const end = b.columnStart[j + 1] ?? 0;
  for (let k = b.columnStart[j] ?? 0; k < end; k++) {
    const factor = b.values[k] ?? 0;
    const column = b.rowIndex[k] ?? 0;
    const last = a.columnStart[column + 1] ?? 0;
    for (let m = a.columnStart[column] ?? 0; m < last; m++) {
      const i = a.rowIndex[m] ?? 0;
      if (seenIn[i] !== j) {
        seenIn[i] = j;
        sum[i] = 0;
        touched[count++] = i;
      }
      sum[i] = (sum[i] ?? 0) + (a.values[m] ?? 0) * factor;
    }
  }
  sortFirst(touched, count);
  return count;
}

/** Few rows mostly stand in order already. */
function sortFirst(rows: Int32Array, count: number): void {
  if (count > 48) {
    rows.subarray(0, count).sort();
    return;
  }
  for (let k = 1; k < count; k++) {
    const row = rows[k] ?? 0;
    let place = k;
    for (; place > 0 && (rows[place - 1] ?? 0) > row; place--) rows[place] = rows[place - 1] ?? 0;
    rows[place] = row;
  }
}

/** factorA · A + factorB · B. */
export function weightedSum(
  [factorA, a]: readonly [number, SparseMatrix],
  [factorB, b]: readonly [number, SparseMatrix],
): SparseMatrix {
  if (a.rows !== b.rows || a.columns !== b.columns) throw new RangeError(`Cannot add ${shapeOf(a)} and ${shapeOf(b)}.`);
  const total = a.values.length + b.values.length;
  const row = new Int32Array(total);
  const column = new Int32Array(total);
  const values = new Float64Array(total);
  let filled = 0;
  for (const [factor, matrix] of [
    [factorA, a],
    [factorB, b],
  ] as const) {
    for (let j = 0; j < matrix.columns; j++) {
      for (let k = matrix.columnStart[j] ?? 0; k < (matrix.columnStart[j + 1] ?? 0); k++) {
        row[filled] = matrix.rowIndex[k] ?? 0;
        column[filled] = j;
        values[filled++] = factor * (matrix.values[k] ?? 0);
      }
    }
  }
  return sparseFromTriplets({ rows: a.rows, columns: a.columns, rowIndex: row, columnIndex: column, values });
}

function checkLength(x: Float64Array, expected: number): void {
  if (x.length !== expected) throw new RangeError(`A vector of ${x.length} meets a side of ${expected}.`);
}

function shapeOf(matrix: SparseMatrix): string {
  return `${matrix.rows} × ${matrix.columns}`;
}
