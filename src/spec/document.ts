// A spec that was read without a mistake of shape, with the way back from every value to its place in the text.
import type { Place } from '../diagnostic/diagnostic.ts';
import type { Span } from './expression/ast.ts';
import type { Spec } from './schema/spec.ts';

/** Keys and indices from the top of the document, such as `['survival', 'adult']`. */
export type SpecPath = readonly (string | number)[];

export interface SpecDocument {
  readonly file: string;
  readonly text: string;
  readonly spec: Spec;
  /**
   * The place of a value, or of its key; without `part` a single value itself, a section or list by its key. With `span` a
   * stretch inside the text of a single value. The nearest enclosing place where the path itself is not in the text.
   */
  locate(path: SpecPath, part?: 'key' | 'value', span?: Span): Place;
}
