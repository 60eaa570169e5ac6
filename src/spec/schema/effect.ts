// What an action makes of one number: another number, a multiple of it, so much more, or several of these in this order.
import * as Type from 'typebox';
import { unsureExpression, unsureQuantity, type Measured } from './unsure.ts';
import type { KeyWords } from './values.ts';

const parts = {
  set: 'The number becomes this.',
  times: 'The number, once it was set, is multiplied by this.',
  add: 'So much is added to the number, once it was set and multiplied.',
} as const;

export const Effect = effectOf(
  (description, example) => unsureExpression({ description, examples: [example] }),
  [0.12, 1.2, 0.05],
);

/** An effect on a plain number or share. */
export function effect(words: KeyWords) {
  return { ...Effect, ...words };
}

/** An effect on a number with a unit; `times` is a plain factor. */
export function measuredEffect(dimension: Measured, words: KeyWords, [set, add]: readonly [string, string]) {
  const shape = effectOf(
    (description, example) =>
      typeof example === 'string'
        ? unsureQuantity(dimension, { description, examples: [example] })
        : unsureExpression({ description, examples: [example] }),
    [set, 0.6, add],
  );
  return { ...shape, ...words };
}

type Number = (
  description: string,
  example: number | string,
) => ReturnType<typeof unsureExpression> | ReturnType<typeof unsureQuantity>;

function effectOf(number: Number, [set, times, add]: readonly (number | string)[]) {
  return Type.Object(
    {
      set: Type.Optional(number(parts.set, set ?? 0)),
      times: Type.Optional(number(parts.times, times ?? 0)),
      add: Type.Optional(number(parts.add, add ?? 0)),
    },
    {
      additionalProperties: false,
      title: 'an effect: { set: … }, { times: … }, { add: … }, or several, done in this order',
    },
  );
}
