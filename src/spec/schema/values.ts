// The small values that every section is made of.
import * as Type from 'typebox';
import type { TSchema } from 'typebox';
import { dimensionWords, type Dimension } from '../quantity.ts';
import { schedule } from './schedule.ts';

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

/** An expression that may also be written as a schedule of years. */
export function timed(words: KeyWords) {
  const title = 'a number, an expression, or years with a number each';
  const branches = [
    Type.Number(),
    Type.String({ minLength: 1, format: 'expression' }),
    schedule('expression'),
  ] as const;
  return Type.Union([...branches], { title, ...words });
}

export const baseUnits: Readonly<Record<Dimension, string>> = {
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

export function patchOrMore(description: string, example: string) {
  return Type.Union([Name, Type.Array(Name, { minItems: 1, uniqueItems: true })], {
    title: 'a patch or a list of patches',
    description,
    examples: [example],
  });
}

/** Class name to expression. */
export function byClass(words: KeyWords) {
  return byClassOf(timed(words), words);
}

export function byClassOf<Value extends TSchema>(value: Value, words: KeyWords) {
  return Type.Record(Type.String(), value, {
    title: 'classes with a number or an expression each',
    description: words.description,
    examples: [`{ adult: ${String(words.examples[0])} }`],
    'x-key': 'CLASS',
  });
}

export function classList(words: KeyWords) {
  return Type.Union([Type.Array(Name, { minItems: 1, uniqueItems: true, 'x-classes': true }), Type.Literal('all')], {
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
    examples: [`{ ${key === 'CLASS' ? 'adult' : 'North fen'}: ${String(words.examples[0])} }`],
    'x-key': key,
  });
}

/** The name of a file, in the place of what the file holds. */
export type FileRef = string & { readonly namesFile: true };

/** A file in the folder of the spec or below it. */
export function fileName(words: { readonly description?: string; readonly examples?: readonly string[] } = {}) {
  const schema = Type.String({ minLength: 1, format: 'file', title: 'the name of a file', ...words });
  return Object.assign(Type.Unsafe<FileRef>(schema), { type: 'string' } as const);
}

/** What may stand in the spec, or in a file that it names. */
export function orFile<Shape extends TSchema>(shape: Shape, words: KeyWords & { readonly title: string }) {
  return Type.Union([shape, fileName()], { ...words });
}
