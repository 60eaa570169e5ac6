// A patch alone with two classes and crowding, in every combination that the capacity tests go through.
import { readingPhase } from '../../src/compile/multipliers.ts';
import { runYear, type Compiled } from '../../src/compile/year-map.ts';
import { multiply } from '../../src/numeric/sparse-product.ts';
import { framed } from '../pipeline/frame.ts';

export interface Isolated {
  readonly year: readonly string[];
  readonly form: 'beverton-holt' | 'ricker';
  /** As in YAML. */
  readonly changes: string;
  readonly capacity: number;
  readonly alleeHalf: number;
  readonly young: number;
  readonly adult: number;
  readonly births: number;
}

/** Young count half. With the phase `demography` the same life is one matrix a year. */
export function isolatedText({ year, form, changes, capacity, alleeHalf, young, adult, births }: Isolated): string {
  const rates = year.includes('demography')
    ? `demography: { fates: [[0, 0], [${young}, ${adult}]], births: [[0, ${births}], [0, 0]] }`
    : `survival: { young: ${young}, adult: adult_survival }\nbirths: { adult: ${births} }`;
  return framed(`classes: [young, adult]
oldest: open-ended
parameters: { adult_survival: ${adult} }
${rates}
year: [${year.join(', ')}]
crowding:
  form: ${form}
  changes: ${changes}
  counted: { young: 0.5, adult: 1 }
  capacity: ${capacity}
  allee-half: ${alleeHalf}
start: { table: { Meadow: { adult: 40 } } }
`);
}

/** What crowding counts, where it reads it, in a year that begins with the given animals. */
export function crowdingCount(compiled: Compiled, animals: Float64Array): number {
  const { maps } = runYear(compiled, animals);
  const state = maps.slice(0, readingPhase(compiled.model, 0)).reduce((before, map) => multiply(map, before), animals);
  return 0.5 * (state[0] ?? NaN) + (state[1] ?? NaN);
}

/** The structure that the year gives when the crowding count is brought to `count` again before every year. */
export function heldAt(compiled: Compiled, count: number): Float64Array {
  let animals: Float64Array = Float64Array.of(1, 1);
  for (let t = 0; t < 300; t++) {
    const factor = count / crowdingCount(compiled, animals);
    animals = runYear(
      compiled,
      animals.map((value) => value * factor),
    ).after;
  }
  const factor = count / crowdingCount(compiled, animals);
  return animals.map((value) => value * factor);
}
