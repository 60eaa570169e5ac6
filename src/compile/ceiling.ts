// What a ceiling leaves of each class in a patch.
import type { CeilingPhase } from '../model/model.ts';
import { tableAt } from './rates.ts';

export interface Filled {
  readonly patch: number;
  readonly animals: Float64Array;
  /** The first where it is missing. */
  readonly step?: number;
  /** What is left of the capacity. */
  readonly room: number;
}

/**
 * By class. At random: min(1, K/N) of each counted class. Youngest first: the surplus N − K comes out of the first counted class,
 * what it lacks out of the next, and so on. Nobody is removed where the surplus waits.
 */
export function keptShares(phase: CeilingPhase, { patch, animals, room, step }: Filled): Float64Array {
  const kept = new Float64Array(animals.length).fill(1);
  if (phase.takes === 'nobody') return kept;
  const share = shareWithin(phase, { patch, animals, room, ...(step === undefined ? {} : { step }) });
  if (phase.takes !== 'youngest first') return kept.map((_, c) => (phase.counted[c] === 1 ? share : 1));
  let surplus = (1 - share) * countOf(phase, animals);
  return kept.map((_, c) => {
    const here = animals[c] ?? 0;
    if (phase.counted[c] !== 1 || surplus <= 0 || here <= 0) return 1;
    const taken = Math.min(here, surplus);
    surplus -= taken;
    return 1 - taken / here;
  });
}

/** min(1, K/N): of the counted animals the share that finds room. */
export function shareWithin(phase: CeilingPhase, { patch, animals, room, step = 1 }: Filled): number {
  const count = countOf(phase, animals);
  const { capacity: always, capacityByYear } = phase;
  const capacities = capacityByYear === undefined ? always : tableAt(capacityByYear, step);
  const capacity = (capacities[patch] ?? Infinity) * room;
  return count > capacity ? capacity / count : 1;
}

function countOf({ counted }: CeilingPhase, animals: Float64Array): number {
  return animals.reduce((sum, value, c) => sum + (counted[c] === 1 ? value : 0), 0);
}
