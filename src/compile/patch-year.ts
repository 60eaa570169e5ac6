// One patch alone for a whole year: no dispersal, no ceiling, nobody who takes, moves or releases animals. What capacities and stable spreads within a patch rest on.
import type { Model } from '../model/model.ts';
import { identity, times } from '../numeric/square.ts';
import { lifeMap } from './life-map.ts';
import { readingPhase, type Multipliers } from './multipliers.ts';
import { dependsOnMakeUp, settledMakeUp } from './make-up.ts';

export interface PatchYear {
  readonly model: Model;
  readonly patch: number;
  /** Rates are those of the first step. */
  readonly multipliers: Multipliers;
}

/**
 * C×C from count to count, at to * C + from; up to (not with) the phase `until`, if given. Where births depend on the make-up
 * of the sexes, at the make-up that the patch settles to under these multipliers.
 */
export function patchYear(year: PatchYear, until = year.model.phases.length): Float64Array {
  const { model } = year;
  if (!dependsOnMakeUp(model)) return yearFrom(year, until);
  const n = model.classes.length;
  const makeUp = settledMakeUp(n, (animals) => applied(yearFrom(year, model.phases.length, animals), animals));
  return yearFrom(year, until, makeUp);
}

/** From animals by class at the count, of whom there may be so few that no ceiling matters. */
function yearFrom({ model, patch, multipliers }: PatchYear, until: number, animals?: Float64Array): Float64Array {
  const n = model.classes.length;
  let year = identity(n);
  let here = animals;
  model.phases.slice(0, until).forEach((phase, index) => {
    switch (phase.kind) {
      case 'count':
      case 'dispersal':
      case 'ceiling':
      case 'take':
      case 'move':
      case 'add':
        return;
      default: {
        const request = { model, phase: index, patch, step: 1, multipliers };
        const map = lifeMap(phase, here === undefined ? request : { ...request, animals: here });
        year = times(map, year, n);
        here = here === undefined ? undefined : applied(map, here);
      }
    }
  });
  return year;
}

/** N of each crowding where it is read, from animals by class at the count. */
export function countsAlone(year: PatchYear, animals: Float64Array): readonly number[] {
  const { model } = year;
  return model.crowding.map(({ counted }, k) => {
    const there = applied(patchYear(year, readingPhase(model, k)), animals);
    return there.reduce((sum, value, c) => sum + (counted[c] ?? 0) * value, 0);
  });
}

function applied(map: Float64Array, animals: Float64Array): Float64Array {
  const n = animals.length;
  const out = new Float64Array(n);
  for (let i = 0; i < n * n; i++) {
    const to = Math.floor(i / n);
    out[to] = (out[to] ?? 0) + (map[i] ?? 0) * (animals[i % n] ?? 0);
  }
  return out;
}
