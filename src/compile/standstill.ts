// What the multiplier of a crowding must be for a patch alone to stand still at its capacity: ρ(A(g*)) = 1, where of all other
// conditions only Allee factors act, each at the number that it then counts.
import type { Model } from '../model/model.ts';
import { growthRateOf, leading } from '../numeric/leading.ts';
import { findRoot } from '../numeric/root.ts';
import { sparseFromDense } from '../numeric/sparse.ts';
import { unitMultipliers, type Multipliers } from './multipliers.ts';
import { countsAlone, patchYear } from './patch-year.ts';

export type Standstill =
  | { readonly kind: 'found'; readonly multiplier: number }
  | { readonly kind: 'declines'; readonly growth: number }
  | { readonly kind: 'always grows'; readonly growth: number };

export interface Asked {
  readonly model: Model;
  /** Index of the crowding. */
  readonly k: number;
  readonly patch: number;
}

const mostRounds = 200;

export function standstill(asked: Asked): Standstill {
  const { model, k, patch } = asked;
  const multipliers = unitMultipliers(model);
  let found = solve(asked, multipliers);
  const others = model.crowding.some(({ alleeHalf }, j) => j !== k && (alleeHalf[patch] ?? 0) > 0);
  for (let round = 0; others && round < mostRounds && found.kind === 'found'; round++) {
    const change = readAllee(asked, multipliers, found.multiplier);
    if (change === null) return { kind: 'declines', growth: NaN };
    found = solve(asked, multipliers);
    if (change < 1e-13) break;
  }
  return found;
}

function yearAt({ model, k, patch }: Asked, multipliers: Multipliers, multiplier: number) {
  const n = model.classes.length;
  multipliers[k]?.fill(multiplier, patch, patch + 1);
  return sparseFromDense({ rows: n, columns: n, values: patchYear({ model, patch, multipliers }) });
}

function solve(asked: Asked, multipliers: Multipliers): Standstill {
  const growth = (multiplier: number): number => growthRateOf(yearAt(asked, multipliers, multiplier));
  const highest = growth(1);
  if (highest <= 1) return { kind: 'declines', growth: highest };
  const lowest = growth(0);
  if (lowest >= 1) return { kind: 'always grows', growth: lowest };
  const multiplier = findRoot((g) => growth(g) - 1, { low: 0, high: 1 });
  return multiplier === null ? { kind: 'always grows', growth: lowest } : { kind: 'found', multiplier };
}

/** Sets the Allee factors of the other crowdings to those of the patch at its capacity; how much they changed, null where nobody is counted. */
function readAllee(asked: Asked, multipliers: Multipliers, multiplier: number): number | null {
  const { model, k, patch } = asked;
  const { right } = leading(yearAt(asked, multipliers, multiplier));
  if (right === null) return null;
  const counts = countsAlone({ model, patch, multipliers }, right);
  const scale = (model.crowding[k]?.capacity[patch] ?? NaN) / (counts[k] ?? 0);
  if (!Number.isFinite(scale)) return null;
  return model.crowding.reduce((most, { alleeHalf }, j) => {
    const half = alleeHalf[patch] ?? 0;
    const own = multipliers[j];
    if (j === k || half === 0 || own === undefined) return most;
    const factor = (scale * (counts[j] ?? 0)) / (scale * (counts[j] ?? 0) + half);
    const change = Math.abs(factor - (own[patch] ?? 1));
    own[patch] = factor;
    return Math.max(most, change);
  }, 0);
}
