// Years that are written, as steps.
import type { SpecPath } from '../spec/document.ts';
import type { TakeSpec } from '../spec/schema/spec.ts';
import { readWholeYears } from '../spec/quantity.ts';
import { fail, type Context } from './context.ts';

type YearsSpec = TakeSpec['years'];

/** At t − 1 whether it is done in step t; null where no years are given: in every step. */
export function activeYears(context: Context, years: YearsSpec, path: SpecPath): Int32Array | null {
  if (years === undefined) return null;
  const { firstYear, steps } = context.time;
  const last = firstYear + steps - 1;
  if ('from' in years || 'until' in years || !Array.isArray(years)) {
    const { from = firstYear, until = last } = Array.isArray(years) ? {} : years;
    if (from > until || from > last || until < firstYear) tellOutside(context, path, `${from} to ${until}`);
    return Int32Array.from({ length: steps }, (_, t) => (firstYear + t >= from && firstYear + t <= until ? 1 : 0));
  }
  years.forEach((year, i) => {
    if (year < firstYear || year > last) tellOutside(context, [...path, i], String(year));
  });
  return Int32Array.from({ length: steps }, (_, t) => (years.includes(firstYear + t) ? 1 : 0));
}

function tellOutside(context: Context, path: SpecPath, found: string): void {
  const { firstYear, steps } = context.time;
  fail(context, 'year-outside', path, {
    message: 'These years are not looked at',
    details: {
      found,
      expected: `years from ${firstYear} to ${firstYear + steps - 1}`,
      fix: 'Correct them, or look further with `years` and `first-year`.',
    },
  });
}

/** A length of time in whole steps, 1 where none is given. */
export function wholeYears(context: Context, quantity: number | string | undefined, path: SpecPath): number {
  if (quantity === undefined) return 1;
  const years = readWholeYears(quantity);
  if (years !== null) return years;
  fail(context, 'out-of-range', path, {
    message: 'A step is a year, so this is a whole number of years',
    details: { found: String(quantity), expected: 'such as `2 years`' },
  });
  return 1;
}
