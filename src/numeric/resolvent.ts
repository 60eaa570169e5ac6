// (σI − B)⁻¹ of a large nonnegative matrix for σ above its growth, whole: for many right sides, or many entries.
import { condensedAt, foldingOf, type Folding } from './condense.ts';
import type { SparseMatrix } from './sparse.ts';

export interface Resolvent {
  readonly shift: number;
  readonly folding: Folding;
  /** The inverse over the kept states of the folding, entry (i, j) at i * kept + j. */
  readonly overKept: Float64Array;
  readonly matrix: SparseMatrix;
  readonly offDiagonal: SparseMatrix;
  /** σ less what stays in each state. */
  readonly clearance: Float64Array;
}

/** For a shift above the growth. Null where more than `mostKept` states are left after folding, or none. Cost: kept³. */
export function resolventAt(matrix: SparseMatrix, shift: number, mostKept: number): Resolvent | null {
  const folding = foldingOf(matrix);
  if (folding.kept.length > mostKept || folding.kept.length === 0) return null;
  const overKept = inverseOfShifted(condensedAt(matrix, folding, shift), shift);
  return { shift, folding, overKept, matrix, ...apart(matrix, shift) };
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

/** (σI − B)⁻¹ u over all states: folded into the kept ones, solved there, and unfolded. */
export function applyResolvent(resolvent: Resolvent, u: Float64Array): Float64Array {
  const { folding, overKept } = resolvent;
  const { kept } = folding;
  const inflow = u.slice();
  const x = new Float64Array(u.length);
  unfold(resolvent, inflow, x);
  const right = Float64Array.from(kept, (state) => inflow[state] ?? 0);
  inflow.set(u);
  for (let i = 0; i < kept.length; i++) {
    let value = 0;
    const start = i * kept.length;
    for (let j = 0; j < kept.length; j++) value += (overKept[start + j] ?? 0) * (right[j] ?? 0);
    const state = kept[i] ?? 0;
    x[state] = value;
    send(resolvent.offDiagonal, { state, value, inflow });
  }
  unfold(resolvent, inflow, x);
  return x;
}

/** Fills x over the folded states, one after the other, and adds what they send to the inflow of others. */
function unfold({ folding, offDiagonal, clearance }: Resolvent, inflow: Float64Array, x: Float64Array): void {
  for (const state of folding.folded) {
    const value = (inflow[state] ?? 0) / (clearance[state] ?? 1);
    x[state] = value;
    if (value !== 0) send(offDiagonal, { state, value, inflow });
  }
}

interface Sent {
  readonly state: number;
  readonly value: number;
  readonly inflow: Float64Array;
}

function send({ columnStart, rowIndex, values }: SparseMatrix, { state, value, inflow }: Sent): void {
  const end = columnStart[state + 1] ?? 0;
  for (let k = columnStart[state] ?? 0; k < end; k++) {
    const to = rowIndex[k] ?? 0;
    inflow[to] = (inflow[to] ?? 0) + (values[k] ?? 0) * value;
  }
}

/** The matrix without its diagonal, and σ less the diagonal. */
function apart(matrix: SparseMatrix, shift: number): Pick<Resolvent, 'offDiagonal' | 'clearance'> {
  const clearance = new Float64Array(matrix.columns).fill(shift);
  const columnStart = new Int32Array(matrix.columns + 1);
  const [rowIndex, values] = [matrix.rowIndex.slice(), matrix.values.slice()];
  let filled = 0;
  for (let j = 0; j < matrix.columns; j++) {
    for (let k = matrix.columnStart[j] ?? 0; k < (matrix.columnStart[j + 1] ?? 0); k++) {
      const [row, value] = [matrix.rowIndex[k] ?? 0, matrix.values[k] ?? 0];
      if (row === j) clearance[j] = shift - value;
      else {
        rowIndex[filled] = row;
        values[filled++] = value;
      }
    }
    columnStart[j + 1] = filled;
  }
  return { offDiagonal: { ...matrix, columnStart, rowIndex, values }, clearance };
}
