// Age or stage classes, of one sex or of both.
import { Type } from 'typebox';
import { Name } from './values.ts';

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
