// Yearly numbers from outside the model, such as rain: each year of the model has one of the years that are given, by the
// calendar or by chance.
import type { Finding } from '../spec/finding.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { readYear } from './calendar.ts';
import { fail } from './context.ts';
import type { Resampled } from './chance.ts';
import type { Drivers } from './numbers.ts';

interface Span {
  readonly firstYear: number;
  readonly steps: number;
}

type Given = readonly (readonly [name: string, values: ReadonlyMap<number, number>])[];

export function resolveDrivers(spec: Spec, span: Span, findings: Finding[]): Drivers {
  const { drivers } = spec;
  const none = { dated: new Map(), resampled: null };
  if (drivers === undefined) return none;
  const given = Object.entries(drivers.values).map(([name, byYear]): Given[number] => {
    const path = ['drivers', 'values', name];
    const years = Object.entries(byYear).map(([year, value]): [number, number] => [
      readYear({ findings }, year, [...path, year]),
      value,
    ]);
    return [name, new Map(years.filter(([year]) => !Number.isNaN(year)).sort(([a], [b]) => a - b))];
  });
  if (drivers.future === 'resample-years') return { ...none, resampled: resampledFrom(given, findings) };
  const dated = given.map(([name, values]): [string, (year: number) => number] => {
    if (drivers.future === 'repeat') return [name, repeating([...values], span.firstYear)];
    tellMissing(name, { values, ...span, findings });
    // Where one is missing that was told; any number will do, so that nothing else is told of it.
    const [any = 0] = values.values();
    return [name, (year: number) => values.get(year) ?? any];
  });
  return { dated: new Map(dated), resampled: null };
}

/** Null where nothing is given; years that one driver has must be there for all. */
function resampledFrom(given: Given, findings: Finding[]): Resampled | null {
  const years = [...new Set(given.flatMap(([, values]) => [...values.keys()]))].sort((a, b) => a - b);
  for (const [name, values] of given) {
    const missing = years.filter((year) => !values.has(year));
    if (missing.length > 0) tellNoValue(name, missing, { findings, ...wholeYears });
  }
  if (years.length === 0) return null;
  const sorted = [...given].sort(([a], [b]) => (a < b ? -1 : 1));
  const values = sorted.flatMap(([, own]) => years.map((year) => own.get(year) ?? 0));
  return { names: sorted.map(([name]) => name), years, values: Float64Array.from(values) };
}

const wholeYears = {
  expected: 'a value of every driver for each year that one of them has, since whole years are drawn',
  fix: 'Add them, or leave these years out of the other drivers.',
};

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
  tellNoValue(name, years, {
    findings,
    expected: `a value for each year from ${String(firstYear)} to ${String(firstYear + steps - 1)}`,
    fix: 'Add them, shorten `years`, or write `future: repeat` or `future: resample-years`.',
  });
}

interface Told {
  readonly findings: Finding[];
  readonly expected: string;
  readonly fix: string;
}

function tellNoValue(name: string, years: readonly number[], { findings, expected, fix }: Told): void {
  const [first] = years;
  if (first === undefined) return;
  const more = years.length > 1 ? ` and ${String(years.length - 1)} more ${years.length > 2 ? 'years' : 'year'}` : '';
  fail({ findings }, 'driver-years', ['drivers', 'values', name], {
    message: `\`${name}\` has no value for ${String(first)}${more}`,
    part: 'key',
    details: { expected, fix },
  });
}
