// Yearly numbers from outside the model, such as rain: each year of the model has one of the years that are given.
import type { Finding } from '../spec/finding.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { readYear } from './calendar.ts';
import { fail } from './context.ts';
import type { DriverValues } from './numbers.ts';

interface Span {
  readonly firstYear: number;
  readonly steps: number;
}

export function resolveDrivers(spec: Spec, { firstYear, steps }: Span, findings: Finding[]): DriverValues {
  const { drivers } = spec;
  if (drivers === undefined) return new Map();
  return new Map(
    Object.entries(drivers.values).map(([name, byYear]) => {
      const path = ['drivers', 'values', name];
      const values = new Map(
        Object.entries(byYear).map(([year, value]) => [readYear({ findings }, year, [...path, year]), value]),
      );
      const known = [...values].filter(([year]) => !Number.isNaN(year)).sort(([a], [b]) => a - b);
      if (drivers.future === 'repeat') return [name, repeating(known, firstYear)];
      tellMissing(name, { values, firstYear, steps, findings });
      // Where one is missing that was told; any number will do, so that nothing else is told of it.
      return [name, (year: number) => values.get(year) ?? known[0]?.[1] ?? 0];
    }),
  );
}

/** The first year of the model has the first value, and after the last it begins anew. */
function repeating(known: readonly (readonly [number, number])[], firstYear: number): (year: number) => number {
  return (year) => {
    const at = (year - firstYear) % known.length;
    return known[at < 0 ? at + known.length : at]?.[1] ?? NaN;
  };
}

interface Missing extends Span {
  readonly values: ReadonlyMap<number, number>;
  readonly findings: Finding[];
}

function tellMissing(name: string, { values, firstYear, steps, findings }: Missing): void {
  const years = Array.from({ length: steps }, (_, t) => firstYear + t).filter((year) => !values.has(year));
  const [first] = years;
  if (first === undefined) return;
  const more = years.length > 1 ? ` and ${String(years.length - 1)} more ${years.length > 2 ? 'years' : 'year'}` : '';
  fail({ findings }, 'driver-years', ['drivers', 'values', name], {
    message: `\`${name}\` has no value for ${String(first)}${more}`,
    part: 'key',
    details: {
      expected: `a value for each year from ${String(firstYear)} to ${String(firstYear + steps - 1)}`,
      fix: 'Add them, shorten `years`, or write `future: repeat`.',
    },
  });
}
