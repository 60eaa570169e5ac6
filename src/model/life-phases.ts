// The phases that every life cycle is made of: survival, breeding and ageing. The first two may stand in a year several times.
import type { SpecPath } from '../spec/document.ts';
import type { BreedingSpec, SurvivalSpec } from '../spec/schema/spec.ts';
import { checkClassKeys, requireEveryClass, writtenRate, type RateSection } from './class-rates.ts';
import { classIndex, fail, type Context } from './context.ts';
import type { AgeingPhase, BreedingPhase, RateTable, SurvivalPhase } from './model.ts';
import { buildTable } from './rates.ts';

/** Keys among the births that are not classes. */
const birthSettings: ReadonlySet<string> = new Set(['female-share', 'into']);

/** The phase `survival` of the language. */
export function resolveSurvival(context: Context): SurvivalPhase | null {
  const { survival } = context.spec;
  if (survival === undefined) return missingRates(context, 'survival', '`survival: { CLASS: share, … }`');
  return survivalPhase(context, 'survival', {
    everywhere: survival,
    path: ['survival'],
    key: 'survival',
    what: 'survival',
    settings: new Set(),
  });
}

/** A survival under a name of its own. */
export function resolveNamedSurvival(context: Context, name: string, { survival }: SurvivalSpec): SurvivalPhase {
  const what = `survival in ${name}`;
  return survivalPhase(context, name, {
    everywhere: survival,
    path: [name, 'survival'],
    key: name,
    what,
    settings: new Set(),
  });
}

function survivalPhase(context: Context, name: string, section: RateSection): SurvivalPhase {
  checkClassKeys(context, section);
  requireEveryClass(context, section);
  const survival = buildTable(context, {
    size: context.classes.length,
    bounds: 'share',
    written: (patch, c) => writtenRate(context, section, [patch, c]),
  });
  return { kind: 'survival', name, survival };
}

/** The phase `breeding` of the language. */
export function resolveBreeding(context: Context): BreedingPhase | null {
  const { births } = context.spec;
  if (births === undefined) return missingRates(context, 'breeding', '`births: { CLASS: young, … }`');
  return breedingPhase(context, 'breeding', { births, path: ['births'], key: 'births' });
}

/** A breeding under a name of its own. */
export function resolveNamedBreeding(context: Context, name: string, { births }: BreedingSpec): BreedingPhase {
  return breedingPhase(context, name, { births, path: [name, 'births'], key: name });
}

interface BirthSection {
  readonly births: BreedingSpec['births'];
  readonly path: SpecPath;
  readonly key: string;
}

function breedingPhase(context: Context, name: string, { births, path, key }: BirthSection): BreedingPhase {
  const what = name === 'breeding' ? 'births' : `births in ${name}`;
  const section: RateSection = { everywhere: births, path, key, what, settings: birthSettings };
  checkClassKeys(context, section);
  const share = femaleShare(context, births['female-share'], [...path, 'female-share']);
  const table = buildTable(context, {
    size: context.classes.length,
    bounds: 'from zero',
    written: (patch, c) => writtenRate(context, section, [patch, c]),
  });
  return { kind: 'breeding', name, births: scaledBy(table, share), into: intoClasses(context, births['into'], path) };
}

function scaledBy(table: RateTable, share: number): RateTable {
  return { ...table, epochs: table.epochs.map((epoch) => epoch.map((young) => young * share)) };
}

export function resolveAgeing(context: Context): AgeingPhase | null {
  const { spec, classes } = context;
  if (spec.oldest === undefined) {
    fail(context, 'missing-oldest', ['year', spec.year.indexOf('ageing')], {
      message: `It is not said whether \`${classes.at(-1)}\` stays in its class or leaves at ageing`,
      details: { expected: '`oldest: open-ended` (the oldest stay) or `oldest: terminal` (the oldest leave)' },
    });
    return null;
  }
  const last = classes.length - 1;
  const next = Int32Array.from(classes, (_, c) => (c < last ? c + 1 : spec.oldest === 'terminal' ? -1 : last));
  return { kind: 'ageing', name: 'ageing', advance: new Float64Array(classes.length).fill(1), next };
}

type BirthValue = BreedingSpec['births'][string] | undefined;

function femaleShare(context: Context, expression: BirthValue, path: SpecPath): number {
  if (expression === undefined || typeof expression === 'object') return 1;
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

/** Tells that a phase of the year has no rates. */
export function missingRates(context: Context, phase: string, expected: string): null {
  fail(context, 'missing-rates', ['year', context.spec.year.indexOf(phase)], {
    message: `The phase \`${phase}\` is in the year, but its rates are not given`,
    details: { expected },
  });
  return null;
}
