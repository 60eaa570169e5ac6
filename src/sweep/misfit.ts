// Values of a sweep that the language does not take at their place. A text is checked for them once, before a model is made; where an
// expression may stand the model looks at its value itself, at every point.
import type { Spec } from '../spec/schema/spec.ts';
import { takesNumber } from '../spec/shape/scalar.ts';
import { numberAt, takesExpression } from '../spec/shape/unit-at.ts';
import { expectationOf } from '../spec/shape/words.ts';
import type { DesignPlan } from './design/design.ts';
import { levelsOf, type Factor, type Value } from './design/factor.ts';
import { placesIn } from './places.ts';

export interface Misfit {
  readonly found: string;
  readonly expected: string;
  /** It lies between two values that fit. */
  readonly between: boolean;
}

/** The first value of the factor that does not fit its place; null where all do. */
export function misfitOf(spec: Spec, { name, range, base }: Factor, design: DesignPlan): Misfit | null {
  if (Object.hasOwn(spec.parameters ?? {}, name)) return null;
  const path = placesIn(spec).find((place) => place.name === name)?.path;
  if (path === undefined || takesExpression(spec, path)) return null;
  const shape = numberAt(spec, path);
  if (shape === undefined) return null;
  const fits = (value: Value): boolean => typeof value === 'number' && takesNumber(shape, value);
  const expected = expectationOf(shape);
  if (range.by === 'from to') {
    const outside = [range.from, range.to].find((value) => !fits(value));
    if (outside !== undefined) return { found: String(outside), expected, between: false };
    const anything = design.design !== 'grid' && design.design !== 'one at a time';
    if (anything && shape.type === 'integer') {
      return { found: `anything from ${range.from} to ${range.to}`, expected, between: true };
    }
  }
  const found = levelsOf({ name, range, base }).find((value) => !fits(value));
  return found === undefined ? null : { found: String(found), expected, between: range.by === 'from to' };
}
