// Alias tables (Walker 1977, set up after Vose 1991): a pick among k ends in constant time, one uniform number a pick.

/** Column i keeps `first[i]` with chance `keep[i]`, else gives `second[i]`. Ends are numbers; -1 is death on the way. */
export interface AliasTable {
  readonly keep: readonly number[];
  readonly first: readonly number[];
  readonly second: readonly number[];
}

/** A table for ends with these chances, which sum to 1. */
export function aliasTable(ends: readonly number[], chances: readonly number[]): AliasTable {
  const sum = chances.reduce((a, b) => a + b, 0);
  const scaled = chances.map((chance) => (chance * chances.length) / sum);
  const keep = scaled.map(() => 1);
  const second = [...ends];
  const small: number[] = [];
  const large: number[] = [];
  scaled.forEach((height, i) => (height < 1 ? small : large).push(i));
  for (;;) {
    const low = small.pop();
    const high = large.pop();
    if (low === undefined || high === undefined) break;
    const height = scaled[low] ?? 0;
    keep[low] = height;
    second[low] = ends[high] ?? -1;
    const left = (scaled[high] ?? 0) + height - 1;
    scaled[high] = left;
    (left < 1 ? small : large).push(high);
  }
  return { keep, first: ends, second };
}
