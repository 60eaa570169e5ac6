// Parts that several formats share. Objects stay open: within one number of a format, fields may be added.
import * as Type from 'typebox';
import type { TSchema } from 'typebox';

export const text = (description: string) => Type.String({ description });
export const number = (description: string) => Type.Number({ description });
export const whole = (description: string) => Type.Integer({ minimum: 0, description });
export const share = (description: string) => Type.Number({ minimum: 0, maximum: 1, description });
export const orNull = <T extends TSchema>(schema: T) => Type.Union([schema, Type.Null()]);
export const maybe = (description: string) => Type.Union([Type.Number(), Type.Null()], { description });
export const maybeText = (description: string) => Type.Union([Type.String(), Type.Null()], { description });
/** A share that is null where not a single run was finished. */
export const maybeShare = (description: string) => orNull(share(description));

export const patch = text('Name of the patch.');
export const className = text('Name of the class.');
export const year = Type.Integer({ description: 'Calendar year of the count.' });
export const State = Type.Object({ patch, class: className });
export const cautions = Type.Array(Type.String(), { description: 'What every reader should know first.' });

/** What a result came from. */
export const provenance = {
  tool: Type.Object({ name: Type.Literal('skein'), version: Type.String(), kernel: Type.String() }),
  model: text('Title of the study.'),
  hash: Type.String({ pattern: '^[0-9a-f]{64}$', description: 'SHA-256 of everything that decides the result.' }),
} as const;

export const years = whole('Years that the model looks ahead.');
export const firstYear = Type.Integer({
  description: 'Calendar year of step 1 and of the count that ends it; the start is the count of the year before.',
});
export const seed = whole('Decides all chance.');

/** What must be so at a count, and at how many counts one after the other. */
export const outcomeRule = {
  definition: text('In words, from the rule itself.'),
  event: Type.Union([
    Type.Object({
      is: Type.Union([Type.Literal('below'), Type.Literal('above')]),
      than: number('The threshold; strictly below or above it counts.'),
    }),
    Type.Object({ is: Type.Literal('fallen'), by: share('By this share of the count at the start, or more.') }),
  ]),
  counts: whole('Counts one after the other at which it must be so.'),
} as const;

export const Quantiles = Type.Object(
  {
    '0.05': Type.Number(),
    '0.25': Type.Number(),
    '0.5': Type.Number(),
    '0.75': Type.Number(),
    '0.95': Type.Number(),
  },
  { description: 'Counts that the given share of the runs does not exceed.' },
);

export const places = Type.Optional(
  Type.Union([Type.Literal('shifted'), Type.Literal('schematic')], {
    description: 'Where the places of patches are hidden: the hash then leaves them out. Absent where they are exact.',
  }),
);
