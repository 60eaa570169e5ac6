// Capacities: a number of animals above zero for every patch.
import type { SpecPath } from '../spec/document.ts';
import { fail, type Context } from './context.ts';
import { whereIn } from './rates.ts';

export function resolveCapacities(context: Context, expression: number | string, path: SpecPath): Float64Array {
  return Float64Array.from(context.patches, (patch, p) => {
    const value = context.numbers.value(expression, path, whereIn(context, p, context.time.firstYear));
    if (value > 0 || Number.isNaN(value)) return value;
    const key = JSON.stringify(path);
    if (!context.toldBounds.has(key)) {
      fail(context, 'missing-capacity', path, {
        message: `The capacity of ${patch.name} is ${value}`,
        details: { expected: 'a number of animals above zero' },
      });
    }
    context.toldBounds.add(key);
    return NaN;
  });
}
