// Movements that were built before: the ways of a dispersal are kept from one model to the next while nothing of them moves, and the
// areas of the patches are the same.
import type { Finding } from '../spec/finding.ts';
import type { DispersalPhase, Patch } from '../model/model.ts';
import type { Movement } from './landscape.ts';

export interface BuiltMovement {
  readonly movement: Movement;
  /** Told of it each time. */
  readonly findings: readonly Finding[];
}

interface Known extends BuiltMovement {
  readonly phase: DispersalPhase;
  readonly areas: readonly (number | null)[];
}

/** Of models of one spec that differ in the values of some parameters alone. */
export class LandscapeMemory {
  readonly #known = new Map<string, Known>();

  /** That of the phase as it was, or made; who leaves has no part in it. */
  of(phase: DispersalPhase, patches: readonly Patch[], make: () => BuiltMovement): BuiltMovement {
    const known = this.#known.get(phase.name);
    const areas = patches.map(({ areaKm2 }) => areaKm2);
    if (known !== undefined && sameWays(known.phase, phase) && sameAreas(known.areas, areas)) return known;
    const made = make();
    this.#known.set(phase.name, { phase, areas, ...made });
    return made;
  }
}

function sameWays(a: DispersalPhase, b: DispersalPhase): boolean {
  return a.rule === b.rule && a.links === b.links && a.byYear === b.byYear;
}

function sameAreas(a: Known['areas'], b: Known['areas']): boolean {
  return a.length === b.length && a.every((area, p) => Object.is(area, b[p]));
}
