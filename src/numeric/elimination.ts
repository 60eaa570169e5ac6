// In which order the states of a sparse matrix are eliminated, and what fills in: decided once for all matrices of a pattern.

export interface Elimination {
  /** States from the first to be eliminated to the last. */
  readonly order: Int32Array;
  /** By place in this order, ascending: the places of the entries of its row below the diagonal, and above it, with what fills in. */
  readonly below: readonly Int32Array[];
  readonly above: readonly Int32Array[];
  /** Multiplications of all of it. */
  readonly cost: number;
}

/**
 * Diagonal entries are pivots; that state goes first whose row and column have the fewest entries left, as a product (Markowitz
 * 1957), of equal ones the one that comes first. Entries (row, column) off the diagonal may come in any order, and twice. Null
 * where it would cost more multiplications than `most`.
 */
export function planElimination(
  states: number,
  entries: Iterable<readonly [row: number, column: number]>,
  most: number,
): Elimination | null {
  const rows = Array.from({ length: states }, () => new Set<number>());
  const columns = Array.from({ length: states }, () => new Set<number>());
  const put = (row: number, column: number): void => {
    rows[row]?.add(column);
    columns[column]?.add(row);
  };
  for (const [row, column] of entries) if (row !== column) put(row, column);
  const waiting = new Set(rows.keys());
  const order: number[] = [];
  const below = Array.from({ length: states }, (): number[] => []);
  const above: (readonly number[])[] = [];
  let cost = 0;
  while (waiting.size > 0) {
    const state = cheapest(waiting, rows, columns);
    waiting.delete(state);
    const [own, others] = [[...(rows[state] ?? [])], [...(columns[state] ?? [])]];
    cost += own.length * others.length;
    if (cost > most) return null;
    for (const row of others) {
      rows[row]?.delete(state);
      below[row]?.push(order.length);
      for (const column of own) if (row !== column) put(row, column);
    }
    for (const column of own) columns[column]?.delete(state);
    above.push(own);
    order.push(state);
  }
  const place = new Int32Array(states);
  order.forEach((state, i) => (place[state] = i));
  return {
    order: Int32Array.from(order),
    below: order.map((state) => Int32Array.from(below[state] ?? [])),
    above: above.map((own) => Int32Array.from(own, (state) => place[state] ?? 0).sort()),
    cost,
  };
}

function cheapest(
  waiting: ReadonlySet<number>,
  rows: readonly ReadonlySet<number>[],
  columns: readonly ReadonlySet<number>[],
): number {
  let [best, least] = [-1, Infinity];
  for (const state of waiting) {
    const cost = (rows[state]?.size ?? 0) * (columns[state]?.size ?? 0);
    if (cost < least) [best, least] = [state, cost];
  }
  return best;
}
