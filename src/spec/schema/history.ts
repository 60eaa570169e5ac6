// What is known year by year: counts of the past, and what drives rates from outside.
import * as Type from 'typebox';
import { classList, expression, orFile } from './values.ts';

const YearCounts = Type.Record(
  Type.String(),
  Type.Record(
    Type.String(),
    Type.Number({ minimum: 0, description: 'Animals counted that year.', examples: [31], 'x-unit': 'animals' }),
    { title: 'years with a number each', 'x-key': 'YEAR' },
  ),
  { title: 'patches with years with a number each', 'x-key': 'PATCH' },
);

export const Observed = Type.Object(
  {
    counts: orFile(YearCounts, {
      title: 'patches with years with a number each, or a CSV file with the columns patch, year, animals',
      description: 'What was counted, by patch and calendar year.',
      examples: ['counts.csv'],
    }),
    of: Type.Optional(
      classList({ description: 'Classes that the counts hold.', examples: ['[yearling, adult]'], default: 'all' }),
    ),
    error: Type.Optional(
      expression({
        description: 'Standard error of a count, as a share of it.',
        examples: ['15 %'],
        'x-unit': 'share',
      }),
    ),
  },
  {
    additionalProperties: false,
    description: 'Counts of the past, drawn beside what the model says.',
    examples: ['{ counts: past.csv, error: 15 % }'],
  },
);

const DriverValues = Type.Record(
  Type.String(),
  Type.Record(Type.String(), Type.Number({ description: 'The value in that year.', examples: [0.8] }), {
    title: 'years with a number each',
    'x-key': 'YEAR',
  }),
  { title: 'names with years with a number each', propertyNames: { format: 'identifier' }, 'x-key': 'DRIVER' },
);

export const Drivers = Type.Object(
  {
    values: orFile(DriverValues, {
      title: 'names with years with a number each, or a CSV file with the columns year and a driver each',
      description: 'What drives rates from outside, such as rain, by calendar year; expressions use it by its name.',
      examples: ['rain.csv'],
    }),
    future: Type.Union([Type.Literal('as-dated'), Type.Literal('repeat'), Type.Literal('resample-years')], {
      description:
        'Which year of the values a year of the model has: its own, which must be there; all in their order, again and again; or one of them by chance, each with the same chance and all drivers from the same one.',
      examples: ['as-dated'],
    }),
  },
  {
    additionalProperties: false,
    description: 'Yearly numbers from outside the model.',
    examples: ['{ values: rain.csv, future: resample-years }'],
  },
);
