// The period of a life cycle: the greatest common divisor of the lengths of all its loops.
import type { SparseMatrix } from './sparse.ts';

/**
 * Index of imprimitivity of an irreducible pattern: levels by breadth-first search from state 0, then the common divisor
 * of level(j) + 1 − level(i) over all entries j → i. 0 where there is no loop (one state without an entry to itself).
 * A matrix is primitive when it is irreducible and this is 1. Cost: linear in entries.
 */
export function periodOfIrreducible(matrix: SparseMatrix): number {
  const level = new Int32Array(matrix.columns).fill(-1);
  const queue = new Int32Array(matrix.columns);
  let queued = 1;
  level[0] = 0;
  let divisor = 0;
  for (let head = 0; head < queued; head++) {
    const from = queue[head] ?? 0;
    for (let k = matrix.columnStart[from] ?? 0; k < (matrix.columnStart[from + 1] ?? 0); k++) {
      const to = matrix.rowIndex[k] ?? 0;
      if (level[to] === -1) {
        level[to] = (level[from] ?? 0) + 1;
        queue[queued++] = to;
      } else divisor = greatestCommonDivisor(divisor, Math.abs((level[from] ?? 0) + 1 - (level[to] ?? 0)));
    }
  }
  return divisor;
}

function greatestCommonDivisor(a: number, b: number): number {
  while (b !== 0) [a, b] = [b, a % b];
  return a;
}
