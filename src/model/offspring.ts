// How the young of one animal vary with chance: the distribution, and whether the births fit into it.
import type { SpecPath } from '../spec/document.ts';
import type { BreedingSpec } from '../spec/schema/spec.ts';
import type { BirthSections } from './birth-sections.ts';
import { classIndex, fail, type Context } from './context.ts';
import type { Offspring, RateTable } from './model.ts';
import { withinBounds } from './rates.ts';

type OffspringSpec = NonNullable<BreedingSpec['offspring']>;

/** The key that a distribution needs besides its name. */
const needs = {
  poisson: null,
  bernoulli: null,
  binomial: 'largest-litter',
  'negative binomial': 'size',
  'table of chances': 'chances',
} as const;

/** Null for Poisson, and after telling what is wrong. */
export function resolveOffspring(context: Context, sections: BirthSections): Offspring | null {
  const { offspring } = sections;
  const path = [...sections.path, 'offspring'];
  if (offspring === undefined || !hasItsKeys(context, offspring, path)) return null;
  switch (offspring.distribution) {
    case 'poisson':
      return null;
    case 'bernoulli':
      return { by: 'binomial', largest: 1 };
    case 'binomial':
      return { by: 'binomial', largest: offspring['largest-litter'] ?? 1 };
    case 'negative binomial':
      return sizeOf(context, offspring, [...path, 'size']);
    case 'table of chances':
      return tableOf(context, sections, offspring.chances ?? {});
  }
}

function hasItsKeys(context: Context, offspring: OffspringSpec, path: SpecPath): boolean {
  const needed = needs[offspring.distribution];
  let right = true;
  for (const key of ['largest-litter', 'size', 'chances'] as const) {
    if ((key === needed) === (offspring[key] !== undefined)) continue;
    right = false;
    const missing = key === needed;
    fail(context, 'offspring-shape', missing ? [...path, 'distribution'] : [...path, key], {
      message: `The distribution \`${offspring.distribution}\` ${missing ? 'needs' : 'has no'} \`${key}\``,
      ...(missing ? {} : { part: 'key' as const }),
      details: missing ? { fix: `Add \`${key}\`.` } : { fix: 'Remove it, or take another distribution.' },
    });
  }
  return right;
}

function sizeOf(context: Context, offspring: OffspringSpec, path: SpecPath): Offspring | null {
  const size = context.numbers.value(offspring.size ?? 1, path, { year: context.time.firstYear });
  if (size > 0) return { by: 'negative binomial', size };
  if (!Number.isNaN(size)) {
    const message = `The size of the negative binomial is ${size}`;
    fail(context, 'out-of-range', path, { message, details: { expected: 'a number above zero' } });
  }
  return null;
}

function tableOf(context: Context, sections: BirthSections, table: NonNullable<OffspringSpec['chances']>): Offspring {
  const chances: (Float64Array | null)[] = context.classes.map(() => null);
  for (const [name, list] of Object.entries(table)) {
    const path = [...sections.path, 'offspring', 'chances', name];
    const c = classIndex(context, name, path);
    if (c < 0) continue;
    const own = Float64Array.from(list, (expression, k) => {
      const value = context.numbers.value(expression, [...path, k], { year: context.time.firstYear });
      const told = { expression, path: [...path, k], what: `chance of ${k} young` };
      withinBounds(context, told, { value, bounds: 'share', patch: undefined });
      return value;
    });
    const sum = own.reduce((total, chance) => total + chance, 0);
    if (Math.abs(sum - 1) > 1e-9) {
      fail(context, 'offspring-shape', path, {
        message: `The chances of ${name} add up to ${Number(sum.toFixed(6))}`,
        part: 'key',
        details: { expected: '1, from no young to the largest litter' },
      });
    }
    chances[c] = own;
  }
  return { by: 'table', chances };
}

/** Σ k · chance of k. */
export function meanOfTable(chances: Float64Array | null): number {
  return chances?.reduce((sum, chance, k) => sum + k * chance, 0) ?? 0;
}

interface Litters {
  readonly offspring: Offspring | null;
  /** Young of both sexes, or of the counted one. */
  readonly table: RateTable;
}

/** Births that a distribution cannot have. */
export function checkLitters(context: Context, sections: BirthSections, { offspring, table }: Litters): void {
  if (offspring?.by === 'table') refuseBirths(context, sections, offspring.chances);
  if (offspring?.by !== 'binomial') return;
  const { largest } = offspring;
  const n = context.classes.length;
  const i = table.epochs.flatMap((epoch) => [...epoch.keys()].filter((at) => (epoch[at] ?? 0) > largest))[0];
  if (i === undefined) return;
  const most = Math.max(...table.epochs.map((epoch) => epoch[i] ?? 0));
  fail(context, 'offspring-shape', sections.birthsPath, {
    message: `Births of ${context.classes[i % n]} in ${context.patches[Math.floor(i / n)]?.name ?? ''} are ${most}, more than the largest litter of ${largest}`,
    part: 'key',
    details: { expected: `at most ${largest}` },
  });
}

/** Under a table of chances, births hold `female-share` and `into` only. */
function refuseBirths(context: Context, sections: BirthSections, chances: readonly (Float64Array | null)[]): void {
  const { births, birthsPath, key } = sections;
  const places = [
    ...context.classes.map((name) => ({ given: births[name], path: [...birthsPath, name] })),
    ...Object.entries(context.spec.in ?? {}).flatMap(([patch, own]) =>
      Object.entries(own).flatMap(([name, given]) => (name === key ? [{ given, path: ['in', patch, name] }] : [])),
    ),
  ];
  for (const { given, path } of places) {
    if (given === undefined) continue;
    fail(context, 'offspring-shape', path, {
      message: 'A table of chances already says how many young there are',
      part: 'key',
      details: { fix: 'Remove these births, or take another distribution.' },
    });
  }
  if (chances.some((one) => one !== null)) return;
  fail(context, 'offspring-shape', [...sections.path, 'offspring', 'chances'], {
    message: 'The table of chances has no class',
    part: 'key',
    details: { expected: 'such as `{ adult: [0.3, 0.5, 0.2] }`' },
  });
}
