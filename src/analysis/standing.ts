// Where each patch stands still, alone and linked, and how far leavers really go: what `check` tells about a model.
import { unitMultipliers } from '../compile/multipliers.ts';
import { patchYear } from '../compile/patch-year.ts';
import { runYear, wholeYear, type Compiled } from '../compile/year-map.ts';
import type { Landscape } from '../landscape/landscape.ts';
import type { CeilingPhase, Model } from '../model/model.ts';
import { leading } from '../numeric/leading.ts';
import { sparseFromDense } from '../numeric/sparse.ts';
import { equilibriumFrom } from './equilibrium.ts';

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
  return model.patches.map((patch, p) => ({
    patch: patch.name,
    growthAlone: growthAlone(model, p),
    alone: aloneTotal(compiled, p, start),
    linked: linked?.[p] ?? null,
  }));
}

function growthAlone(model: Model, patch: number): number {
  const n = model.classes.length;
  const values = patchYear({ model, patch, multipliers: unitMultipliers(model) });
  return leading(sparseFromDense({ rows: n, columns: n, values })).growthRate;
}

const settleYears = 3000;
const largestLinked = 2000;

function linkedTotals(compiled: Compiled, start: Float64Array): readonly number[] | null {
  const year = wholeYear(compiled);
  if (!selfLimiting(compiled) || year.states > largestLinked) return null;
  const found = equilibriumFrom(year, start, settleYears);
  return found === null ? null : patchTotals(compiled.model, found.animals);
}

/** The patch with nobody elsewhere and no dispersal. */
function aloneTotal(compiled: Compiled, patch: number, start: Float64Array): number | null {
  if (!selfLimiting(compiled)) return null;
  const alone = isolated(compiled, patch);
  const n = compiled.model.classes.length;
  const own = start.subarray(patch * n, patch * n + n);
  const from = own.some((value) => value > 0) ? Float64Array.from(own) : new Float64Array(n).fill(1);
  const found = equilibriumFrom(wholeYear(alone), from, settleYears);
  return found === null ? null : (patchTotals(alone.model, found.animals)[0] ?? null);
}

function selfLimiting({ model }: Compiled): boolean {
  return model.crowding.length > 0 || model.phases.some((phase) => phase.kind === 'ceiling');
}

function patchTotals(model: Model, animals: Float64Array): readonly number[] {
  const n = model.classes.length;
  return model.patches.map((_, p) => animals.subarray(p * n, p * n + n).reduce((sum, value) => sum + value, 0));
}

/** A compiled model of one patch, whose dispersal moves nobody, and where nobody is taken, brought or released. */
function isolated({ model, coefficients }: Compiled, p: number): Compiled {
  const n = model.classes.length;
  const pick = (values: Float64Array, size: number): Float64Array => values.slice(p * size, p * size + size);
  const table = (rates: { readonly epochs: readonly Float64Array[]; readonly epochOf: Int32Array }, size: number) => ({
    epochs: rates.epochs.map((epoch) => pick(epoch, size)),
    epochOf: rates.epochOf,
  });
  const never = new Int32Array(model.steps);
  const waitsOf = (waits: CeilingPhase | undefined) =>
    waits === undefined ? {} : { waits: { ...waits, capacity: pick(waits.capacity, 1) } };
  const phases = model.phases.map((phase) => {
    switch (phase.kind) {
      case 'survival':
        return { ...phase, survival: table(phase.survival, n) };
      case 'breeding':
        return { ...phase, births: table(phase.births, n), ...waitsOf(phase.waits) };
      case 'demography':
        return { ...phase, fates: table(phase.fates, n * n), births: table(phase.births, n * n) };
      case 'ceiling':
        return { ...phase, capacity: pick(phase.capacity, 1) };
      case 'dispersal':
        return { ...phase, moves: new Uint8Array(n) };
      case 'take':
      case 'move':
        return { ...phase, active: never, patches: new Uint8Array(1), levels: pick(phase.levels, 1), to: 0 };
      case 'add':
        return { ...phase, active: never, amounts: table(phase.amounts, n) };
      case 'ageing':
        return phase.advanceIn === undefined ? phase : { ...phase, advanceIn: pick(phase.advanceIn, n) };
      case 'count':
        return phase;
    }
  });
  return {
    model: { ...model, patches: model.patches.slice(p, p + 1), phases },
    landscape: { movements: phases.map(() => null) },
    coefficients: coefficients.map(({ form, coefficient, alleeHalf, ...others }) => ({
      ...others,
      form: form.slice(p, p + 1),
      coefficient: pick(coefficient, 1),
      alleeHalf: pick(alleeHalf, 1),
    })),
  };
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
