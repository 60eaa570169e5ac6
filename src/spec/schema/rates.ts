import * as Type from 'typebox';
import { Mating, Offspring } from './breeding.ts';
import { byClass, classList, expression, Name, orFile, timed } from './values.ts';

const young = 'Young of the counted sex for each animal of the class that is present in the phase `breeding`.';

export const Survival = byClass({
  description: 'Share of each class that survives the phase `survival`.',
  examples: [0.62],
  'x-unit': 'share',
});

const FemaleShare = expression({
  description:
    'Share of females among the young, where births are given for both sexes. Without it births are of the counted sex.',
  examples: [0.5],
  'x-unit': 'share',
});

const Into = Type.String({
  ...Name,
  title: 'a class',
  'x-classes': true,
  description: 'Class that the young enter; without it, the first class.',
  examples: ['newborn'],
});

const birthsWords = { description: young, examples: ['0.4 * litter'], 'x-unit': 'animals' };

/** Class names to young per animal, and besides them `female-share` and `into`. */
export const Births = Type.Record(Type.String(), Type.Union([expression(birthsWords), classList(birthsWords)]), {
  title: 'classes with their young',
  description: young,
  examples: ['{ yearling: 0.4 * litter, adult: litter, female-share: 0.5 }'],
  'x-key': 'CLASS',
  'x-keys': { 'female-share': FemaleShare, into: Into },
  'x-others': timed(birthsWords),
});

/** A survival and a breeding under names of their own, beside or instead of the plain ones. */
export const NamedSurvival = Type.Object(
  {
    kind: Type.Literal('survival', { description: 'Animals live on or die.', examples: ['survival'] }),
    survival: byClass({
      description: 'Share of each class that survives this phase.',
      examples: [0.9],
      'x-unit': 'share',
    }),
  },
  {
    additionalProperties: false,
    title: 'a survival',
    description: 'Survival of a season, under a name of its own; the shares of several such phases multiply.',
  },
);

export const NamedBreeding = Type.Object(
  {
    kind: Type.Literal('breeding', { description: 'Animals have young.', examples: ['breeding'] }),
    births: Births,
    offspring: Type.Optional(Offspring),
    mating: Type.Optional(Mating),
  },
  { additionalProperties: false, title: 'a breeding', description: 'Births of a season, under a name of its own.' },
);

const Row = Type.Array(expression({ description: 'An entry.', examples: [0.3] }), {
  minItems: 1,
  title: 'a row of numbers',
});

function square(description: string, example: string) {
  return orFile(Type.Array(Row, { minItems: 1, title: 'a list of rows' }), {
    title: 'a list of rows, or a CSV file with the classes in its first line and column',
    description,
    examples: [example],
  });
}

export const EntryDemography = Type.Object(
  {
    fates: Type.Optional(
      square('Share of the animals of a class (column) that is in a class (row) a year later.', '[[0, 0], [0.3, 0.8]]'),
    ),
    births: Type.Optional(
      square('Young in a class (row) a year later for each animal of a class (column).', '[[0, 1.2], [0, 0]]'),
    ),
  },
  { additionalProperties: false },
);

export const LeslieDemography = Type.Object(
  {
    survival: Type.Array(expression({ description: 'A share.', examples: [0.3] }), {
      minItems: 1,
      description:
        'Share of each class that is in the next a year later; the last entry is for staying in the oldest class.',
      examples: ['[0.3, 0.8]'],
    }),
    fecundity: Type.Array(expression({ description: 'Young.', examples: [1.2] }), {
      minItems: 1,
      description: 'First row of the matrix: newborns a year later for each animal of a class.',
      examples: ['[0, 1.2]'],
    }),
  },
  { additionalProperties: false },
);

/** A published matrix whose entries hold a whole year. Columns are from, rows are to. */
export const Demography = Type.Union([EntryDemography, LeslieDemography], {
  title: 'a matrix: { fates: …, births: … } or { survival: …, fecundity: … }',
  description:
    'A published matrix whose entries hold a whole year; columns are from, rows are to. The phase `demography` then stands in the year.',
  examples: ['{ survival: [0.3, 0.8], fecundity: [0, 1.2] }'],
});

const OwnPhaseRates = byClass({
  description: 'By class what is different here in a phase of your own: survival, young, or the share that leaves.',
  examples: [0.8],
});

/** What is different in one patch. */
export const PatchRates = Type.Object(
  {
    survival: Type.Optional(Survival),
    births: Type.Optional(byClass(birthsWords)),
    demography: Type.Optional(Demography),
  },
  { additionalProperties: OwnPhaseRates, title: 'rates of one patch', 'x-key': 'PHASE', 'x-brief': true },
);

export const InPatches = Type.Record(Type.String(), PatchRates, {
  title: 'patches with their own rates',
  description:
    'Rates that are different in one patch; what is not written here (of a matrix all fates, or all births) is as everywhere.',
  examples: ['Saltmarsh: { survival: { adult: adult_survival * 0.9 } }'],
  'x-key': 'PATCH',
});
