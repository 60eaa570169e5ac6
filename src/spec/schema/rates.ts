import { Type } from 'typebox';
import { ByClass, ClassList, Expression } from './values.ts';

export const Survival = Type.Record(Type.String(), Expression, {
  description: 'Share of each class that survives the phase `survival`.',
});

/** Class names to young per animal, and besides them `female-share` and `into`. */
export const Births = Type.Record(Type.String(), Type.Union([Expression, ClassList]), {
  description: 'Young of the counted sex for each animal of a class present in the phase `breeding`.',
});

const Row = Type.Array(Expression, { minItems: 1 });
const Square = Type.Array(Row, { minItems: 1 });

export const EntryDemography = Type.Object(
  {
    fates: Type.Optional(Square),
    births: Type.Optional(Square),
  },
  { additionalProperties: false },
);

export const LeslieDemography = Type.Object({ survival: Row, fecundity: Row }, { additionalProperties: false });

/** A published matrix whose entries hold a whole year. Columns are from, rows are to. */
export const Demography = Type.Union([EntryDemography, LeslieDemography]);

/** What is different in one patch. */
export const PatchRates = Type.Object(
  {
    survival: Type.Optional(ByClass),
    births: Type.Optional(ByClass),
    demography: Type.Optional(Demography),
  },
  { additionalProperties: false },
);
