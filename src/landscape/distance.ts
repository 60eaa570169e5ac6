// Straight distances on the plane, and which patches lie within reach of one another.
import type { Patch } from '../model/model.ts';

/** Kilometres between two patches, rounded to 1 mm so that every machine has the same number. */
export function distanceKm(a: Patch, b: Patch): number {
  if (a.at === null || b.at === null) return NaN;
  const [dx, dy] = [a.at[0] - b.at[0], a.at[1] - b.at[1]];
  return Math.round(Math.sqrt(dx * dx + dy * dy) * 1e6) / 1e6;
}

export interface Neighbour {
  readonly patch: number;
  readonly km: number;
}

/** For each patch the others within reach (all where it is null), in the order of the patches. */
export function neighboursWithin(patches: readonly Patch[], reachKm: number | null): readonly (readonly Neighbour[])[] {
  const eastward = patches.map((_, p) => p).sort((a, b) => x(patches[a]) - x(patches[b]) || a - b);
  const found: Neighbour[][] = patches.map(() => []);
  eastward.forEach((p, i) => {
    for (const q of eastward.slice(i + 1, endOfReach(patches, { eastward, i, reachKm }))) {
      const [from, to] = [patches[p], patches[q]];
      if (from === undefined || to === undefined) continue;
      const km = distanceKm(from, to);
      if (reachKm !== null && km > reachKm) continue;
      found[p]?.push({ patch: q, km });
      found[q]?.push({ patch: p, km });
    }
  });
  for (const list of found) list.sort((a, b) => a.patch - b.patch);
  return found;
}

interface Sweep {
  readonly eastward: readonly number[];
  readonly i: number;
  readonly reachKm: number | null;
}

/** First position to the east that lies beyond reach. */
function endOfReach(patches: readonly Patch[], { eastward, i, reachKm }: Sweep): number {
  if (reachKm === null) return eastward.length;
  const limit = x(patches[eastward[i] ?? 0]) + reachKm + 1e-6;
  let end = i + 1;
  while (end < eastward.length && x(patches[eastward[end] ?? 0]) <= limit) end++;
  return end;
}

function x(patch: Patch | undefined): number {
  return patch?.at?.[0] ?? 0;
}
