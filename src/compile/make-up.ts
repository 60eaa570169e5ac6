// The make-up of a population whose births depend on how many females there are for each male: the year is then not linear, but
// homogeneous (twice the animals, twice the next count), so that near zero it grows with a settled make-up.
import type { Model } from '../model/model.ts';

/** So few that neither crowding nor ceilings matter. */
const few = 1e-12;
const mostYears = 3000;
/** Of all animals; what still changes then is too little to matter. */
const settledShare = 1e-13;

export function dependsOnMakeUp({ phases }: Model): boolean {
  return phases.some((phase) => phase.kind === 'breeding' && phase.mating !== undefined);
}

/** The make-up that few animals, alike in all states at first, settle to; 1e-12 animals in all. Each year goes half of the way. */
export function settledMakeUp(states: number, year: (animals: Float64Array) => Float64Array): Float64Array {
  let animals = new Float64Array(states).fill(few / states);
  for (let t = 0; t < mostYears; t++) {
    const after = year(animals);
    const total = after.reduce((sum, value) => sum + value, 0);
    if (!(total > 0)) return animals;
    const next = animals.map((value, i) => (value + ((after[i] ?? 0) * few) / total) / 2);
    const change = next.reduce((most, value, i) => Math.max(most, Math.abs(value - (animals[i] ?? 0))), 0);
    animals = next;
    if (change < settledShare * few) break;
  }
  return animals;
}
