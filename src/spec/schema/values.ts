// The small values that every section is made of.
import { Type } from 'typebox';

/** A number, or arithmetic over named parameters, patch attributes, drivers and `year`. */
export const Expression = Type.Union([Type.Number(), Type.String()], {
  description: 'A number or an expression, such as `adult_survival * 0.9`.',
});

/** A number with a unit, such as `4 km`; a bare number has the unit that the key's description states. */
export const Quantity = Type.Union([Type.Number(), Type.String()], {
  description: 'A number with a unit, such as `4 km`, or a bare number in the stated unit.',
});

export const Name = Type.String({ minLength: 1 });

/** Class name to expression. */
export const ByClass = Type.Record(Type.String(), Expression);

export const ClassList = Type.Union([Type.Array(Name, { minItems: 1 }), Type.Literal('all')], {
  description: 'Names of classes, or `all`.',
});
