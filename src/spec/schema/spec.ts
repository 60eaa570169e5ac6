// The whole language. The published schema, the types, the checks and the reference in the README all come from here.
import * as Type from 'typebox';
import type { Static } from 'typebox';
import { Actions, Scenarios, type Action } from './actions.ts';
import { Money } from './cost.ts';
import type { Effect } from './effect.ts';
import { Mating, Offspring } from './breeding.ts';
import { Classes, Duration, Oldest } from './classes.ts';
import { Catastrophe } from './catastrophe.ts';
import { Add, Move, Take } from './handling.ts';
import { Drivers, Observed } from './history.ts';
import { Outcomes, Run, Start, type Outcome } from './outcomes.ts';
import { Parameters, Patches, type InlinePatch, type PatchFileRef } from './patches.ts';
import { Ceiling, Crowding, Dispersal, NamedCrowding } from './phases.ts';
import { Births, Demography, InPatches, NamedBreeding, NamedSurvival, Survival } from './rates.ts';
import type { ScheduleRef } from './schedule.ts';
import { Study } from './study.ts';
import { Sweep } from './sweep.ts';
import type { UnsureRef } from './unsure.ts';
import { type Uncertain, Uncertainty } from './uncertainty.ts';
import { fileName, Name, type FileRef } from './values.ts';
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
    duration: Type.Optional(Duration),
    parameters: Type.Optional(Parameters),
    survival: Type.Optional(Survival),
    births: Type.Optional(Births),
    offspring: Type.Optional(Offspring),
    mating: Type.Optional(Mating),
    demography: Type.Optional(Demography),
    in: Type.Optional(InPatches),
    rates: Type.Optional(
      fileName({
        description:
          'A CSV file with the columns patch and class, and a column a rate (survival, births, or a phase of your own): one row a patch and class.',
        examples: ['rates.csv'],
      }),
    ),
    drivers: Type.Optional(Drivers),
    year: Type.Array(Name, {
      minItems: 1,
      title: 'a list of phases',
      description:
        'What happens in a year, in order: `count`, `breeding`, `survival`, `ageing`, `demography`, and phases of your own names.',
      examples: ['[count, breeding, survival, natal, ageing]'],
    }),
    crowding: Type.Optional(Crowding),
    variation: Type.Optional(Variation),
    uncertainty: Type.Optional(Uncertainty),
    start: Start,
    observed: Type.Optional(Observed),
    outcomes: Type.Optional(Outcomes),
    money: Type.Optional(Money),
    actions: Type.Optional(Actions),
    scenarios: Type.Optional(Scenarios),
    run: Type.Optional(Run),
    sweep: Type.Optional(Sweep),
  },
  { additionalProperties: false },
);

export const namedSchemas = {
  survival: NamedSurvival,
  breeding: NamedBreeding,
  dispersal: Dispersal,
  ceiling: Ceiling,
  crowding: NamedCrowding,
  catastrophe: Catastrophe,
  take: Take,
  move: Move,
  add: Add,
} as const;

export type InlinePatchSpec = Inline<Static<typeof InlinePatch>>;
export type DispersalSpec = Inline<Static<typeof Dispersal>>;
export type CeilingSpec = Inline<Static<typeof Ceiling>>;
export type CrowdingSpec = Inline<Static<typeof Crowding>>;
export type OutcomeSpec = Inline<Static<typeof Outcome>>;
export type SweepSpec = Inline<Static<typeof Sweep>>;
export type UncertainSpec = Inline<Static<typeof Uncertain>>;
export type VariedSpec = Inline<Static<typeof Varied>>;
export type SurvivalSpec = Inline<Static<typeof NamedSurvival>>;
export type BreedingSpec = Inline<Static<typeof NamedBreeding>>;
export type NamedCrowdingSpec = Inline<Static<typeof NamedCrowding>>;
export type CatastropheSpec = Inline<Static<typeof Catastrophe>>;
export type TakeSpec = Inline<Static<typeof Take>>;
export type MoveSpec = Inline<Static<typeof Move>>;
export type AddSpec = Inline<Static<typeof Add>>;
export type EffectSpec = Inline<Static<typeof Effect>>;
export type ActionSpec = Inline<Static<typeof Action>>;
export type NamedSpec =
  | CatastropheSpec
  | SurvivalSpec
  | BreedingSpec
  | DispersalSpec
  | CeilingSpec
  | NamedCrowdingSpec
  | TakeSpec
  | MoveSpec
  | AddSpec;

/** A model as its author wrote it, checked for shape only. `named` holds the phases that the study names itself. */
type WrittenSpec = Static<typeof CoreSchema> & { readonly named: Readonly<Record<string, NamedSpec>> };

/** Without the names of files, with schedules as the expressions that they stand for, and unsure numbers as names of parameters. */
type Inline<Value> = Value extends FileRef | PatchFileRef | ScheduleRef | UnsureRef
  ? never
  : Value extends object
    ? { [Key in keyof Value]: Inline<Value[Key]> }
    : Value;

/** A model with what its data files hold in the place of their names. */
export type Spec = Inline<Omit<WrittenSpec, 'rates'>>;
