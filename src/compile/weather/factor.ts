// Factors: matrices A with A Aᵀ = the correlation, whose rows mix independent normal numbers that are keyed by names.
import type { Correlation } from '../../model/chance.ts';
import { cholesky } from '../../numeric/cholesky.ts';

export interface Factor {
  /** Names of the columns; null for what all rows share. */
  readonly columns: readonly (string | null)[];
  readonly start: Int32Array;
  readonly column: Int32Array;
  readonly weight: Float64Array;
}

/**
 * One number ρ ≥ 0 for all pairs: √ρ of a shared normal and √(1−ρ) of one's own, so that a further name moves no other. A
 * matrix: its Cholesky factor in the order of the names.
 */
export function factorOf({ of }: Correlation, names: readonly string[]): Factor {
  const rows: (readonly [number, number])[][] = [];
  if (typeof of === 'number') {
    const own = Math.sqrt(1 - of);
    const shared = Math.sqrt(of);
    const first = of > 0 ? 1 : 0;
    names.forEach((_, i) => {
      const entries: (readonly [number, number])[] = [];
      if (of > 0) entries.push([0, shared]);
      if (of < 1) entries.push([first + i, own]);
      rows.push(entries);
    });
    const columns = [...(of > 0 ? [null] : []), ...(of < 1 ? names : [])];
    return packed(columns, rows);
  }
  const lower = cholesky(of, 1e-9);
  if (lower === null) throw new Error('A correlation matrix was not made possible before it was compiled.');
  names.forEach((_, i) => {
    const entries: (readonly [number, number])[] = [];
    for (let j = 0; j <= i; j++) {
      const weight = lower.values[i * of.columns + j] ?? 0;
      if (weight !== 0) entries.push([j, weight]);
    }
    rows.push(entries);
  });
  return packed(names, rows);
}

function packed(
  columns: readonly (string | null)[],
  rows: readonly (readonly (readonly [number, number])[])[],
): Factor {
  const start = [0];
  for (const row of rows) start.push((start.at(-1) ?? 0) + row.length);
  const entries = rows.flat();
  return {
    columns,
    start: Int32Array.from(start),
    column: Int32Array.from(entries, ([column]) => column),
    weight: Float64Array.from(entries, ([, weight]) => weight),
  };
}
