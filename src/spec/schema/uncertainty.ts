// What is not known: how sure a parameter is, and what the errors of several have to do with one another.
import * as Type from 'typebox';
import { expression } from './values.ts';

const two = { minItems: 2, maxItems: 2 };

/** An end of a range, as the standard error is written: as a share or in percent, or an expression. */
const end = expression({ description: 'An end of it.', examples: [0.66], 'x-unit': 'that of the number' });

export const Uncertain = Type.Object(
  {
    'standard-error': Type.Optional(
      expression({
        description: 'Standard error of the estimate (not the spread between years).',
        examples: [0.04],
        'x-unit': 'that of the number',
      }),
    ),
    interval: Type.Optional(
      Type.Array(end, {
        ...two,
        title: 'two numbers',
        description: 'A 95 % interval of the estimate, around the value.',
        examples: ['[0.66, 0.81]', '[66 %, 81 %]'],
      }),
    ),
    uniform: Type.Optional(
      Type.Array(end, {
        ...two,
        title: 'two numbers',
        description: 'Anything between these two is as likely.',
        examples: ['[0.1, 0.3]'],
      }),
    ),
    triangular: Type.Optional(
      Type.Array(end, {
        ...two,
        title: 'two numbers',
        description: 'The least and the most that it can be; the value is the likeliest.',
        examples: ['[0.1, 0.4]'],
      }),
    ),
    as: Type.Optional(
      Type.Union([Type.Literal('share'), Type.Literal('positive number'), Type.Literal('number')], {
        description:
          'What a standard error or an interval is of: a share has a beta distribution, a positive number a lognormal, another number a normal. Without it, a value between 0 and 1 is a share, one above 1 a positive number.',
        examples: ['share'],
      }),
    ),
  },
  {
    additionalProperties: false,
    title: 'how sure a number is: { standard-error: … }, { interval: […] }, { uniform: […] } or { triangular: […] }',
    description: 'How exactly the number is known. `run --draws` draws it once for each set of replicates.',
    examples: ['{ standard-error: 0.04 }'],
  },
);

export const Uncertainty = Type.Object(
  {
    correlations: Type.Optional(
      Type.Record(
        Type.String(),
        Type.Record(
          Type.String(),
          Type.Number({ minimum: -1, maximum: 1, description: 'A correlation.', examples: [0.3] }),
          {
            'x-key': 'PARAMETER',
          },
        ),
        {
          title: 'parameters with their correlations to other parameters',
          description:
            'Correlation of the errors of two estimates, of the underlying normal numbers; pairs that are not named have 0.',
          examples: ['adult_survival: { newborn_survival: -0.3 }'],
          'x-key': 'PARAMETER',
        },
      ),
    ),
    draws: Type.Optional(
      Type.Array(
        Type.Record(Type.String(), Type.Number({ description: 'A value.', examples: [0.71] }), {
          title: 'parameters with a value each',
          'x-key': 'PARAMETER',
        }),
        {
          minItems: 2,
          title: 'a list of draws',
          description:
            'Draws of your own, such as a sample from a posterior, instead of distributions; the first is draw 1.',
          examples: ['- { adult_survival: 0.71, litter: 4.2 }'],
        },
      ),
    ),
  },
  {
    additionalProperties: false,
    description: 'What the errors of several parameters have to do with one another.',
    examples: ['{ correlations: { adult_survival: { newborn_survival: -0.3 } } }'],
  },
);
