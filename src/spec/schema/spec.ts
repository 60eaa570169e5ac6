// The whole language. The published schema, the types, the checks and the reference in the README all come from here.
import { Type, type Static } from 'typebox';
import { Mating, Offspring } from './breeding.ts';
import { Classes, Oldest } from './classes.ts';
import { Catastrophe } from './catastrophe.ts';
import { Outcomes, Run, Start, type Outcome } from './outcomes.ts';
import { InlinePatches, Parameters, Patches, type InlinePatch } from './patches.ts';
import { Ceiling, Crowding, Dispersal, NamedCrowding } from './phases.ts';
import { Births, Demography, InPatches, NamedBreeding, NamedSurvival, Survival } from './rates.ts';
import { Study } from './study.ts';
import { Name } from './values.ts';
import { type Varied, Variation } from './variation.ts';

/** The keys that the language knows. What a study names itself stands beside them, each with a `kind`. */
export const CoreSchema = Type.Object(
  {
    skein: Type.Literal(1, { description: 'Version of this language.', examples: [1] }),
    study: Study,
    'first-year': Type.Optional(
      Type.Integer({
        description:
          'Calendar year of the first step and of the count that ends it; the start is the count of the year before.',
        examples: [2027],
        default: 1,
      }),
    ),
    years: Type.Integer({
      minimum: 1,
      maximum: 100_000,
      description: 'How many years are looked ahead.',
      examples: [50],
      'x-unit': 'years',
    }),
    step: Type.Optional(
      Type.Literal('1 year', { description: 'Length of a step.', examples: ['1 year'], default: '1 year' }),
    ),
    position: Type.Optional(
      Type.Union([Type.Literal('plane'), Type.Literal('longitude-latitude')], {
        description: 'What the places of the patches mean: a plane with a `unit`, or degrees on the WGS84 ellipsoid.',
        examples: ['plane'],
      }),
    ),
    unit: Type.Optional(
      Type.Union([Type.Literal('km'), Type.Literal('m')], {
        description: 'Unit of the places on the plane.',
        examples: ['km'],
      }),
    ),
    patches: Patches,
    counts: Type.Union([Type.Literal('females'), Type.Literal('both sexes')], {
      description: 'What one individual of the model stands for.',
      examples: ['females'],
    }),
    classes: Classes,
    oldest: Type.Optional(Oldest),
    parameters: Type.Optional(Parameters),
    survival: Type.Optional(Survival),
    births: Type.Optional(Births),
    offspring: Type.Optional(Offspring),
    mating: Type.Optional(Mating),
    demography: Type.Optional(Demography),
    in: Type.Optional(InPatches),
    year: Type.Array(Name, {
      minItems: 1,
      title: 'a list of phases',
      description:
        'What happens in a year, in order: `count`, `breeding`, `survival`, `ageing`, `demography`, and phases of your own names.',
      examples: ['[count, breeding, survival, natal, ageing]'],
    }),
    crowding: Type.Optional(Crowding),
    variation: Type.Optional(Variation),
    start: Start,
    outcomes: Type.Optional(Outcomes),
    run: Type.Optional(Run),
  },
  { additionalProperties: false },
);

/** What stands in a spec where it names no file. */
export const inlinePatches = InlinePatches;

export const namedSchemas = {
  survival: NamedSurvival,
  breeding: NamedBreeding,
  dispersal: Dispersal,
  ceiling: Ceiling,
  crowding: NamedCrowding,
  catastrophe: Catastrophe,
} as const;

export type InlinePatchSpec = Static<typeof InlinePatch>;
export type DispersalSpec = Static<typeof Dispersal>;
export type CeilingSpec = Static<typeof Ceiling>;
export type CrowdingSpec = Static<typeof Crowding>;
export type OutcomeSpec = Static<typeof Outcome>;
export type VariedSpec = Static<typeof Varied>;
export type SurvivalSpec = Static<typeof NamedSurvival>;
export type BreedingSpec = Static<typeof NamedBreeding>;
export type NamedCrowdingSpec = Static<typeof NamedCrowding>;
export type CatastropheSpec = Static<typeof Catastrophe>;
export type NamedSpec = CatastropheSpec | SurvivalSpec | BreedingSpec | DispersalSpec | CeilingSpec | NamedCrowdingSpec;

/** A model as its author wrote it, checked for shape only. `named` holds the phases that the study names itself. */
export type WrittenSpec = Static<typeof CoreSchema> & { readonly named: Readonly<Record<string, NamedSpec>> };

/** A model with what its data files hold in the place of their names. */
export type Spec = Omit<WrittenSpec, 'patches'> & { readonly patches: readonly InlinePatchSpec[] };
