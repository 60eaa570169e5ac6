import * as Type from 'typebox';
import { byNumber, classList, Name, orFile, quantity } from './values.ts';

const counted = { description: 'Classes that are counted, alike or with a weight each.', examples: ['[adult]'] };

export const Outcome = Type.Object(
  {
    of: Type.Union(
      [
        Type.Record(
          Type.String(),
          Type.Number({ minimum: 0, description: 'What one animal of the class counts.', examples: [0.5] }),
          { 'x-key': 'CLASS' },
        ),
        classList(counted),
      ],
      { title: 'a list of classes, `all`, or classes with weights', ...counted },
    ),
    in: Type.Optional(
      Type.Union([Name, Type.Array(Name, { minItems: 1, uniqueItems: true })], {
        title: 'a patch or a list of patches',
        description: 'Patches that are counted; without it, all.',
        examples: ['North fen'],
      }),
    ),
    counted: Type.Optional(
      Type.Union([Type.Literal('as a whole'), Type.Literal('in each patch'), Type.Literal('in any patch')], {
        description:
          'Whether the patches are added up, or the count of each of them is looked at by itself: true when it holds in each of them at the same time, or in at least one.',
        examples: ['in each patch'],
        default: 'as a whole',
      }),
    ),
    below: Type.Optional(
      Type.Number({
        exclusiveMinimum: 0,
        description:
          'True when fewer than this are counted. An outcome has one of `below`, `above`, `fallen-by`, `lacking`.',
        examples: [40],
        'x-unit': 'animals',
      }),
    ),
    above: Type.Optional(
      Type.Number({
        minimum: 0,
        description: 'True when more than this are counted.',
        examples: [200],
        'x-unit': 'animals',
      }),
    ),
    'fallen-by': Type.Optional(
      quantity('share', {
        description: 'True when the count has fallen by this share of that at the start, or more.',
        examples: ['50 %'],
      }),
    ),
    lacking: Type.Optional(
      Type.Literal('one sex', {
        description: 'True when of the classes counted nobody of one sex is there.',
        examples: ['one sex'],
      }),
    ),
    for: Type.Optional(
      quantity('time', {
        description: 'For how long it must hold, in a whole number of yearly counts one after the other.',
        examples: ['5 years'],
        default: '1 year',
      }),
    ),
  },
  {
    additionalProperties: false,
    title: 'an outcome: { of: …, below: … }, or `above`, `fallen-by`, `lacking` in the place of `below`',
  },
);

export const Outcomes = Type.Record(Type.String(), Outcome, {
  title: 'names with outcomes',
  description: 'What is looked for in every future, each under a name of its own.',
  examples: ['lost hares: { of: [adult], below: 40 }'],
  'x-key': 'OUTCOME',
});

const animals = { description: 'Animals at the start.', examples: [12], 'x-unit': 'animals' };

const StartTable = Type.Object(
  {
    table: orFile(
      Type.Record(Type.String(), byNumber(animals, 'CLASS'), {
        title: 'patches with animals by class',
        'x-key': 'PATCH',
      }),
      {
        title: 'patches with animals by class, or a CSV file with the columns patch and a class each',
        description: 'Animals of each class in each patch; what is not named is empty.',
        examples: ['North fen: { adult: 40, yearling: 22 }'],
      },
    ),
  },
  { additionalProperties: false },
);

const StartTotal = Type.Object(
  {
    total: Type.Number({
      minimum: 0,
      description: 'All animals together, spread over patches and classes.',
      examples: [420],
      'x-unit': 'animals',
    }),
    spread: Type.Optional(
      Type.Union([Type.Literal('stable within patch'), Type.Literal('stable over all')], {
        description:
          'Stable classes in each patch, the patches by capacity, else alike; or the stable spread of the whole landscape.',
        examples: ['stable within patch'],
        default: 'stable within patch',
      }),
    ),
  },
  { additionalProperties: false },
);

const StartCounted = Type.Object(
  {
    counted: orFile(byNumber({ ...animals, description: 'Animals counted in the patch.' }, 'PATCH'), {
      title: 'patches with a number each, or a CSV file with the columns patch, animals',
      description: 'Animals counted in each patch.',
      examples: ['counts-2026.csv'],
    }),
    of: classList({ description: 'Classes that the counts hold.', examples: ['[yearling, adult]'] }),
    rest: Type.Union([Type.Literal('stable within patch'), Type.Literal('none')], {
      description: 'The classes that were not counted: in stable proportion to the others, or none.',
      examples: ['stable within patch'],
    }),
  },
  { additionalProperties: false },
);

export const Start = Type.Union([StartTable, StartTotal, StartCounted], {
  title: 'a start: { table: … }, { total: … } or { counted: …, of: …, rest: … }',
  description: 'The animals at the first count.',
  examples: ['{ total: 420 }'],
});

export const Run = Type.Object(
  {
    replicates: Type.Optional(
      Type.Integer({
        minimum: 1,
        maximum: 100_000_000,
        description: 'How many futures are drawn.',
        examples: [2000],
        default: 1000,
      }),
    ),
    draws: Type.Optional(
      Type.Integer({
        minimum: 0,
        maximum: 100_000,
        description:
          'How often what is not known is drawn, each time with so many replicates. 0 takes the numbers as they are.',
        examples: [200],
        default: 0,
      }),
    ),
    precision: Type.Optional(
      Type.Number({
        exclusiveMinimum: 0,
        exclusiveMaximum: 0.5,
        description:
          'Goes on after the first replicates until the 95 % interval that comes from the number of runs reaches no further than this to either side, for every chance of every outcome.',
        examples: [0.01],
        'x-unit': 'share',
      }),
    ),
    rare: Type.Optional(
      Type.Boolean({
        description:
          'Estimates the chances of outcomes that are too rare for plain runs as well, by splitting futures that come near; each of 24 repeats takes so many replicates for each level.',
        examples: [true],
        default: false,
      }),
    ),
    'at-most': Type.Optional(
      Type.Integer({
        minimum: 1,
        maximum: 100_000_000,
        description:
          'Replicates, those of all draws together, after which a run ends that is not yet as precise as asked.',
        examples: [200000],
        default: 100_000,
      }),
    ),
    seed: Type.Optional(
      Type.Integer({
        minimum: 0,
        maximum: Number.MAX_SAFE_INTEGER,
        description: 'Decides all chance: the same seed gives the same futures.',
        examples: [2026],
        default: 1,
      }),
    ),
    scenario: Type.Optional(
      Type.String({
        ...Name,
        title: 'a scenario',
        description: 'The scenario that is run, by its name.',
        examples: ['hedge only'],
        default: 'as now',
      }),
    ),
  },
  {
    additionalProperties: false,
    description: 'How the model is run unless the command says otherwise.',
    examples: ['{ replicates: 2000, seed: 2026 }'],
  },
);
