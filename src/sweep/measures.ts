// Measures: what is asked at each point, and the numbers that answer it.
import type { Model } from '../model/model.ts';
import type { SweepSpec } from '../spec/schema/spec.ts';

export type MeasureName = NonNullable<SweepSpec['measures']>[number];

/** One number a point. */
export interface Quantity {
  readonly name: string;
  readonly measure: MeasureName;
  readonly unit: string;
  readonly meaning: string;
  /** From runs: it then has a standard error, and a value from each half of the replicates. */
  readonly chance: boolean;
  /** Index of the outcome, where it is of one. */
  readonly outcome?: number;
}

const plain: Readonly<Record<Exclude<MeasureName, 'chance' | 'chance-at-end'>, Omit<Quantity, 'name' | 'measure'>>> = {
  growth: {
    unit: 'a year',
    chance: false,
    meaning: 'Factor by which numbers change in a year near zero, at mean rates.',
  },
  damping: { unit: 'a year', chance: false, meaning: 'Factor by which what is out of stable proportion fades.' },
  standing: {
    unit: 'animals',
    chance: false,
    meaning: 'Animals where numbers come to stand still from the start; missing where they never do.',
  },
  'path-end': { unit: 'animals', chance: false, meaning: 'Animals at the last count of the path without chance.' },
  lowest: {
    unit: 'animals',
    chance: true,
    meaning: 'Mean over the runs of the lowest count of all animals, the start included.',
  },
  animals: { unit: 'animals', chance: true, meaning: 'Mean number of animals at the last count.' },
  'patches-in-use': {
    unit: 'patches',
    chance: true,
    meaning: 'Mean number of patches with at least one animal at the last count.',
  },
};

/** A chance is one number for each outcome of the model. */
export function quantitiesOf(
  measures: readonly MeasureName[],
  { outcomes }: Pick<Model, 'outcomes'>,
): readonly Quantity[] {
  return measures.flatMap((measure): readonly Quantity[] => {
    if (measure !== 'chance' && measure !== 'chance-at-end') return [{ name: measure, measure, ...plain[measure] }];
    const when = measure === 'chance' ? 'at some count' : 'at the last count';
    return outcomes.map(({ name, definition }, outcome) => ({
      name: `${measure}: ${name}`,
      measure,
      unit: 'share',
      chance: true,
      meaning: `Share of the runs with this ${when}: ${definition}.`,
      outcome,
    }));
  });
}

export interface NumberColumn {
  readonly name: string;
  readonly unit: string;
  readonly meaning: string;
}

/** Columns of a quantity: itself; from runs also its standard error and what each half of the replicates says. */
export function columnsOf({ name, unit, meaning, chance }: Quantity): readonly NumberColumn[] {
  const own = { name, unit, meaning };
  if (!chance) return [own];
  return [
    own,
    {
      name: `${name} (standard error)`,
      unit,
      meaning: 'How far it may be off from the number of runs: one standard error.',
    },
    { name: `${name} (first half)`, unit, meaning: 'The same from the first half of the replicates.' },
    { name: `${name} (second half)`, unit, meaning: 'The same from the second half of the replicates.' },
  ];
}

/** Whether it is asked of runs with chance. */
export function isOfRuns(measure: MeasureName): boolean {
  return !['growth', 'damping', 'standing', 'path-end'].includes(measure);
}
