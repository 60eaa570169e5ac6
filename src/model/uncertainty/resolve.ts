// Which parameters are not exactly known, how well each is, and what their errors have to do with one another.
import type { SpecPath } from '../../spec/document.ts';
import type { UncertainSpec } from '../../spec/schema/spec.ts';
import type { Uncertain, Uncertainty } from '../chance.ts';
import { fail, tellUnknown, type Context } from '../context.ts';
import { correlationTable } from '../variation/correlation.ts';
import { fromInterval, fromStandardError, type NumberKind, type UncertainDistribution } from './distribution.ts';

/** Null where everything is taken as known. */
export function resolveUncertainty(context: Context): Uncertainty | null {
  const parameters = Object.entries(context.spec.parameters ?? {})
    .flatMap(([name, parameter]) =>
      typeof parameter === 'object' && parameter.uncertainty !== undefined
        ? resolveOne(context, name, parameter.uncertainty)
        : [],
    )
    .sort((a, b) => (a.name < b.name ? -1 : a.name > b.name ? 1 : 0));
  const { correlations, draws } = context.spec.uncertainty ?? {};
  const table = draws === undefined ? null : resolveTable(context, draws, parameters);
  if (parameters.length === 0 && table === null) return null;
  const path = ['uncertainty', 'correlations'];
  const request = { path, what: 'uncertain parameter', names: parameters.map(({ name }) => name) };
  const correlation =
    correlations === undefined ? { of: 0, repaired: 0 } : correlationTable(context, correlations, request);
  return { parameters, correlation, table };
}

function resolveOne(context: Context, name: string, spec: UncertainSpec): readonly Uncertain[] {
  const path = ['parameters', name, 'uncertainty'];
  const value = context.numbers.value(name, ['parameters', name, 'value'], { year: context.time.firstYear });
  const use = { expression: name, path: ['parameters', name, 'value'], dimension: 'share' as const };
  if (context.numbers.behind(use).length > 1) {
    fail(context, 'impossible-uncertainty', path, {
      message: `\`${name}\` is made from other numbers`,
      part: 'key',
      details: { fix: 'Give the uncertainty to the numbers that it is made from.' },
    });
    return [];
  }
  if (Number.isNaN(value)) return [];
  const kind: NumberKind = spec.as ?? (value > 0 && value < 1 ? 'share' : value > 0 ? 'positive number' : 'number');
  const distribution = distributionIn(context, { spec, path, value, kind });
  if (distribution !== null) return [{ name, value, distribution }];
  if (!context.findings.some((one) => one.path.join('\0').startsWith(path.join('\0')))) {
    fail(context, 'impossible-uncertainty', path, {
      message: `No distribution of a ${kind} with the mean ${value} is so uncertain`,
      part: 'key',
      details: { fix: 'Make it smaller, say `as:` what kind of number it is, or use `uniform` or `triangular`.' },
    });
  }
  return [];
}

interface Asked {
  readonly spec: UncertainSpec;
  readonly path: SpecPath;
  readonly value: number;
  readonly kind: NumberKind;
}

function distributionIn(context: Context, { spec, path, value, kind }: Asked): UncertainDistribution | null {
  const given = (['standard-error', 'interval', 'uniform', 'triangular'] as const).filter(
    (key) => spec[key] !== undefined,
  );
  if (given.length !== 1) {
    fail(context, 'impossible-uncertainty', path, {
      message: 'One of `standard-error`, `interval`, `uniform` and `triangular` says how sure the number is',
      part: 'key',
      details: { found: given.length === 0 ? 'none of them' : given.join(' and ') },
    });
    return null;
  }
  const error = spec['standard-error'];
  if (error !== undefined) {
    const size = context.numbers.value(error, [...path, 'standard-error'], { year: context.time.firstYear });
    if (size >= 0) return fromStandardError({ value, kind }, size);
    if (size < 0) {
      fail(context, 'impossible-uncertainty', [...path, 'standard-error'], {
        message: 'A standard error is never below zero',
        details: { found: String(size) },
      });
    }
    return null;
  }
  const key = given[0] ?? 'interval';
  const ends = spec.interval ?? spec.uniform ?? spec.triangular ?? [];
  const [low = NaN, high = NaN] = ends.map((end, i) =>
    context.numbers.value(end, [...path, key, i], { year: context.time.firstYear }),
  );
  if (Number.isNaN(low) || Number.isNaN(high)) return null;
  if (!(low < high && (key === 'uniform' || (low <= value && value <= high)))) {
    fail(context, 'impossible-uncertainty', [...path, key], {
      message: `The ${key} of a number is its lower and its upper end, with the value between them`,
      details: {
        found: `${low} to ${high} around ${value}`,
        ...(value < 1 && low > 1 && high <= 100 ? { fix: `If percent was meant, write [${low} %, ${high} %].` } : {}),
      },
    });
    return null;
  }
  if (spec.interval !== undefined) return fromInterval({ value, kind }, [low, high]);
  return spec.uniform === undefined ? { shape: 'triangular', low, mode: value, high } : { shape: 'uniform', low, high };
}

type Row = Readonly<Record<string, number>>;

function resolveTable(context: Context, rows: readonly Row[], parameters: readonly Uncertain[]): Uncertainty['table'] {
  const known = Object.keys(context.spec.parameters ?? {});
  const [first] = parameters;
  if (first !== undefined) {
    fail(context, 'impossible-uncertainty', ['uncertainty', 'draws'], {
      message: `Draws of your own and the uncertainty of \`${first.name}\` exclude each other`,
      part: 'key',
      details: { fix: 'Remove one of the two.' },
    });
  }
  return rows.map((row, i) => {
    for (const name of Object.keys(row)) {
      if (known.includes(name)) continue;
      const path = ['uncertainty', 'draws', i, name];
      tellUnknown(context, { code: 'unknown-name', what: 'parameter', name, known, path, part: 'key' });
    }
    return row;
  });
}
