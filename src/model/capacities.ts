// Capacities: a number of animals above zero for every patch, in every year.
import type { SpecPath } from '../spec/document.ts';
import { fail, type Context } from './context.ts';
import type { RateTable } from './model.ts';
import { byYears } from './epochs.ts';
import { whereIn } from './rates.ts';

export interface Capacities {
  readonly capacity: Float64Array;
  /** Only where it changes with the years. */
  readonly capacityByYear?: RateTable;
}

export function resolveCapacities(context: Context, expression: number | string, path: SpecPath): Capacities {
  const varies = context.numbers.varies(expression, path);
  const { epochs, epochOf } = byYears(context, varies, (year) => capacitiesIn(context, { expression, path, year }));
  const [capacity = new Float64Array(0)] = epochs;
  return epochs.length > 1 ? { capacity, capacityByYear: { epochs, epochOf } } : { capacity };
}

interface Request {
  readonly expression: number | string;
  readonly path: SpecPath;
  readonly year: number;
}

function capacitiesIn(context: Context, { expression, path, year }: Request): Float64Array {
  return Float64Array.from(context.patches, (patch, p) => {
    const value = context.numbers.value(expression, path, whereIn(context, p, year));
    if (value > 0 || Number.isNaN(value)) return value;
    const key = JSON.stringify(path);
    if (!context.toldBounds.has(key)) {
      fail(context, 'missing-capacity', path, {
        message: `The capacity of ${patch.name} is ${value}${year === context.time.firstYear ? '' : ` in ${year}`}`,
        details: { expected: 'a number of animals above zero' },
      });
    }
    context.toldBounds.add(key);
    return NaN;
  });
}
