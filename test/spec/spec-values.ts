// Arbitrary specs, with the names that are hardest on a text, for property tests.
import fc from 'fast-check';
import type { Spec } from '../../src/spec/schema/spec.ts';

const hard = [
  '007',
  '1e3',
  'no',
  'true',
  '~',
  '+80',
  '1_000',
  '.inf',
  'North #2',
  'a: b',
  '- x',
  '? q',
  '"',
  "it's",
  '\\',
];
hard.push(
  'a, b',
  '[x]',
  '{y}',
  '&a',
  '*a',
  '!t',
  '%d',
  '@',
  '`',
  '|',
  '>',
  'Große Heide',
  '北沼',
  '🐇',
  '{ a: 1 }',
  '<<',
  'min(1',
);

const anyName = fc.oneof(
  fc.constantFrom(...hard),
  fc
    .string({ minLength: 1, maxLength: 12, unit: 'grapheme' })
    .filter((text) => /^(?!__proto__)(?!\s)[^\p{C}\p{Zl}\p{Zp}]*(?<!\s)$/u.test(text)),
);
const anyIdentifier = fc.constantFrom('litter', 'adult_survival', 'größe', '_x', 'n1');
const anyText = fc.oneof(
  anyName,
  fc.constantFrom(' x ', 'line\nline', 'tab\t', 'a  b', 'end:', '# no', '\u0085', '\uFEFF'),
);
const anyNumber = fc.double({ noNaN: true, noDefaultInfinity: true });
const anyPositive = fc.double({ noNaN: true, min: 1e-9, max: 1e12 });
const anyExpression = fc.oneof(
  anyNumber,
  fc.constantFrom('litter * 2', 'min(litter, 0.5)', '-x^2', '3 %', 'if year > 3 then 1 else x'),
);
const anyClasses = fc.oneof(fc.constant('all' as const), fc.uniqueArray(anyName, { minLength: 1, maxLength: 3 }));

function record<T>(key: fc.Arbitrary<string>, value: fc.Arbitrary<T>): fc.Arbitrary<Record<string, T>> {
  return fc.dictionary(key, value, { maxKeys: 4 });
}

const optional = { requiredKeys: [] as [] };

const anyDispersal = fc.record({
  kind: fc.constant('dispersal' as const),
  classes: anyClasses,
  leaving: fc.oneof(anyExpression, record(anyName, anyExpression)),
  kernel: fc.record({
    shape: fc.constantFrom('exponential' as const, '2Dt' as const),
    mean: fc.constantFrom('4 km', 4, 'litter m'),
  }),
  links: fc.array(fc.record({ between: fc.tuple(anyName, anyName), 'turn-back': anyExpression }), {
    minLength: 1,
    maxLength: 2,
  }),
  attraction: anyExpression,
  shares: record(anyName, record(anyName, anyExpression)),
});

const anyCeiling = fc.record({
  kind: fc.constant('ceiling' as const),
  counted: anyClasses,
  capacity: anyExpression,
  takes: fc.constant('at random' as const),
});

const anySurvival = fc.record({ kind: fc.constant('survival' as const), survival: record(anyName, anyExpression) });

const anyStart = fc.oneof(
  fc.record({ total: anyPositive }),
  fc.record({ table: record(anyName, record(anyName, anyPositive)) }),
  fc.record({ counted: record(anyName, anyPositive), of: anyClasses, rest: fc.constant('none' as const) }),
);

const anyPlace = fc.tuple(anyNumber, anyNumber);
const anyOutline = fc.array(fc.array(fc.array(anyPlace, { maxLength: 4 }), { maxLength: 2 }), {
  minLength: 1,
  maxLength: 2,
});

const anyPatch = fc.record(
  { name: anyName, at: anyPlace, outline: anyOutline, area: fc.constantFrom('140 ha', 3), capacity: anyPositive },
  { requiredKeys: ['name'] },
);

const anyOutcome = fc.record(
  {
    of: anyClasses,
    in: fc.oneof(anyName, fc.uniqueArray(anyName, { minLength: 1, maxLength: 3 })),
    below: anyPositive,
  },
  { requiredKeys: ['of', 'below'] },
);

const core = {
  skein: fc.constant(1 as const),
  study: fc.record({ title: anyText, question: anyText, invented: fc.boolean() }, { requiredKeys: ['title'] }),
  'first-year': fc.integer(),
  years: fc.integer({ min: 1, max: 100_000 }),
  patches: fc.array(anyPatch, { minLength: 1, maxLength: 4 }),
  counts: fc.constantFrom('females', 'both sexes'),
  classes: fc.uniqueArray(anyName, { minLength: 1, maxLength: 4 }),
  parameters: record(
    anyIdentifier,
    fc.oneof(anyExpression, fc.record({ value: anyExpression, source: fc.record({ text: anyText }, optional) })),
  ),
  survival: record(anyName, anyExpression),
  demography: fc.record({
    survival: fc.array(anyExpression, { minLength: 1, maxLength: 3 }),
    fecundity: fc.array(anyExpression, { minLength: 1, maxLength: 3 }),
  }),
  in: record(anyName, fc.record({ survival: record(anyName, anyExpression) }, optional)),
  year: fc.array(anyName, { minLength: 1, maxLength: 5 }),
  start: anyStart,
  outcomes: record(anyName, anyOutcome),
  run: fc.record({ replicates: fc.integer({ min: 1, max: 1000 }), seed: fc.maxSafeNat() }, optional),
};

const coreKeys = new Set([...Object.keys(core), 'step', 'position', 'unit', 'oldest', 'births', 'crowding', 'named']);
const anySectionName = anyName.filter((name) => !coreKeys.has(name));

/** Specs that are right in shape; whether their names fit together is not their concern. */
export const anySpec: fc.Arbitrary<Spec> = fc.record(
  { ...core, named: record(anySectionName, fc.oneof(anyDispersal, anyCeiling, anySurvival)) },
  { requiredKeys: ['skein', 'study', 'years', 'patches', 'counts', 'classes', 'year', 'start', 'named'] },
);
