// The known name that someone probably meant by an unknown one.

/** Longer names are not compared, which bounds the work on a hostile text. */
const longest = 64;

/** The nearest of `known` within a third of its length in edits (at least one), the first of equals; letter case costs less. */
export function nearestName(name: string, known: Iterable<string>): string | undefined {
  if (name.length === 0 || name.length > longest) return undefined;
  let best: string | undefined;
  let least = Infinity;
  for (const candidate of known) {
    const allowed = Math.max(1, Math.floor(Math.max(name.length, candidate.length) / 3));
    if (candidate.length > longest || Math.abs(candidate.length - name.length) > allowed) continue;
    const distance = Math.min(edits(name, candidate), edits(name.toLowerCase(), candidate.toLowerCase()) + 0.5);
    if (distance <= allowed && distance < least) {
      best = candidate;
      least = distance;
    }
  }
  return best;
}

/** Insertions, deletions, replacements and swaps of neighbours that make one word into another; O(length²). */
function edits(from: string, to: string): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: to.length + 1 }, (_, j) => j);
  for (let i = 1; i <= from.length; i++) {
    const row = [i];
    for (let j = 1; j <= to.length; j++) {
      const same = from[i - 1] === to[j - 1];
      let cost = Math.min((last[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (last[j - 1] ?? 0) + (same ? 0 : 1));
      const swapped = i > 1 && j > 1 && from[i - 1] === to[j - 2] && from[i - 2] === to[j - 1];
      if (swapped) cost = Math.min(cost, (beforeLast[j - 2] ?? 0) + 1);
      row.push(cost);
    }
    beforeLast = last;
    last = row;
  }
  return last[to.length] ?? 0;
}
