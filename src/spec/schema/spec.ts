// The whole language. The published schema, the types, the checks and the reference in the README all come from here.
import { Type, type Static } from 'typebox';
import { Outcome, Run, Start } from './outcomes.ts';
import { Parameter, Patches } from './patches.ts';
import { Ceiling, Crowding, Dispersal } from './phases.ts';
import { Births, Demography, PatchRates, Survival } from './rates.ts';
import { Study } from './study.ts';
import { Name } from './values.ts';

/** The keys that the language knows. What a study names itself stands beside them, each with a `kind`. */
export const CoreSchema = Type.Object(
  {
    skein: Type.Literal(1),
    study: Study,
    'first-year': Type.Optional(Type.Integer()),
    years: Type.Integer({ minimum: 1, maximum: 100_000 }),
    step: Type.Optional(Type.Literal('1 year')),
    position: Type.Optional(Type.Literal('plane')),
    unit: Type.Optional(Type.Union([Type.Literal('km'), Type.Literal('m')])),
    patches: Patches,
    counts: Type.Union([Type.Literal('females'), Type.Literal('both sexes')]),
    classes: Type.Array(Name, { minItems: 1, uniqueItems: true }),
    oldest: Type.Optional(Type.Union([Type.Literal('open-ended'), Type.Literal('terminal')])),
    parameters: Type.Optional(Type.Record(Type.String(), Parameter)),
    survival: Type.Optional(Survival),
    births: Type.Optional(Births),
    demography: Type.Optional(Demography),
    in: Type.Optional(Type.Record(Type.String(), PatchRates)),
    year: Type.Array(Name, { minItems: 1 }),
    crowding: Type.Optional(Crowding),
    start: Start,
    outcomes: Type.Optional(Type.Record(Type.String(), Outcome)),
    run: Type.Optional(Run),
  },
  { additionalProperties: false },
);

export const namedSchemas = { dispersal: Dispersal, ceiling: Ceiling } as const;

export type DispersalSpec = Static<typeof Dispersal>;
export type CeilingSpec = Static<typeof Ceiling>;
export type CrowdingSpec = Static<typeof Crowding>;
export type OutcomeSpec = Static<typeof Outcome>;
export type NamedSpec = DispersalSpec | CeilingSpec;

/** A model as its author wrote it, checked for shape only. `named` holds the phases that the study names itself. */
export type Spec = Static<typeof CoreSchema> & { readonly named: Readonly<Record<string, NamedSpec>> };
