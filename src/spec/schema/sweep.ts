// Sweeps: the same model at very many points.
import * as Type from 'typebox';
import { orFile } from './values.ts';

const steps = Type.Optional(
  Type.Integer({
    minimum: 2,
    maximum: 1_000_000,
    description: 'How many values a grid, or one at a time, takes of it, both ends among them.',
    examples: [21],
    default: 11,
  }),
);

const FromTo = Type.Object(
  {
    from: Type.Number({ description: 'The least value, in the base unit of the number.', examples: [0.45] }),
    to: Type.Number({ description: 'The greatest value.', examples: [0.7] }),
    steps,
    scale: Type.Optional(
      Type.Union([Type.Literal('even'), Type.Literal('ratio')], {
        description: 'Values lie at even distances, or each is the same multiple of the one before.',
        examples: ['ratio'],
        default: 'even',
      }),
    ),
  },
  { additionalProperties: false, title: 'a range: { from: …, to: … }' },
);

const SureRange = Type.Object(
  {
    'as-uncertain': Type.Literal(true, {
      description: 'Values by how sure the parameter is (its `uncertainty`).',
      examples: [true],
    }),
    steps,
  },
  { additionalProperties: false, title: 'how sure the number is: { as-uncertain: true }' },
);

const SweptValue = Type.Union([Type.Number(), Type.String({ minLength: 1 })], {
  title: 'a number, or the name of a scenario',
});

const Swept = Type.Union([Type.Array(SweptValue, { minItems: 1, uniqueItems: true }), FromTo, SureRange], {
  title: 'a list of values, a range { from: …, to: … }, or { as-uncertain: true }',
  description:
    'The values of one number: of a named parameter, of a place such as `natal.leaving`, or of `scenario`. Without `over`, all parameters that say how sure they are.',
  examples: ['{ from: 0.45, to: 0.7 }'],
});

const Points = Type.Array(
  Type.Record(Type.String(), SweptValue, { title: 'numbers with a value each', 'x-key': 'NUMBER' }),
  { minItems: 1, title: 'a list of points' },
);

/** The names of designs. */
export const designNames = [
  Type.Literal('grid'),
  Type.Literal('list'),
  Type.Literal('latin hypercube'),
  Type.Literal('sobol'),
  Type.Literal('one at a time'),
  Type.Literal('sobol indices'),
  Type.Literal('morris'),
] as const;

export const Sweep = Type.Object(
  {
    design: Type.Optional(
      Type.Union([...designNames], {
        description:
          'Which points: every combination; a list; a Latin hypercube; Sobol points; one number after the other; rows for shares of variance; walks for screening.',
        examples: ['latin hypercube'],
        default: 'grid',
      }),
    ),
    over: Type.Optional(
      Type.Record(Type.String(), Swept, {
        title: 'names of numbers with their values',
        description: 'The numbers that are changed.',
        examples: ['adult_survival: { from: 0.45, to: 0.7 }'],
        'x-key': 'NUMBER',
      }),
    ),
    list: Type.Optional(
      orFile(Points, {
        title: 'a list of points, or a CSV file with a column a number and a row a point',
        description: 'Points of your own; a number that a point does not name is that of the model.',
        examples: ['points.csv'],
      }),
    ),
    points: Type.Optional(
      Type.Integer({
        minimum: 2,
        description:
          'How many points a Latin hypercube or Sobol design has, how many rows shares of variance, how many walks a screening.',
        examples: [4096],
        default: 1024,
      }),
    ),
    seed: Type.Optional(
      Type.Integer({
        minimum: 0,
        maximum: Number.MAX_SAFE_INTEGER,
        description: 'Decides where the points of a sampled design lie; the futures have their own seed.',
        examples: [5],
        default: 1,
      }),
    ),
    scrambled: Type.Optional(
      Type.Boolean({
        description: 'Whether Sobol points are scrambled (Owen 1995).',
        examples: [false],
        default: 'true',
      }),
    ),
    compare: Type.Optional(
      Type.Union([Type.Literal('all'), Type.Array(Type.String({ minLength: 1 }), { minItems: 2, uniqueItems: true })], {
        title: '`all`, or a list of scenarios',
        description:
          'Scenarios that are set beside each other at every point, in the same futures: which of them is best where.',
        examples: ['all'],
      }),
    ),
    measures: Type.Optional(
      Type.Array(
        Type.Union([
          Type.Literal('growth'),
          Type.Literal('damping'),
          Type.Literal('standing'),
          Type.Literal('path-end'),
          Type.Literal('chance'),
          Type.Literal('chance-at-end'),
          Type.Literal('lowest'),
          Type.Literal('animals'),
          Type.Literal('patches-in-use'),
          Type.Literal('cost'),
        ]),
        {
          minItems: 1,
          uniqueItems: true,
          title: 'a list of measures',
          description:
            'What is asked at each point. Without chance: growth near zero, damping, animals standing still, animals at the end of the path. From runs: chances of the outcomes, mean lowest count, animals and patches in use at the end, and what the actions cost. Without it, growth; where scenarios are compared, chance (or animals) and cost.',
          examples: ['[growth, chance]'],
        },
      ),
    ),
  },
  {
    additionalProperties: false,
    description: 'What `skein sweep` does unless the command says otherwise.',
    examples: ['{ over: { adult_survival: { from: 0.45, to: 0.7 } }, points: 4096 }'],
  },
);
