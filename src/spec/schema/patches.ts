import { Type } from 'typebox';
import { Expression, Name, Quantity } from './values.ts';

export const InlinePatch = Type.Object(
  {
    name: Name,
    at: Type.Optional(
      Type.Tuple([Type.Number(), Type.Number()], { description: 'x and y in the `unit` of the plane.' }),
    ),
    area: Type.Optional(Quantity),
    capacity: Type.Optional(
      Type.Number({ minimum: 0, description: 'Animals, in the count of the crowding or ceiling that uses it.' }),
    ),
  },
  { additionalProperties: Type.Number({ description: 'An attribute of the patch, usable by name in expressions.' }) },
);

export const Patches = Type.Array(InlinePatch, { minItems: 1 });

export const Parameter = Type.Union([
  Expression,
  Type.Object(
    {
      value: Expression,
      source: Type.Optional(
        Type.Object(
          {
            text: Type.Optional(Type.String({ description: 'Where the number is from.' })),
            basis: Type.Optional(
              Type.Union(
                [
                  Type.Literal('measured here'),
                  Type.Literal('measured elsewhere'),
                  Type.Literal('expert'),
                  Type.Literal('assumed'),
                ],
                { description: 'How the number is known.' },
              ),
            ),
          },
          { additionalProperties: false },
        ),
      ),
    },
    { additionalProperties: false },
  ),
]);
