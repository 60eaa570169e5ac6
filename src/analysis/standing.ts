// Where each patch stands still, alone and linked, and how far leavers really go: what `check` tells about a model.
import { multipliersAtRest } from '../compile/multipliers.ts';
import { patchYear } from '../compile/patch-year.ts';
import { runYear, wholeYear, type Compiled } from '../compile/year-map.ts';
import type { Landscape } from '../landscape/landscape.ts';
import type { Model } from '../model/model.ts';
import { growthRateOf } from '../numeric/leading.ts';
import { sparseFromDense } from '../numeric/sparse.ts';
import { onePatch, settledApart } from './apart.ts';
import { equilibriumFrom, largestJacobian, settledFrom } from './equilibrium.ts';
import { quickYear } from './quick-year.ts';

export interface PatchStanding {
  readonly patch: string;
  /** Growth rate alone near zero, without dispersal. */
  readonly growthAlone: number;
  /** All animals at the count where the patch alone stands still; null where it never does. */
  readonly alone: number | null;
  /** The same in the linked system; null where it does not settle. */
  readonly linked: number | null;
}

/** By patch, in the order of the model. */
export function standingOf(compiled: Compiled, start: Float64Array): readonly PatchStanding[] {
  const { model } = compiled;
  const linked = linkedTotals(compiled, start);
  const alone = aloneTotals(compiled, start);
  return model.patches.map((patch, p) => ({
    patch: patch.name,
    growthAlone: growthAlone(model, p),
    alone: alone[p] ?? null,
    linked: linked?.[p] ?? null,
  }));
}

function growthAlone(model: Model, patch: number): number {
  const n = model.classes.length;
  const values = patchYear({ model, patch, multipliers: multipliersAtRest(model) });
  return growthRateOf(sparseFromDense({ rows: n, columns: n, values }));
}

const settleYears = 3000;
/** Cells times years that are followed to see where the linked system settles: seconds. */
const mostFollowed = 4e8;

function linkedTotals(compiled: Compiled, start: Float64Array): readonly number[] | null {
  const { model } = compiled;
  if (!selfLimiting(compiled)) return null;
  const { states, apply, matrixAt } = quickYear(compiled);
  if (states <= largestJacobian) {
    const found = equilibriumFrom({ states, apply, matrixAt }, start, settleYears);
    return found === null ? null : patchTotals(model, found.animals);
  }
  const found = settledFrom(apply, start, Math.min(settleYears, Math.floor(mostFollowed / states)));
  return found === null ? null : patchTotals(model, found);
}

/** Each patch with nobody elsewhere and no dispersal; null for those that never stand still. */
function aloneTotals(compiled: Compiled, start: Float64Array): readonly (number | null)[] {
  const { model } = compiled;
  if (!selfLimiting(compiled)) return model.patches.map(() => null);
  const n = model.classes.length;
  const from = start.slice();
  model.patches.forEach((_, p) => {
    const own = from.subarray(p * n, p * n + n);
    if (own.every((value) => value === 0)) own.fill(1);
  });
  const { animals, still } = settledApart(compiled, from);
  return model.patches.map((_, p) => {
    const own = animals.slice(p * n, p * n + n);
    if (still[p] === 1) return own.reduce((sum, value) => sum + value, 0);
    const found = equilibriumFrom(wholeYear(onePatch(compiled, p)), own, settleYears);
    return found === null ? null : found.animals.reduce((sum, value) => sum + value, 0);
  });
}

function selfLimiting({ model }: Compiled): boolean {
  return model.crowding.length > 0 || model.phases.some((phase) => phase.kind === 'ceiling');
}

function patchTotals(model: Model, animals: Float64Array): readonly number[] {
  const n = model.classes.length;
  return model.patches.map((_, p) => animals.subarray(p * n, p * n + n).reduce((sum, value) => sum + value, 0));
}

export interface DispersalReach {
  readonly phase: string;
  /** Of those that arrive, weighted by the leavers of the given animals; null where no distance is used or none leave. */
  readonly realisedMeanKm: number | null;
  /** Share of the leavers that die on the way or miss. */
  readonly lost: number;
}

/** How far the leavers of one year go, if the start is who leaves. */
export function dispersalReach(compiled: Compiled, start: Float64Array): readonly DispersalReach[] {
  const { model, landscape } = compiled;
  const { before } = runYear(compiled, start);
  return model.phases.flatMap((phase, i) => {
    if (phase.kind !== 'dispersal') return [];
    const n = model.classes.length;
    const leaving = phase.leaving.epochs[0] ?? new Float64Array(0);
    const leavers = model.patches.map((_, p) => {
      let sum = 0;
      for (let c = 0; c < n; c++) {
        if (phase.moves[c] === 1) sum += (before[i]?.[p * n + c] ?? 0) * (leaving[p * n + c] ?? 0);
      }
      return sum;
    });
    return [{ phase: phase.name, ...meanWay(landscape, i, leavers) }];
  });
}

function meanWay(landscape: Landscape, phase: number, leavers: readonly number[]): Omit<DispersalReach, 'phase'> {
  const movement = landscape.movements[phase];
  if (movement === null || movement === undefined) return { realisedMeanKm: null, lost: 0 };
  let [alive, arrived, way, left] = [0, 0, 0, 0];
  leavers.forEach((count, p) => {
    left += count;
    for (let k = movement.start[p] ?? 0; k < (movement.start[p + 1] ?? 0); k++) {
      const there = count * (movement.chance[k] ?? 0);
      alive += there;
      // Those that turned back have not moved.
      if (movement.destinations[k] === p) continue;
      arrived += there;
      way += there * (movement.lengthKm?.[k] ?? 0);
    }
  });
  const known = movement.lengthKm !== null && arrived > 0;
  return { realisedMeanKm: known ? way / arrived : null, lost: left === 0 ? 0 : Math.max(0, 1 - alive / left) };
}
