// Breeding: how many young, how they vary, which class they enter, and who must find whom.
import type { SpecPath } from '../spec/document.ts';
import type { BreedingSpec } from '../spec/schema/spec.ts';
import type { BirthSections } from './birth-sections.ts';
import { checkClassKeys, ownRatesAnywhere, writtenRate, type RateSection } from './class-rates.ts';
import { classIndex, fail, type Context } from './context.ts';
import { missingRates } from './life-phases.ts';
import { resolveMating } from './mating.ts';
import type { BreedingPhase, Offspring, RateTable } from './model.ts';
import { checkLitters, meanOfTable, resolveOffspring } from './offspring.ts';
import { buildTable } from './rates.ts';

/** Keys among the births that are not classes. */
const birthSettings: ReadonlySet<string> = new Set(['female-share', 'into']);

/** The phase `breeding` of the language. */
export function resolveBreeding(context: Context): BreedingPhase | null {
  const { offspring, mating } = context.spec;
  const births = context.spec.births ?? (ownRatesAnywhere(context, 'births') ? {} : undefined);
  if (births === undefined) return missingRates(context, 'breeding', '`births: { CLASS: young, … }`');
  return breedingPhase(context, {
    name: 'breeding',
    births,
    offspring,
    mating,
    birthsPath: ['births'],
    path: [],
    key: 'births',
  });
}

/** A breeding under a name of its own. */
export function resolveNamedBreeding(context: Context, name: string, spec: BreedingSpec): BreedingPhase {
  const { births, offspring, mating } = spec;
  return breedingPhase(context, {
    name,
    births,
    offspring,
    mating,
    birthsPath: [name, 'births'],
    path: [name],
    key: name,
  });
}

function breedingPhase(context: Context, sections: BirthSections): BreedingPhase {
  const { name, births, birthsPath, key } = sections;
  const what = name === 'breeding' ? 'births' : `births in ${name}`;
  const section: RateSection = { everywhere: births, path: birthsPath, key, what, settings: birthSettings };
  checkClassKeys(context, section);
  const offspring = resolveOffspring(context, sections);
  const share = femaleShare(context, births['female-share'], [...birthsPath, 'female-share']);
  const written = buildTable(context, {
    size: context.classes.length,
    bounds: 'from zero',
    written: (patch, c) => writtenRate(context, section, [patch, c]),
  });
  const table = withTableMeans(context, written, offspring);
  checkLitters(context, sections, { offspring, table });
  const mating = resolveMating(context, sections, table);
  return {
    kind: 'breeding',
    name,
    births: context.sexes === null ? scaledBy(table, share ?? 1) : table,
    into: context.sexes === null ? intoClasses(context, births['into'], birthsPath) : bySex(context, sections, share),
    ...(offspring === null ? {} : { offspring }),
    ...(mating === null ? {} : { mating }),
  };
}

function scaledBy(table: RateTable, share: number): RateTable {
  return { ...table, epochs: table.epochs.map((epoch) => epoch.map((young) => young * share)) };
}

/** A table of chances says itself how many young a class has. */
function withTableMeans({ classes }: Context, table: RateTable, offspring: Offspring | null): RateTable {
  if (offspring?.by !== 'table') return table;
  const means = offspring.chances.map(meanOfTable);
  return { ...table, epochs: table.epochs.map((epoch) => epoch.map((_, i) => means[i % classes.length] ?? 0)) };
}

type BirthValue = BreedingSpec['births'][string] | undefined;

/** Null where it is not given. */
function femaleShare(context: Context, expression: BirthValue, path: SpecPath): number | null {
  if (expression === undefined || typeof expression === 'object') return null;
  const value = context.numbers.value(expression, path, { year: context.time.firstYear });
  if (value >= 0 && value <= 1) return value;
  if (!Number.isNaN(value)) {
    fail(context, 'share-out-of-range', path, {
      message: `The female share of the young is ${value}`,
      details: { expected: 'a share between 0 and 1' },
    });
  }
  return 1;
}

/** Young enter the class that `into` names, else the first. */
function intoClasses(context: Context, asked: BirthValue, path: SpecPath): Float64Array {
  const into = new Float64Array(context.classes.length);
  if (typeof asked === 'string') {
    const index = classIndex(context, asked, [...path, 'into'], 'value');
    if (index >= 0) into[index] = 1;
    return into;
  }
  into[0] = 1;
  const words = `The young are born into the first class, ${context.classes[0]}.`;
  if (!context.defaults.includes(words)) context.defaults.push(words);
  return into;
}

/** Of both sexes, the young enter the first class of theirs. */
function bySex(context: Context, { births, birthsPath }: BirthSections, share: number | null): Float64Array {
  if (share === null) {
    fail(context, 'sexes-shape', birthsPath, {
      message: 'Births do not say how many of the young are females',
      part: 'key',
      details: {
        expected: 'such as `female-share: 0.5`',
        reason: 'Births are young of both sexes for each female here.',
      },
    });
  }
  if (births['into'] !== undefined) {
    fail(context, 'sexes-shape', [...birthsPath, 'into'], {
      message: 'Where both sexes are followed the young enter the first class of their sex',
      part: 'key',
      details: { fix: 'Remove `into`.' },
    });
  }
  const into = new Float64Array(context.classes.length);
  into[0] = share ?? 1;
  into[context.sexes?.indexOf('male') ?? 0] = 1 - (share ?? 1);
  return into;
}
