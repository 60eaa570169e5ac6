// Numbers of actions that are not exactly known, written where they stand.
import * as Type from 'typebox';
import { dimensionWords } from '../quantity.ts';
import { Source } from './source.ts';
import { Uncertain } from './uncertainty.ts';
import { baseUnits, byClassOf, expression, quantity, timed, type KeyWords } from './values.ts';

export const unsureFormats = ['expression', 'length', 'area'] as const;
type UnsureFormat = (typeof unsureFormats)[number];
/** What effects measure in units. */
export type Measured = Exclude<UnsureFormat, 'expression'>;

/** Becomes the name of a parameter with this uncertainty before anyone looks at it. */
export interface UnsureRef {
  readonly isUnsure: true;
}

/** The number alone has a format of its own in each place. */
export function unsure(format: UnsureFormat) {
  const shape = Type.Object(
    {
      value: Type.Union([Type.Number(), Type.String({ minLength: 1, format })], {
        description: 'The best estimate.',
        examples: [1.05],
      }),
      uncertainty: Uncertain,
      source: Type.Optional(Source),
    },
    {
      additionalProperties: false,
      'x-brief': true,
      'x-unsure': format,
      title: 'how sure it is, too: { value: …, uncertainty: … }',
    },
  );
  return Object.assign(Type.Unsafe<UnsureRef>(shape), { type: 'object' } as const);
}

/** An expression, or a number that is not exactly known. */
export function unsureExpression(words: KeyWords) {
  const title = 'a number, an expression, or { value: …, uncertainty: … }';
  return Type.Union([expression(words), unsure('expression')], { title, ...words });
}

/** A number with a unit, or one that is not exactly known; standard errors and ranges are in the unit of the value. */
export function unsureQuantity(dimension: Measured, words: KeyWords) {
  const title = `${dimensionWords[dimension]}, or { value: …, uncertainty: … }`;
  return Type.Union([quantity(dimension, words), unsure(dimension)], {
    title,
    'x-unit': baseUnits[dimension],
    ...words,
  });
}

/** Class name to a number that may be not exactly known. */
export function unsureByClass(words: KeyWords) {
  const title = 'a number, an expression, years with a number each, or { value: …, uncertainty: … }';
  return byClassOf(Type.Union([timed(words), unsure('expression')], { title, ...words }), words);
}
