// The phases that every life cycle is made of: survival, breeding and ageing.
import type { Written } from './rates.ts';
import { buildTable } from './rates.ts';
import { classIndex, fail, patchIndex, type Context } from './context.ts';
import type { AgeingPhase, BreedingPhase, SurvivalPhase } from './model.ts';

/** Keys among the births that are not classes. */
const birthSettings = new Set(['female-share', 'into']);

export function resolveSurvival(context: Context): SurvivalPhase | null {
  const { spec, classes } = context;
  if (spec.survival === undefined) {
    missingRates(context, 'survival', '`survival: { CLASS: share, … }`');
    return null;
  }
  checkClassKeys(context, 'survival', new Set());
  const everyPatch = spec.survival;
  classes.forEach((name) => {
    if (everyPatch[name] === undefined) tellMissingRate(context, name);
  });
  const survival = buildTable(context, {
    size: classes.length,
    bounds: 'share',
    written: (patch, c) => written(context, { section: 'survival', patch, c }),
  });
  return { kind: 'survival', name: 'survival', survival };
}

export function resolveBreeding(context: Context): BreedingPhase | null {
  const { spec, classes } = context;
  if (spec.births === undefined) {
    missingRates(context, 'breeding', '`births: { CLASS: young, … }`');
    return null;
  }
  checkClassKeys(context, 'births', birthSettings);
  const share = femaleShare(context);
  const births = buildTable(context, {
    size: classes.length,
    bounds: 'from zero',
    written: (patch, c) => written(context, { section: 'births', patch, c }),
  });
  const epochs = births.epochs.map((table) => table.map((young) => young * share));
  return { kind: 'breeding', name: 'breeding', births: { ...births, epochs }, into: intoClasses(context) };
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

interface RateKey {
  readonly section: 'survival' | 'births';
  readonly patch: number;
  readonly c: number;
}

/** A patch's own number where it has one, else the number of every patch. */
function written(context: Context, { section, patch, c }: RateKey): Written | null {
  const name = context.classes[c] ?? '';
  const what = section === 'survival' ? `survival of ${name}` : `births of ${name}`;
  const patchName = context.patches[patch]?.name ?? '';
  const own = context.spec.in?.[patchName]?.[section]?.[name];
  if (own !== undefined) return { expression: own, path: ['in', patchName, section, name], what };
  const general = context.spec[section]?.[name];
  if (general === undefined || typeof general === 'object') return null;
  return { expression: general, path: [section, name], what };
}

function femaleShare(context: Context): number {
  const expression = context.spec.births?.['female-share'];
  if (expression === undefined || typeof expression === 'object') return 1;
  const path = ['births', 'female-share'];
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
function intoClasses(context: Context): Float64Array {
  const into = new Float64Array(context.classes.length);
  const asked = context.spec.births?.into;
  if (typeof asked === 'string') {
    const index = classIndex(context, asked, ['births', 'into'], 'value');
    if (index >= 0) into[index] = 1;
    return into;
  }
  into[0] = 1;
  context.defaults.push(`The young are born into the first class, ${context.classes[0]}.`);
  return into;
}

/** Every key of a section, in every patch, must be a class. */
function checkClassKeys(context: Context, section: 'survival' | 'births', settings: ReadonlySet<string>): void {
  for (const name of Object.keys(context.spec[section] ?? {})) {
    if (!settings.has(name)) classIndex(context, name, [section, name]);
  }
  for (const [patch, own] of Object.entries(context.spec.in ?? {})) {
    if (own[section] === undefined || patchIndex(context, patch, ['in', patch]) < 0) continue;
    for (const name of Object.keys(own[section])) classIndex(context, name, ['in', patch, section, name]);
  }
}

function tellMissingRate(context: Context, name: string): void {
  fail(context, 'missing-rate', ['survival'], {
    message: `The class \`${name}\` has no survival`,
    part: 'key',
    details: { expected: 'a share for every class', fix: `Add \`${name}: …\` (0 where none survive).` },
  });
}

/** Tells that a phase of the year has no rates. */
export function missingRates(context: Context, phase: string, expected: string): void {
  fail(context, 'missing-rates', ['year', context.spec.year.indexOf(phase)], {
    message: `The phase \`${phase}\` is in the year, but its rates are not given`,
    details: { expected },
  });
}
