// Which states can come back to one another: the strongly connected parts of the graph of a square matrix.
import type { SparseMatrix } from './sparse.ts';

export interface Components {
  /** Part of state i. Parts are numbered so that each feeds only itself and parts with a higher number. */
  readonly of: Int32Array;
  /** The states of each part, ascending. */
  readonly states: readonly Int32Array[];
}

/**
 * Strongly connected components of the graph j → i for every stored entry (i, j): Tarjan (1972), without recursion.
 * Works on the pattern alone. Cost: linear in states and entries.
 */
export function strongComponents(matrix: SparseMatrix): Components {
  const size = matrix.columns;
  const search = startSearch(size);
  for (let root = 0; root < size; root++) {
    if (search.found[root] === 0) explore(matrix, search, root);
  }
  const count = search.parts;
  const of = search.of.map((part) => count - 1 - part);
  return { of, states: statesOf(of, count) };
}

interface Search {
  /** 1-based order of discovery, 0 while unseen. */
  readonly found: Int32Array;
  readonly lowest: Int32Array;
  readonly of: Int32Array;
  readonly next: Int32Array;
  readonly path: Int32Array;
  readonly open: Int32Array;
  opened: number;
  seen: number;
  parts: number;
}

function startSearch(size: number): Search {
  const array = (): Int32Array => new Int32Array(size);
  return {
    found: array(),
    lowest: array(),
    of: array().fill(-1),
    next: array(),
    path: array(),
    open: array(),
    opened: 0,
    seen: 0,
    parts: 0,
  };
}

function enter(matrix: SparseMatrix, search: Search, state: number): void {
  search.seen++;
  search.found[state] = search.seen;
  search.lowest[state] = search.seen;
  search.next[state] = matrix.columnStart[state] ?? 0;
  search.open[search.opened++] = state;
}

function explore(matrix: SparseMatrix, search: Search, root: number): void {
  const { found, lowest, of, next, path } = search;
  let depth = 0;
  path[0] = root;
  enter(matrix, search, root);
  while (depth >= 0) {
    const state = path[depth] ?? 0;
    const k = next[state] ?? 0;
    if (k < (matrix.columnStart[state + 1] ?? 0)) {
      next[state] = k + 1;
      const to = matrix.rowIndex[k] ?? 0;
      if (found[to] === 0) {
        path[++depth] = to;
        enter(matrix, search, to);
      } else if (of[to] === -1) lowest[state] = Math.min(lowest[state] ?? 0, found[to] ?? 0);
      continue;
    }
    if (lowest[state] === found[state]) closePart(search, state);
    depth--;
    const parent = path[depth];
    if (depth >= 0 && parent !== undefined) lowest[parent] = Math.min(lowest[parent] ?? 0, lowest[state] ?? 0);
  }
}

function closePart(search: Search, root: number): void {
  let state = -1;
  while (state !== root) {
    state = search.open[--search.opened] ?? root;
    search.of[state] = search.parts;
  }
  search.parts++;
}

function statesOf(of: Int32Array, count: number): Int32Array[] {
  const sizes = new Int32Array(count);
  for (const part of of) sizes[part] = (sizes[part] ?? 0) + 1;
  const states = Array.from(sizes, (size) => new Int32Array(size));
  const filled = new Int32Array(count);
  of.forEach((part, state) => {
    const place = filled[part] ?? 0;
    const list = states[part];
    if (list) list[place] = state;
    filled[part] = place + 1;
  });
  return states;
}
