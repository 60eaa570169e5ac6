// The small values that every section is made of.
import { Type } from 'typebox';
import { dimensionWords, type Dimension } from '../quantity.ts';

/** What the reference says of a key; `x-unit` is the unit of a bare number. */
export interface KeyWords {
  readonly description: string;
  readonly examples: readonly (string | number | boolean)[];
  readonly default?: string | number;
  readonly 'x-unit'?: string;
}

/** A number, or arithmetic over named parameters, patch attributes, drivers and `year`. */
export function expression(words: KeyWords) {
  const title = 'a number or an expression';
  return Type.Union([Type.Number(), Type.String({ minLength: 1, format: 'expression' })], { title, ...words });
}

const baseUnits: Readonly<Record<Dimension, string>> = {
  length: 'km',
  area: 'km2',
  share: 'share',
  'per-length': 'per km',
  time: 'years',
};

/** A number with a unit, such as `4 km`, or an expression with one; a bare number has the base unit. */
export function quantity(dimension: Dimension, words: KeyWords) {
  const own = { title: dimensionWords[dimension], 'x-unit': baseUnits[dimension], ...words };
  return Type.Union([Type.Number(), Type.String({ minLength: 1, format: dimension })], own);
}

/** A name that the author chooses or uses. */
export const Name = Type.String({ minLength: 1, format: 'name', title: 'a name' });

/** Class name to expression. */
export function byClass(words: KeyWords) {
  return Type.Record(Type.String(), expression(words), {
    title: 'classes with a number or an expression each',
    description: words.description,
    'x-key': 'CLASS',
  });
}

export function classList(words: KeyWords) {
  return Type.Union([Type.Array(Name, { minItems: 1, uniqueItems: true }), Type.Literal('all')], {
    title: 'a list of classes, or `all`',
    ...words,
  });
}

/** A text that the tool shows and does not interpret. */
export function text(words: KeyWords) {
  return Type.String({ minLength: 1, ...words });
}

/** Names of one sort, such as `CLASS`, with a number each that is not negative. */
export function byNumber(words: KeyWords, key: string) {
  return Type.Record(Type.String(), Type.Number({ minimum: 0, ...words }), {
    title: 'names with a number each',
    description: words.description,
    'x-key': key,
  });
}

/** A file in the folder of the spec or below it. */
export const FileName = Type.String({ minLength: 1, format: 'file', title: 'the name of a file' });
