// What may be handed out where places are secret: a model, a spec and a hash from which nobody reads where the patches lie.
import type { Model, Patch, Phase } from '../../model/model.ts';
import type { CompiledModel } from '../../pipeline.ts';
import { provenanceOf } from '../../results/provenance.ts';
import type { PathResults, RunResults } from '../../results/results.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import { coarse, hiddenText, withoutPlaces } from './hidden-spec.ts';
import { shiftPlaces, type Ring } from './shift.ts';

export type Hiding =
  /** Moved with a secret key. */
  | { readonly places: 'shifted'; readonly key: Uint8Array }
  /** No places at all. */
  | { readonly places: 'schematic' };

export interface Hidden {
  readonly places: Hiding['places'];
  /** To draw and to print; nothing can be run from it. */
  readonly model: Model;
  readonly spec: Spec;
  readonly specText: string;
  /** Of everything that decides the result but what is hidden: with the places in it, it would let guesses be checked. */
  readonly hash: string;
  /** How far patches are moved; null where they have no place. */
  readonly ring: Ring | null;
}

export function hidePlaces({ model, spec }: Pick<CompiledModel, 'model' | 'spec'>, hiding: Hiding): Hidden {
  const shifted = hiding.places === 'shifted' ? shiftPlaces(model.patches, hiding.key) : null;
  const hidden = withoutPlaces(spec);
  return {
    places: hiding.places,
    model: {
      ...model,
      patches: model.patches.map((patch, p) => hiddenPatch(patch, shifted?.places[p] ?? null)),
      phases: model.phases.map(hiddenPhase),
    },
    spec: hidden,
    specText: hiddenText(spec),
    hash: provenanceOf(model.title, hidden).hash,
    ring: shifted?.ring ?? null,
  };
}

/** All plans are drawn where the first one is: places that are moved twice could be averaged. A new patch has no place then. */
export function hiddenPlan(plan: Model, { model: hidden }: Pick<Hidden, 'model'>): Model {
  const patches = plan.patches.map(({ name, capacity, fileOrder }): Patch => {
    const known = hidden.patches.find((patch) => patch.name === name);
    return { name, at: null, areaKm2: null, ...known, capacity, fileOrder };
  });
  return { ...plan, patches, phases: plan.phases.map(hiddenPhase) };
}

function hiddenPatch({ name, areaKm2, capacity, fileOrder }: Patch, at: Patch['at']): Patch {
  return { name, at, areaKm2: areaKm2 === null ? null : coarse(areaKm2), capacity, fileOrder };
}

function hiddenPhase(phase: Phase): Phase {
  if (phase.kind !== 'dispersal' || phase.links === undefined) return phase;
  return { ...phase, links: phase.links.map((link) => ({ ...link, distanceKm: null })) };
}

/** Results that say of themselves that places are hidden. */
export function withHiding<Results extends RunResults | PathResults>(results: Results, hidden: Hidden | null): Results {
  return hidden === null ? results : { ...results, hash: hidden.hash, places: hidden.places };
}

/** True where a reader of the model, or of what is written from it, could find the patches. */
export function tellsPlaces({ patches, invented }: Model): boolean {
  return !invented && patches.some(({ at }) => at !== null);
}
