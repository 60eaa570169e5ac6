// The phases that a study names itself: each stands at the top level under its own name with a `kind`.
import { Type } from 'typebox';
import { ByClass, ClassList, Expression, Name, Quantity } from './values.ts';

export const Kernel = Type.Object(
  {
    shape: Type.Literal('exponential'),
    mean: Type.Optional(Quantity),
    scale: Type.Optional(Quantity),
    reach: Type.Optional(Quantity),
  },
  { additionalProperties: false },
);

/** From patch to patch: the share of the animals present that goes there. */
export const Shares = Type.Record(Type.String(), Type.Record(Type.String(), Expression));

export const Dispersal = Type.Object(
  {
    kind: Type.Literal('dispersal'),
    classes: ClassList,
    leaving: Type.Optional(Type.Union([Expression, ByClass])),
    distance: Type.Optional(Type.Literal('straight')),
    kernel: Type.Optional(Kernel),
    attraction: Type.Optional(Expression),
    leavers: Type.Optional(Type.Union([Type.Literal('all arrive'), Type.Literal('may miss')])),
    hazard: Type.Optional(Quantity),
    'survival-on-the-way': Type.Optional(Expression),
    shares: Type.Optional(Shares),
  },
  { additionalProperties: false },
);

export const Ceiling = Type.Object(
  {
    kind: Type.Literal('ceiling'),
    counted: ClassList,
    capacity: Expression,
    takes: Type.Literal('at random'),
  },
  { additionalProperties: false },
);

export const Crowding = Type.Object(
  {
    form: Type.Union([Type.Literal('beverton-holt'), Type.Literal('ricker')]),
    changes: Type.Record(Type.String(), ClassList),
    counted: Type.Union([Type.Record(Type.String(), Type.Number({ minimum: 0 })), ClassList]),
    capacity: Expression,
    'allee-half': Type.Optional(Expression),
    'where-declining': Type.Optional(
      Type.Union([Type.Literal('none'), Type.Literal('ceiling'), Type.Object({ as: Name })]),
    ),
  },
  { additionalProperties: false },
);
