// (σI − B)⁻¹ of a large nonnegative matrix for σ above its growth, whole: for many right sides, or many entries.
import { condensedAt, foldingOf, type Folding } from './condense.ts';
import { forEachEntry, type SparseMatrix } from './sparse.ts';

export interface Resolvent {
  readonly shift: number;
  readonly folding: Folding;
  /** The inverse over the kept states of the folding, entry (i, j) at i * kept + j. */
  readonly overKept: Float64Array;
  readonly matrix: SparseMatrix;
  /** What any state sends to folded ones, but to itself. */
  readonly toFolded: SparseMatrix;
  /** What folded states send to kept ones, by their place among the kept. */
  readonly toKept: SparseMatrix;
  /** σ less what stays in each state. */
  readonly clearance: Float64Array;
}

/** For a shift above the growth. Null where more than `mostKept` states are left after folding, or none. Cost: kept³. */
export function resolventAt(matrix: SparseMatrix, shift: number, mostKept: number): Resolvent | null {
  const folding = foldingOf(matrix);
  if (folding.kept.length > mostKept || folding.kept.length === 0) return null;
  const overKept = inverseOfShifted(condensedAt(matrix, folding, shift), shift);
  return { shift, folding, overKept, matrix, ...apart(matrix, folding, shift) };
}

/** (σI − Q)⁻¹ by Gauss-Jordan elimination in place; such a matrix needs no row exchanges. */
function inverseOfShifted(q: SparseMatrix, shift: number): Float64Array {
  const n = q.columns;
  const a = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    a[j * n + j] = shift;
    for (let k = q.columnStart[j] ?? 0; k < (q.columnStart[j + 1] ?? 0); k++) {
      const at = (q.rowIndex[k] ?? 0) * n + j;
      a[at] = (a[at] ?? 0) - (q.values[k] ?? 0);
    }
  }
  for (let k = 0; k < n; k++) {
    const pivotRow = a.subarray(k * n, k * n + n);
    const pivot = pivotRow[k] ?? 1;
    pivotRow[k] = 1;
    for (let j = 0; j < n; j++) pivotRow[j] = (pivotRow[j] ?? 0) / pivot;
    for (let i = 0; i < n; i++) {
      if (i === k) continue;
      const row = a.subarray(i * n, i * n + n);
      const factor = row[k] ?? 0;
      if (factor === 0) continue;
      row[k] = 0;
      for (let j = 0; j < n; j++) row[j] = (row[j] ?? 0) - factor * (pivotRow[j] ?? 0);
    }
  }
  return a;
}

/**
 * (σI − B)⁻¹ u over all states: what the folded ones make of it is sent to the kept ones, solved there, and unfolded again, for which
 * only what goes to folded states is needed.
 */
export function applyResolvent(resolvent: Resolvent, u: Float64Array): Float64Array {
  const { folding, overKept, toKept } = resolvent;
  const { kept, folded } = folding;
  const size = kept.length;
  const x = new Float64Array(u.length);
  unfold(resolvent, u.slice(), x);
  const right = new Float64Array(size);
  for (let j = 0; j < size; j++) right[j] = u[kept[j] ?? 0] ?? 0;
  for (const state of folded) send(toKept, state, x[state] ?? 0, right);
  const inflow = u.slice();
  for (let i = 0; i < size; i++) {
    const state = kept[i] ?? 0;
    x[state] = rowTimes(overKept, i * size, right);
    send(resolvent.toFolded, state, x[state] ?? 0, inflow);
  }
  unfold(resolvent, inflow, x);
  return x;
}

/** Four sums side by side, so that none waits for the last. */
function rowTimes(matrix: Float64Array, start: number, x: Float64Array): number {
  const size = x.length;
  let [one, two, three, four] = [0, 0, 0, 0];
  let j = 0;
  for (; j + 3 < size; j += 4) {
    one += (matrix[start + j] ?? 0) * (x[j] ?? 0);
    two += (matrix[start + j + 1] ?? 0) * (x[j + 1] ?? 0);
    three += (matrix[start + j + 2] ?? 0) * (x[j + 2] ?? 0);
    four += (matrix[start + j + 3] ?? 0) * (x[j + 3] ?? 0);
  }
  for (; j < size; j++) one += (matrix[start + j] ?? 0) * (x[j] ?? 0);
  return one + two + (three + four);
}

/** Fills x over the folded states, one after the other, and adds what they send to the inflow of folded ones. */
function unfold({ folding, toFolded, clearance }: Resolvent, inflow: Float64Array, x: Float64Array): void {
  for (const state of folding.folded) {
    const value = (inflow[state] ?? 0) / (clearance[state] ?? 1);
    x[state] = value;
    send(toFolded, state, value, inflow);
  }
}

function send({ columnStart, rowIndex, values }: SparseMatrix, state: number, value: number, into: Float64Array): void {
  if (value === 0) return;
  const end = columnStart[state + 1] ?? 0;
  for (let k = columnStart[state] ?? 0; k < end; k++) {
    const to = rowIndex[k] ?? 0;
    into[to] = (into[to] ?? 0) + (values[k] ?? 0) * value;
  }
}

/** Entries by where they lead, and σ less the diagonal. */
function apart(
  matrix: SparseMatrix,
  { kept }: Folding,
  shift: number,
): Pick<Resolvent, 'toFolded' | 'toKept' | 'clearance'> {
  const clearance = new Float64Array(matrix.columns).fill(shift);
  const place = new Int32Array(matrix.columns).fill(-1);
  kept.forEach((state, k) => (place[state] = k));
  forEachEntry(matrix, (row, column, value) => {
    if (row === column) clearance[row] = shift - value;
  });
  const toFolded = entriesOf(matrix, matrix.columns, (row, column) =>
    row !== column && (place[row] ?? -1) < 0 ? row : -1,
  );
  const toKept = entriesOf(matrix, kept.length, (row, column) => ((place[column] ?? -1) < 0 ? (place[row] ?? -1) : -1));
  return { toFolded, toKept, clearance };
}

/** Those entries that get a row; −1 leaves an entry out. */
function entriesOf(matrix: SparseMatrix, rows: number, rowOf: (row: number, column: number) => number): SparseMatrix {
  const columnStart = new Int32Array(matrix.columns + 1);
  const rowIndex = new Int32Array(matrix.values.length);
  const values = new Float64Array(matrix.values.length);
  let filled = 0;
  forEachEntry(matrix, (row, column, value) => {
    const at = rowOf(row, column);
    if (at >= 0) {
      rowIndex[filled] = at;
      values[filled++] = value;
    }
    columnStart[column + 1] = filled;
  });
  for (let j = 0; j < matrix.columns; j++) columnStart[j + 1] = Math.max(columnStart[j + 1] ?? 0, columnStart[j] ?? 0);
  return {
    rows,
    columns: matrix.columns,
    columnStart,
    rowIndex: rowIndex.slice(0, filled),
    values: values.slice(0, filled),
  };
}
