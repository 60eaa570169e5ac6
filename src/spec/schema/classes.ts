// Age or stage classes, of one sex or of both.
import * as Type from 'typebox';
import { expression, Name } from './values.ts';

function namesOf(description: string, example: string) {
  return Type.Array(Name, {
    minItems: 1,
    uniqueItems: true,
    title: 'a list of names',
    description,
    examples: [example],
  });
}

export const Classes = Type.Union(
  [
    namesOf('Age or stage classes, the youngest first.', '[newborn, yearling, adult]'),
    Type.Object(
      {
        females: namesOf('Classes of the females, the youngest first.', '[heifer calf, heifer, cow]'),
        males: namesOf('Classes of the males, the youngest first, under names of their own.', '[bull calf, bull]'),
      },
      { additionalProperties: false, title: '{ females: […], males: […] }' },
    ),
  ],
  {
    title: 'a list of names, or one each for `females` and `males`',
    description:
      'Age or stage classes, the youngest first. Where both sexes are followed, a list for each: ageing leads on within a sex, and the young enter the first class of theirs.',
    examples: ['[newborn, yearling, adult]'],
  },
);

const words = { description: 'Whether the oldest class stays in itself or leaves the model when it ages.' };

const Ending = Type.Union([Type.Literal('open-ended'), Type.Literal('terminal')], {
  ...words,
  examples: ['open-ended'],
});

export const Oldest = Type.Union(
  [
    Type.Literal('open-ended'),
    Type.Literal('terminal'),
    Type.Object({ females: Ending, males: Ending }, { additionalProperties: false, title: '{ females: …, males: … }' }),
  ],
  {
    title: '`open-ended`, `terminal`, or one of them for each sex',
    description: 'Whether the oldest class (of each sex) stays in itself or leaves the model when it ages.',
    examples: ['open-ended'],
  },
);

export const Duration = Type.Record(
  Type.String(),
  Type.Object(
    {
      years: expression({
        description: 'How long the stage lasts for an animal that lives through it.',
        examples: [7],
        'x-unit': 'years',
      }),
      as: Type.Union([Type.Literal('fixed'), Type.Literal('geometric'), Type.Literal('expanded')], {
        description:
          'How it lasts. `fixed`: for all animals alike; the share that goes on each year is that of a stable make-up of ages within the stage. `geometric`: a share of 1/years goes on each year, however long an animal has been there. `expanded`: each year is a class of its own, `juvenile 1`, `juvenile 2` and so on, and the name of the stage stands for all of them.',
        examples: ['fixed'],
      }),
    },
    { additionalProperties: false, title: '{ years: …, as: … }' },
  ),
  {
    title: 'classes with { years: …, as: … } each',
    description: 'Classes in which animals stay longer than a year; those that are not named are as wide as a year.',
    examples: ['{ juvenile: { years: 7, as: fixed } }'],
    'x-key': 'CLASS',
  },
);
