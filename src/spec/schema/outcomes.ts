import { Type } from 'typebox';
import { ClassList, Name } from './values.ts';

export const Outcome = Type.Object(
  {
    of: ClassList,
    in: Type.Optional(Type.Union([Name, Type.Array(Name, { minItems: 1 })])),
    below: Type.Number({ exclusiveMinimum: 0, description: 'Animals; below is strict.' }),
  },
  { additionalProperties: false },
);

const Table = Type.Record(Type.String(), Type.Record(Type.String(), Type.Number({ minimum: 0 })));

export const Start = Type.Union([
  Type.Object({ table: Table }, { additionalProperties: false }),
  Type.Object(
    {
      total: Type.Number({ minimum: 0 }),
      spread: Type.Optional(Type.Union([Type.Literal('stable within patch'), Type.Literal('stable over all')])),
    },
    { additionalProperties: false },
  ),
  Type.Object(
    {
      counted: Type.Record(Type.String(), Type.Number({ minimum: 0 })),
      of: ClassList,
      rest: Type.Union([Type.Literal('stable within patch'), Type.Literal('none')]),
    },
    { additionalProperties: false },
  ),
]);

export const Run = Type.Object(
  {
    replicates: Type.Optional(Type.Integer({ minimum: 1, maximum: 100_000_000 })),
    seed: Type.Optional(Type.Integer({ minimum: 0, maximum: Number.MAX_SAFE_INTEGER })),
  },
  { additionalProperties: false },
);
