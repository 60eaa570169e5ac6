// One patch alone for a whole year: no dispersal, no ceiling. What capacities and stable spreads within a patch rest on.
import type { Model } from '../model/model.ts';
import { lifeMap } from './life-map.ts';
import { readingPhase, type Multipliers } from './multipliers.ts';

export interface PatchYear {
  readonly model: Model;
  readonly patch: number;
  /** Rates are those of the first step. */
  readonly multipliers: Multipliers;
}

/** C×C from count to count, at to * C + from; up to (not with) the phase `until`, if given. */
export function patchYear({ model, patch, multipliers }: PatchYear, until = model.phases.length): Float64Array {
  const n = model.classes.length;
  let year = identity(n);
  model.phases.slice(0, until).forEach((phase, index) => {
    switch (phase.kind) {
      case 'count':
      case 'dispersal':
      case 'ceiling':
        return;
      default:
        year = times(lifeMap(phase, { model, phase: index, patch, step: 1, multipliers }), year, n);
    }
  });
  return year;
}

/** N of each crowding where it is read, from animals by class at the count. */
export function countsAlone(year: PatchYear, animals: Float64Array): readonly number[] {
  const { model } = year;
  const n = model.classes.length;
  return model.crowding.map(({ counted }, k) => {
    const map = patchYear(year, readingPhase(model, k));
    let count = 0;
    for (let i = 0; i < n * n; i++) count += (counted[Math.floor(i / n)] ?? 0) * (map[i] ?? 0) * (animals[i % n] ?? 0);
    return count;
  });
}

function identity(n: number): Float64Array {
  const map = new Float64Array(n * n);
  for (let c = 0; c < n; c++) map[c * n + c] = 1;
  return map;
}

function times(a: Float64Array, b: Float64Array, n: number): Float64Array {
  const out = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < n; k++) {
      const factor = a[i * n + k] ?? 0;
      if (factor === 0) continue;
      for (let j = 0; j < n; j++) out[i * n + j] = (out[i * n + j] ?? 0) + factor * (b[k * n + j] ?? 0);
    }
  }
  return out;
}
