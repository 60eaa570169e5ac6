// Counts of the past, as they are drawn beside what the model says.
import { readYear } from './calendar.ts';
import { classMask, patchIndex, type Context } from './context.ts';
import type { ObservedCounts } from './model.ts';
import { withinBounds } from './rates.ts';

export function resolveObserved(context: Context): ObservedCounts | undefined {
  const { observed } = context.spec;
  if (observed === undefined) return undefined;
  const path = ['observed'];
  const counts = Object.entries(observed.counts).flatMap(([name, byYear]) => {
    const patch = patchIndex(context, name, [...path, 'counts', name]);
    return Object.entries(byYear).map(([year, animals]) => ({
      patch,
      year: readYear(context, year, [...path, 'counts', name, year]),
      animals,
    }));
  });
  counts.sort((a, b) => a.patch - b.patch || a.year - b.year);
  return { counts, of: classMask(context, observed.of ?? 'all', [...path, 'of']), error: errorOf(context) };
}

function errorOf(context: Context): number | null {
  const expression = context.spec.observed?.error;
  if (expression === undefined) return null;
  const path = ['observed', 'error'];
  const value = context.numbers.value(expression, path, { year: context.time.firstYear });
  withinBounds(context, { expression, path, what: 'error of a count' }, { value, bounds: 'share', patch: undefined });
  return value;
}
