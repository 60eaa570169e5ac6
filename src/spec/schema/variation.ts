// Year-to-year variation: what differs between years, by how much, and what differs together.
import * as Type from 'typebox';
import { expression, quantity } from './values.ts';

/** By how much one number differs from year to year. */
const ownKeys = {
  sd: Type.Optional(
    expression({
      description:
        'Standard deviation between years, on the scale of the number itself, without sampling error. Where the mean changes with `year` or a driver, it stays.',
      examples: [0.1],
      'x-unit': 'that of the number',
    }),
  ),
  cv: Type.Optional(
    expression({
      description:
        'Standard deviation between years as a share of the mean, instead of `sd`; it goes with a mean that changes.',
      examples: ['20 %'],
      'x-unit': 'share',
    }),
  ),
  shape: Type.Optional(
    Type.Union([Type.Literal('beta'), Type.Literal('logit-normal'), Type.Literal('lognormal'), Type.Literal('gamma')], {
      description:
        'Distribution over the years: `beta` or `logit-normal` for shares, `lognormal` or `gamma` for numbers above zero. Mean and SD are matched exactly.',
      examples: ['beta'],
    }),
  ),
};

const title = 'how much a number varies: { sd: …, shape: … }';

export const Varied = Type.Object(ownKeys, { additionalProperties: false, title });

const VariedByClass = Type.Object(ownKeys, { additionalProperties: false, title, 'x-brief': true });

const correlation = { description: 'A correlation.', examples: [0.5], minimum: -1, maximum: 1 };

/** From name to name, with a correlation each. */
function pairs(key: string, description: string, example: string) {
  return Type.Record(Type.String(), Type.Record(Type.String(), Type.Number(correlation), { 'x-key': key }), {
    title: 'names with their correlations to other names',
    description,
    examples: [example],
    'x-key': key,
  });
}

const betweenRates = {
  description:
    'Correlation of the years between the numbers that vary: one number for all pairs, or a table of names such as `survival of adult`; pairs that a table does not name have 0. It is that of the underlying normal numbers; `check` prints that of the rates.',
  examples: [0.5],
  default: 0,
};

export const BetweenRates = Type.Union(
  [Type.Number(correlation), pairs('NAME', betweenRates.description, 'survival of adult: { litter: 0.4 }')],
  { title: 'a correlation, or a table of them', ...betweenRates },
);

const Range = Type.Object(
  {
    range: quantity('length', {
      description: 'Correlation falls with distance as exp(-distance / range).',
      examples: ['20 km'],
    }),
  },
  { additionalProperties: false, title: '{ range: … }' },
);

const betweenPatches = {
  description:
    'Correlation of the years between patches: a number for all pairs (1: all have the same weather; 0: each its own), a range over which it falls, or a table. Must be said where there are several patches.',
  examples: ['{ range: 20 km }'],
};

export const BetweenPatches = Type.Union(
  [Type.Number(correlation), Range, pairs('PATCH', betweenPatches.description, 'North fen: { Long holm: 0.7 }')],
  { title: 'a correlation, a range, or a table', ...betweenPatches },
);

export const Autocorrelation = Type.Number({
  description:
    'Correlation of each year with the next, of the underlying normal numbers; all have their whole spread from the first year on.',
  examples: [0.2],
  default: 0,
  exclusiveMinimum: -1,
  exclusiveMaximum: 1,
});

const byRate = Type.Record(Type.String(), VariedByClass, {
  title: 'classes with how much their rate varies',
  description: 'How much the rate of each class varies.',
  examples: ['newborn: { sd: 0.1 }'],
  'x-key': 'CLASS',
});

const others = Type.Union([Varied, byRate], {
  title: 'how much a number varies, or classes with that',
  description:
    'A rate by class (`survival`, `births`, `fates`, or a phase by its name; for a dispersal its leavers), or a named parameter.',
  examples: ['survival: { newborn: { sd: 0.1 } }'],
});

export const Variation = Type.Record(Type.String(), Type.Union([others, BetweenRates, BetweenPatches]), {
  title: 'rates and parameters that vary from year to year',
  description: 'Real differences between years. What is not exactly known is another thing: see `uncertainty`.',
  examples: ['{ litter: { sd: 0.7 }, between-patches: 0.5 }'],
  'x-key': 'RATE OR PARAMETER',
  'x-keys': { 'between-rates': BetweenRates, 'between-patches': BetweenPatches, autocorrelation: Autocorrelation },
  'x-others': others,
});
