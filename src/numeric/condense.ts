// A large life cycle with the states that lie on no loop of their own folded into the others: ages between birth and breeding.
import type { SparseMatrix } from './sparse.ts';

/** Without the kept states no loop is left but from a state to itself. */
export interface Folding {
  readonly kept: Int32Array;
  /** In an order in which each state sends only to later ones (and to kept ones, and itself). */
  readonly folded: Int32Array;
}

/**
 * Finds few states that all loops pass through: the ends of backward steps of a depth-first search, less those that turn
 * out not to be needed. States of which more than `mostStaying` stay are kept in any case. Cost: linear, plus a short
 * search for each state kept.
 */
export function foldingOf(matrix: SparseMatrix, mostStaying = Infinity): Folding {
  const keep = endsOfBackwardSteps(matrix);
  const stayers = new Uint8Array(matrix.columns);
  for (let state = 0; state < matrix.columns; state++) {
    if (mostStaying < Infinity && stayOf(matrix, state) > mostStaying) stayers[state] = keep[state] = 1;
  }
  const candidates: number[] = [];
  keep.forEach((is, state) => {
    if (is === 1) candidates.push(state);
  });
  const mark = new Int32Array(matrix.columns).fill(-1);
  const entries = (state: number): number => (matrix.columnStart[state + 1] ?? 0) - (matrix.columnStart[state] ?? 0);
  candidates.sort((a, b) => entries(a) - entries(b) || a - b);
  for (const state of candidates) {
    if (stayers[state] === 0 && !comesBack(matrix, keep, mark, state)) keep[state] = 0;
  }
  return {
    kept: Int32Array.from(candidates.filter((state) => keep[state] === 1).sort((a, b) => a - b)),
    folded: orderOf(matrix, keep),
  };
}

function endsOfBackwardSteps(matrix: SparseMatrix): Uint8Array {
  const size = matrix.columns;
  const ends = new Uint8Array(size);
  /** 0 unseen, 1 on the path, 2 done. */
  const phase = new Uint8Array(size);
  const next = matrix.columnStart.slice(0, size);
  const path = new Int32Array(size);
  for (let root = 0; root < size; root++) {
    if (phase[root] !== 0) continue;
    let depth = 0;
    path[0] = root;
    phase[root] = 1;
    while (depth >= 0) {
      const state = path[depth] ?? 0;
      const k = next[state] ?? 0;
      if (k >= (matrix.columnStart[state + 1] ?? 0)) {
        phase[state] = 2;
        depth--;
        continue;
      }
      next[state] = k + 1;
      const to = matrix.rowIndex[k] ?? 0;
      if (phase[to] === 0) {
        phase[to] = 1;
        path[++depth] = to;
      } else if (phase[to] === 1 && to !== state) ends[to] = 1;
    }
  }
  return ends;
}

const searchLimit = 500;

/** Whether a walk over folded states leads from `start` back to it; also true where the search is given up. */
function comesBack(matrix: SparseMatrix, keep: Uint8Array, mark: Int32Array, start: number): boolean {
  const open = [start];
  for (let seen = 0; open.length > 0; seen++) {
    const state = open.pop() ?? start;
    if (seen > searchLimit) return true;
    for (let k = matrix.columnStart[state] ?? 0; k < (matrix.columnStart[state + 1] ?? 0); k++) {
      const to = matrix.rowIndex[k] ?? 0;
      if (to === start && state !== start) return true;
      if (keep[to] === 1 || mark[to] === start || to === start) continue;
      mark[to] = start;
      open.push(to);
    }
  }
  return false;
}

/** Folded states, senders before receivers (Kahn 1962). */
function orderOf(matrix: SparseMatrix, keep: Uint8Array): Int32Array {
  const waiting = new Int32Array(matrix.columns);
  const visit = (state: number, act: (to: number) => void): void => {
    for (let k = matrix.columnStart[state] ?? 0; k < (matrix.columnStart[state + 1] ?? 0); k++) {
      const to = matrix.rowIndex[k] ?? 0;
      if (to !== state && keep[to] === 0) act(to);
    }
  };
  const folded = keep.reduce((count, is) => count + (is === 0 ? 1 : 0), 0);
  for (let j = 0; j < matrix.columns; j++) if (keep[j] === 0) visit(j, (to) => (waiting[to] = (waiting[to] ?? 0) + 1));
  const order = new Int32Array(folded);
  let filled = 0;
  for (let j = 0; j < matrix.columns; j++) if (keep[j] === 0 && waiting[j] === 0) order[filled++] = j;
  for (let head = 0; head < filled; head++) {
    visit(order[head] ?? 0, (to) => {
      waiting[to] = (waiting[to] ?? 0) - 1;
      if (waiting[to] === 0) order[filled++] = to;
    });
  }
  if (filled !== folded) throw new Error('The folded states hold a loop.');
  return order;
}

/** Largest share of a folded state that stays in it: growth is above this. */
export function largestStay(matrix: SparseMatrix, { folded }: Folding): number {
  let largest = 0;
  for (const state of folded) largest = Math.max(largest, stayOf(matrix, state));
  return largest;
}

function stayOf(matrix: SparseMatrix, state: number): number {
  for (let k = matrix.columnStart[state] ?? 0; k < (matrix.columnStart[state + 1] ?? 0); k++) {
    if (matrix.rowIndex[k] === state) return matrix.values[k] ?? 0;
  }
  return 0;
}

/**
 * Q(σ) = B_KK + B_KF (σI − B_FF)⁻¹ B_FK over the kept states K and the folded F. B grows by σ exactly where Q(σ) does, and
 * then their vectors agree on K. Column by column along the order of the folded states. σ must be above `largestStay`.
 */
export function condensedAt(matrix: SparseMatrix, folding: Folding, shift: number): SparseMatrix {
  const { kept, folded } = folding;
  const size = matrix.columns;
  const keptPlace = new Int32Array(size).fill(-1);
  const order = new Int32Array(size).fill(-1);
  kept.forEach((state, place) => (keptPlace[state] = place));
  folded.forEach((state, place) => (order[state] = place));
  const stay = Float64Array.from(folded, (state) => stayOf(matrix, state));
  const amount = new Float64Array(size);
  const seenBy = new Int32Array(size).fill(-1);
  const columnStart = new Int32Array(kept.length + 1);
  const rowIndex: number[] = [];
  const values: number[] = [];
  kept.forEach((source, column) => {
    const targets: number[] = [];
    for (const state of [source, ...reachOf({ matrix, order, seenBy, amount, targets }, source)]) {
      const place = order[state] ?? -1;
      const factor = state === source ? 1 : (amount[state] ?? 0) / (shift - (stay[place] ?? 0));
      for (let k = matrix.columnStart[state] ?? 0; k < (matrix.columnStart[state + 1] ?? 0); k++) {
        const to = matrix.rowIndex[k] ?? 0;
        if (to !== state || state === source) amount[to] = (amount[to] ?? 0) + factor * (matrix.values[k] ?? 0);
      }
    }
    for (const to of targets.sort((a, b) => a - b)) {
      rowIndex.push(keptPlace[to] ?? 0);
      values.push(amount[to] ?? 0);
    }
    columnStart[column + 1] = values.length;
  });
  return {
    rows: kept.length,
    columns: kept.length,
    columnStart,
    rowIndex: Int32Array.from(rowIndex),
    values: Float64Array.from(values),
  };
}

interface Reach {
  readonly matrix: SparseMatrix;
  readonly order: Int32Array;
  readonly seenBy: Int32Array;
  readonly amount: Float64Array;
  /** Filled with the kept states reached. */
  readonly targets: number[];
}

/** Folded states that a kept one reaches over folded ones, in order; the amounts of all states met are set to 0. */
function reachOf({ matrix, order, seenBy, amount, targets }: Reach, source: number): number[] {
  const found: number[] = [];
  const open = [source];
  for (let state = open.pop(); state !== undefined; state = open.pop()) {
    for (let k = matrix.columnStart[state] ?? 0; k < (matrix.columnStart[state + 1] ?? 0); k++) {
      const to = matrix.rowIndex[k] ?? 0;
      if (seenBy[to] === source) continue;
      seenBy[to] = source;
      amount[to] = 0;
      if ((order[to] ?? -1) < 0) targets.push(to);
      else {
        found.push(to);
        open.push(to);
      }
    }
  }
  return found.sort((a, b) => (order[a] ?? 0) - (order[b] ?? 0));
}

/** The vector over all states from its part over the kept ones: x_F = (σI − B_FF)⁻¹ B_FK x_K. */
export function unfold(matrix: SparseMatrix, folding: Folding, shift: number, x: Float64Array): Float64Array {
  const whole = new Float64Array(matrix.columns);
  const inflow = new Float64Array(matrix.columns);
  const send = (state: number, value: number): void => {
    whole[state] = value;
    for (let k = matrix.columnStart[state] ?? 0; k < (matrix.columnStart[state + 1] ?? 0); k++) {
      const to = matrix.rowIndex[k] ?? 0;
      if (to !== state) inflow[to] = (inflow[to] ?? 0) + (matrix.values[k] ?? 0) * value;
    }
  };
  folding.kept.forEach((state, place) => {
    send(state, x[place] ?? 0);
  });
  for (const state of folding.folded) send(state, (inflow[state] ?? 0) / (shift - stayOf(matrix, state)));
  return whole;
}
