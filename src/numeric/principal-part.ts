// Some rows and columns of a square matrix.
import { sparseFromTriplets, type SparseMatrix } from './sparse.ts';

/**
 * The rows and columns named, in the order named: entry (a, b) of the result is entry (keep[a], keep[b]). Names must differ.
 * Cost: the entries of the columns named, and a sort unless the names ascend.
 */
export function principalPart(matrix: SparseMatrix, keep: ArrayLike<number>): SparseMatrix {
  const placeOf = placesIn(keep, matrix.rows);
  const size = keep.length;
  const most = entriesIn(matrix, keep);
  const columnStart = new Int32Array(size + 1);
  const rowIndex = new Int32Array(most);
  const values = new Float64Array(most);
  let filled = 0;
  for (let place = 0; place < size; place++) {
    const j = keep[place] ?? 0;
    const end = matrix.columnStart[j + 1] ?? 0;
    for (let k = matrix.columnStart[j] ?? 0; k < end; k++) {
      const to = placeOf(matrix.rowIndex[k] ?? 0);
      if (to < 0) continue;
      rowIndex[filled] = to;
      values[filled++] = matrix.values[k] ?? 0;
    }
    columnStart[place + 1] = filled;
  }
  const kept = { rowIndex: rowIndex.slice(0, filled), values: values.slice(0, filled) };
  const part = { rows: size, columns: size, columnStart, ...kept };
  return ascends(keep) ? part : sortedColumns(part);
}

/** Place of a state among those kept, −1 for the others; a table for many, a map for few. */
function placesIn(keep: ArrayLike<number>, size: number): (state: number) => number {
  if (keep.length * 16 > size) {
    const table = new Int32Array(size).fill(-1);
    for (let place = 0; place < keep.length; place++) table[keep[place] ?? 0] = place;
    return (state) => table[state] ?? -1;
  }
  const map = new Map<number, number>();
  for (let place = 0; place < keep.length; place++) map.set(keep[place] ?? 0, place);
  return (state) => map.get(state) ?? -1;
}

function entriesIn(matrix: SparseMatrix, keep: ArrayLike<number>): number {
  let entries = 0;
  for (let place = 0; place < keep.length; place++) {
    const j = keep[place] ?? 0;
    entries += (matrix.columnStart[j + 1] ?? 0) - (matrix.columnStart[j] ?? 0);
  }
  return entries;
}

function ascends(keep: ArrayLike<number>): boolean {
  for (let place = 1; place < keep.length; place++) if ((keep[place] ?? 0) <= (keep[place - 1] ?? 0)) return false;
  return true;
}

function sortedColumns(matrix: SparseMatrix): SparseMatrix {
  const columnIndex = new Int32Array(matrix.values.length);
  for (let j = 0; j < matrix.columns; j++) columnIndex.fill(j, matrix.columnStart[j], matrix.columnStart[j + 1]);
  return sparseFromTriplets({ ...matrix, columnIndex });
}
