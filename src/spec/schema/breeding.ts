// How young come about beside their number: how many at once, and who must find whom.
import * as Type from 'typebox';
import { classList, expression } from './values.ts';

export const Offspring = Type.Object(
  {
    distribution: Type.Union(
      [
        Type.Literal('poisson'),
        Type.Literal('bernoulli'),
        Type.Literal('binomial'),
        Type.Literal('negative binomial'),
        Type.Literal('table of chances'),
      ],
      {
        description:
          'How the young of one animal vary around `births`: poisson; bernoulli (one or none); binomial (up to a largest litter); negative binomial (more uneven than poisson); or a table of chances, which then takes the place of `births`.',
        examples: ['binomial'],
        default: 'poisson',
      },
    ),
    'largest-litter': Type.Optional(
      Type.Integer({
        minimum: 1,
        maximum: 1000,
        description: 'Of the binomial: nobody has more young than this in the phase.',
        examples: [6],
        'x-unit': 'young',
      }),
    ),
    size: Type.Optional(
      expression({
        description: 'k of the negative binomial: the variance of one animal’s young is m + m²/k around a mean of m.',
        examples: [1.5],
      }),
    ),
    chances: Type.Optional(
      Type.Record(
        Type.String(),
        Type.Array(expression({ description: 'A chance.', examples: [0.3], 'x-unit': 'share' }), {
          minItems: 2,
          title: 'a list of chances',
          description: 'Chances of no young, of one, of two and so on, for one animal of the class; they add up to 1.',
          examples: ['[0.3, 0.5, 0.2]'],
        }),
        {
          title: 'classes with a list of chances each',
          description:
            'Of the table of chances: for each class that breeds the chances of no young, one, two and so on.',
          examples: ['{ adult: [0.3, 0.5, 0.2] }'],
          'x-key': 'CLASS',
        },
      ),
    ),
  },
  {
    additionalProperties: false,
    description: 'How the young of one animal vary with chance; the mean stays that of `births`.',
    examples: ['{ distribution: binomial, largest-litter: 6 }'],
  },
);

export const Mating = Type.Object(
  {
    form: Type.Union([Type.Literal('female-dominant'), Type.Literal('harmonic mean'), Type.Literal('minimum')], {
      description:
        'How births depend on females F and males M in a patch, with h females per male: births of F females whatever M; times 2 h M / (F + h M); or times min(1, h M / F).',
      examples: ['harmonic mean'],
    }),
    males: Type.Optional(classList({ description: 'Classes of males that mate.', examples: ['[bull]'] })),
    females: Type.Optional(
      classList({
        description: 'Classes of females that look for mates; without it, those that have births.',
        examples: ['[cow]'],
      }),
    ),
    'females-per-male': Type.Optional(
      expression({
        description: 'h: for so many females one male is as good as one for each.',
        examples: [4],
        default: 1,
        'x-unit': 'females',
      }),
    ),
  },
  {
    additionalProperties: false,
    description: 'Who must find whom in the phase, where classes are given for both sexes. It must then be said.',
    examples: ['{ form: harmonic mean, males: [bull], females-per-male: 4 }'],
  },
);
