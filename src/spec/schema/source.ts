// Where a number is from.
import * as Type from 'typebox';
import { text } from './values.ts';

export const Source = Type.Object(
  {
    text: Type.Optional(
      text({ description: 'Where the number is from.', examples: ['radio-tracking 2019-2024, 61 hares'] }),
    ),
    basis: Type.Optional(
      Type.Union(
        [
          Type.Literal('measured here'),
          Type.Literal('measured elsewhere'),
          Type.Literal('expert'),
          Type.Literal('assumed'),
        ],
        { description: 'How the number is known.', examples: ['measured here'] },
      ),
    ),
  },
  {
    additionalProperties: false,
    description: 'Where the number is from and how it is known; the report shows it.',
    examples: ['{ text: "three fens, 2021", basis: measured elsewhere }'],
  },
);
