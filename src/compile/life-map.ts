// The part of a phase map that stays within one patch: survival, births, ageing, fates. The diagonal block of the map.
import type { AgeingPhase, BreedingPhase, DemographyPhase, Model, SurvivalPhase } from '../model/model.ts';
import { advanceAt } from './advance.ts';
import { shareWithin } from './ceiling.ts';
import { matingFactor } from './mating.ts';
import type { ScaledPart } from '../model/chance.ts';
import { multiplierOf, type Multipliers } from './multipliers.ts';
import { tableAt } from './rates.ts';

export type LifePhase = SurvivalPhase | BreedingPhase | AgeingPhase | DemographyPhase;

export interface LifeRequest {
  readonly model: Model;
  readonly phase: number;
  readonly patch: number;
  readonly step: number;
  readonly multipliers: Multipliers;
  /** What is left of the capacity of the patch; all where not given. */
  readonly room?: number;
  /** By class, in this patch, at the start of the phase; nobody where it is missing. */
  readonly animals?: Float64Array;
}

/** C×C, at to * C + from: animals of `to` after the phase for each of `from` before it. */
export function lifeMap(phase: LifePhase, request: LifeRequest): Float64Array {
  const fates = fatesMap(phase, request);
  if (phase.kind === 'survival' || phase.kind === 'ageing') return fates;
  const births = birthsMap(phase, request);
  return fates.map((value, i) => value + (births[i] ?? 0));
}

/** Animals that were there before. */
export function fatesMap(phase: LifePhase, request: LifeRequest): Float64Array {
  const n = request.model.classes.length;
  const map = new Float64Array(n * n);
  switch (phase.kind) {
    case 'survival': {
      const table = tableAt(phase.survival, request.step);
      for (let c = 0; c < n; c++) map[c * n + c] = (table[request.patch * n + c] ?? 0) * factor(request, 'survival', c);
      return map;
    }
    case 'breeding':
      for (let c = 0; c < n; c++) map[c * n + c] = 1;
      return map;
    case 'ageing':
      fillAgeing(map, phase, request.patch);
      return map;
    case 'demography': {
      const table = tableAt(phase.fates, request.step);
      for (let i = 0; i < n * n; i++)
        map[i] = (table[request.patch * n * n + i] ?? 0) * factor(request, 'fates', i % n);
      return map;
    }
  }
}

/** Animals that are new. */
export function birthsMap(phase: LifePhase, request: LifeRequest): Float64Array {
  const n = request.model.classes.length;
  const map = new Float64Array(n * n);
  if (phase.kind === 'breeding') {
    const table = tableAt(phase.births, request.step);
    const mated = phase.mating === undefined ? 1 : matingFactor(phase.mating, request.animals);
    for (let from = 0; from < n; from++) {
      const young = (table[request.patch * n + from] ?? 0) * factor(request, 'births', from);
      const share = breedingShare(phase, request, from);
      for (let to = 0; to < n; to++) map[to * n + from] = (phase.into[to] ?? 0) * young * share * mated;
    }
  } else if (phase.kind === 'demography') {
    const table = tableAt(phase.births, request.step);
    for (let i = 0; i < n * n; i++) map[i] = (table[request.patch * n * n + i] ?? 0) * factor(request, 'births', i % n);
  }
  return map;
}

/** Of a class, the share that breeds: below 1 only where the surplus over a ceiling waits. */
function breedingShare({ waits }: BreedingPhase, { patch, animals, room = 1, step }: LifeRequest, c: number): number {
  if (waits === undefined || animals === undefined || waits.counted[c] !== 1) return 1;
  return shareWithin(waits, { patch, animals, room, step });
}

function factor({ model, phase, patch, multipliers }: LifeRequest, part: ScaledPart, c: number): number {
  return multiplierOf(model, multipliers, { phase, part, patch, class: c });
}

function fillAgeing(map: Float64Array, phase: AgeingPhase, patch: number): void {
  const n = phase.next.length;
  for (let c = 0; c < n; c++) {
    const [share, to] = [advanceAt(phase, { patch, class: c }), phase.next[c] ?? -1];
    map[c * n + c] = (map[c * n + c] ?? 0) + 1 - share;
    if (to >= 0) map[to * n + c] = (map[to * n + c] ?? 0) + share;
  }
}
