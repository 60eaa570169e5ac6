// The columns of a sweep that its summary looks at: each measure, and each of a scenario less that of the first.
import type { Observed } from '../sensitivity/observed.ts';
import { columnOf, type Swept } from './swept.ts';

/** Unit of a chance less another one. */
export const differenceOfShares = 'difference of shares';

export interface QuantityColumn {
  readonly name: string;
  readonly unit: string;
  readonly meaning: string;
  /** By point, over all replicates. */
  readonly whole: Float64Array;
  readonly observed: Observed;
  /** Of a difference from runs: by point 1 where it is above 0 for sure, −1 below, else 0. */
  readonly told: Int8Array | null;
  /** Whether it is the growth of the model, of which it matters where it goes through 1. */
  readonly growth: boolean;
}

export function quantityColumns({ manifest, numbers }: Swept): readonly QuantityColumn[] {
  return manifest.quantities.flatMap((quantity) => {
    const column = manifest.columns.find(({ name }) => name === columnOf(quantity.name, quantity.scenario));
    const whole = column === undefined ? undefined : numbers.get(column.name);
    const observed = column === undefined ? null : observedOf(numbers, column.name);
    return column === undefined || observed === null || whole === undefined
      ? []
      : [{ ...column, whole, observed, told: null, growth: quantity.name === 'growth' }];
  });
}

export function observedOf(numbers: Swept['numbers'], name: string): Observed | null {
  const whole = numbers.get(name);
  if (whole === undefined) return null;
  return { first: numbers.get(`${name} (first half)`) ?? whole, second: numbers.get(`${name} (second half)`) ?? whole };
}

/** Of each scenario that is compared against the first, in the same futures. */
export function differenceColumns(swept: Swept): readonly QuantityColumn[] {
  const { manifest, numbers } = swept;
  const [base] = manifest.scenarios;
  if (base === undefined) return [];
  return manifest.quantities.flatMap(({ name, scenario }) => {
    const own = scenario === null || scenario === base ? null : observedOf(numbers, columnOf(name, scenario));
    const first = observedOf(numbers, columnOf(name, base));
    const column = manifest.columns.find((one) => one.name === columnOf(name, base));
    const [ownWhole, firstWhole] = [scenario, base].map((one) => numbers.get(columnOf(name, one)));
    if (own === null || first === null || column === undefined || !ownWhole || !firstWhole) return [];
    const half = own.first === own.second;
    const less = (a: Float64Array, b: Float64Array) => a.map((value, i) => value - (b[i] ?? NaN));
    const one = less(own.first, first.first);
    const observed = { first: one, second: half ? one : less(own.second, first.second) };
    const unit = column.unit === 'share' ? differenceOfShares : column.unit;
    const meaning = `${name} of ${String(scenario)} less that of ${base}, in the same futures.`;
    const told = swept.told.get(columnOf(name, scenario)) ?? null;
    const whole = less(ownWhole, firstWhole);
    return [
      { name: `${name} [${String(scenario)} less ${base}]`, unit, meaning, whole, observed, told, growth: false },
    ];
  });
}
