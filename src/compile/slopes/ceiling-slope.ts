// How what a ceiling leaves moves with its capacity and with the animals under it.
import type { CeilingPhase } from '../../model/model.ts';
import { shareWithin, type Filled } from '../ceiling.ts';

export interface MovingPatch extends Filled {
  readonly animalSlopes: Float64Array;
  /** Of the whole capacity. */
  readonly capacitySlope: number;
}

/** Of min(1, K/N). */
export function shareWithinSlope(phase: CeilingPhase, moving: MovingPatch): number {
  if (shareWithin(phase, moving) === 1) return 0;
  const count = counted(phase, moving.animals);
  const capacity = (phase.capacity[moving.patch] ?? 0) * moving.room;
  return (
    (moving.capacitySlope * moving.room * count - capacity * counted(phase, moving.animalSlopes)) / (count * count)
  );
}

/** By class, of what is kept. */
export function keptSlopes(phase: CeilingPhase, moving: MovingPatch): Float64Array {
  const { animals, animalSlopes, capacitySlope, room } = moving;
  const slopes = new Float64Array(animals.length);
  if (phase.takes === 'nobody' || shareWithin(phase, moving) === 1) return slopes;
  if (phase.takes !== 'youngest first') {
    const slope = shareWithinSlope(phase, moving);
    return slopes.map((_, c) => (phase.counted[c] === 1 ? slope : 0));
  }
  let surplus = counted(phase, animals) - (phase.capacity[moving.patch] ?? 0) * room;
  let surplusSlope = counted(phase, animalSlopes) - capacitySlope * room;
  return slopes.map((_, c) => {
    const [here, hereSlope] = [animals[c] ?? 0, animalSlopes[c] ?? 0];
    if (phase.counted[c] !== 1 || surplus <= 0 || here <= 0) return 0;
    const [taken, takenSlope] = here <= surplus ? [here, hereSlope] : [surplus, surplusSlope];
    surplus -= taken;
    surplusSlope -= takenSlope;
    return (taken * hereSlope - takenSlope * here) / (here * here);
  });
}

function counted({ counted: mask }: CeilingPhase, values: Float64Array): number {
  return values.reduce((sum, value, c) => sum + (mask[c] === 1 ? value : 0), 0);
}
