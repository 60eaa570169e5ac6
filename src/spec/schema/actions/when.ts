// The years of an effect.
import * as Type from 'typebox';
import { quantity } from '../values.ts';

const Year = (description: string, example: number) =>
  Type.Optional(Type.Integer({ description, examples: [example] }));

/** Keys of when an effect holds. */
export const when = {
  from: Year('The first year of the effect; without it, the first of all.', 2029),
  until: Year('The last year of the effect; without it, the last of all.', 2040),
  over: Type.Optional(
    quantity('time', {
      description:
        'How long the effect grows, in equal steps: of 8 years an eighth in the first, all from the eighth on. Without it, all at once.',
      examples: ['8 years'],
    }),
  ),
};
