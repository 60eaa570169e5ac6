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
  /** Which of two scenarios is better by it; null where neither is. */
  readonly better: 'less' | 'more' | null;
}

/** Stands for the currency of the model. */
export const moneyUnit = 'money';

const plain: Readonly<Record<Exclude<MeasureName, 'chance' | 'chance-at-end'>, Omit<Quantity, 'name' | 'measure'>>> = {
  growth: {
    better: 'more',
    unit: 'a year',
    chance: false,
    meaning: 'Factor by which numbers change in a year near zero, at mean rates.',
  },
  damping: {
    better: null,
    unit: 'a year',
    chance: false,
    meaning: 'Factor by which what is out of stable proportion fades.',
  },
  standing: {
    better: 'more',
    unit: 'animals',
    chance: false,
    meaning: 'Animals where numbers come to stand still from the start; missing where they never do.',
  },
  'path-end': {
    better: 'more',
    unit: 'animals',
    chance: false,
    meaning: 'Animals at the last count of the path without chance.',
  },
  lowest: {
    better: 'more',
    unit: 'animals',
    chance: true,
    meaning: 'Mean over the runs of the lowest count of all animals, the start included.',
  },
  animals: {
    better: 'more',
    unit: 'animals',
    chance: true,
    meaning: 'Mean number of animals at the last count.',
  },
  'patches-in-use': {
    better: 'more',
    unit: 'patches',
    chance: true,
    meaning: 'Mean number of patches with at least one animal at the last count.',
  },
  cost: {
    better: 'less',
    unit: moneyUnit,
    chance: true,
    meaning: 'Mean money spent over all years, discounted to the first, with prices that are ranges at their middle.',
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
    return outcomes.map(({ name, definition, event }, outcome) => ({
      name: `${measure}: ${name}`,
      measure,
      unit: 'share',
      chance: true,
      meaning: `Share of the runs with this ${when}: ${definition}.`,
      outcome,
      better: event.is === 'above' ? 'more' : 'less',
    }));
  });
}

export interface NumberColumn {
  readonly name: string;
  /** Absent where it need not be whole. */
  readonly type?: 'integer';
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

/** The same for one of several scenarios. */
function inScenario(quantity: Quantity, scenario: string): Quantity {
  const { name, meaning } = quantity;
  return { ...quantity, name: `${name} [${scenario}]`, meaning: `${meaning} Scenario: ${scenario}.` };
}

/** Scenario by scenario. */
export function inScenarios(quantities: readonly Quantity[], scenarios: readonly string[]): readonly Quantity[] {
  if (scenarios.length === 0) return quantities;
  return scenarios.flatMap((name) => quantities.map((quantity) => inScenario(quantity, name)));
}

/**
 * Columns of plans set beside each other, quantity by quantity that is from runs: of each scenario but the first its difference to that,
 * then of each scenario whether it may be the best. In the order of their numbers at a point.
 */
export function pairColumnsOf(quantities: readonly Quantity[], scenarios: readonly string[]): readonly NumberColumn[] {
  const [base, ...others] = scenarios;
  if (base === undefined) return [];
  return quantities
    .filter(isPaired)
    .flatMap((quantity) => [
      ...others.flatMap((name) => differenceColumns(inScenario(quantity, name), { name, base })),
      ...(quantity.better === null ? [] : scenarios.map((name) => perhapsBestColumn(inScenario(quantity, name)))),
    ]);
}

export function isPaired({ chance }: Quantity): boolean {
  return chance;
}

function differenceColumns(
  { name: column, unit }: Quantity,
  { name, base }: { readonly name: string; readonly base: string },
): readonly NumberColumn[] {
  const less = `under ${name} less under ${base}, in the same futures`;
  return [
    { name: `${column} (difference)`, unit, meaning: `The measure ${less}.` },
    {
      name: `${column} (standard error of the difference)`,
      unit,
      meaning: 'How far the difference may be off from the number of runs: one standard error of paired values.',
    },
    {
      name: lowerOf(column),
      unit,
      meaning: `Lower end of the 95 % interval of the difference, ${less}: of chances by Bonett & Price 2012, else by Student's t. The two are told apart where it does not hold 0.`,
    },
    { name: upperOf(column), unit, meaning: 'Upper end of it.' },
  ];
}

function perhapsBestColumn({ name }: Quantity): NumberColumn {
  return {
    name: perhapsBestOf(name),
    type: 'integer',
    unit: '',
    meaning:
      '1 where this scenario is best by the measure, or the 95 % interval of the paired difference cannot tell it from the best one; else 0.',
  };
}

/** Names of columns beside that of a measure under a scenario. */
export function lowerOf(column: string): string {
  return `${column} (lower end of the difference)`;
}

export function upperOf(column: string): string {
  return `${column} (upper end of the difference)`;
}

export function perhapsBestOf(column: string): string {
  return `${column} (perhaps best)`;
}

/** Whether it is asked of runs with chance. */
export function isOfRuns(measure: MeasureName): boolean {
  return !['growth', 'damping', 'standing', 'path-end'].includes(measure);
}
