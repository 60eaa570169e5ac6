// The phases of a year. Index p is a patch, c a class.
import type { DispersalKernel } from './kernel-shape.ts';
import type { PatchMatrices, RateTable } from './rate-table.ts';

interface PhaseBase {
  readonly name: string;
}

export interface CountPhase extends PhaseBase {
  readonly kind: 'count';
}
export interface BreedingPhase extends PhaseBase {
  readonly kind: 'breeding';
  /** Young of the counted sex for each animal, P×C. */
  readonly births: RateTable;
  /** Share of the young that enters each class; sums to 1. */
  readonly into: Float64Array;
  /** A ceiling under which the surplus waits: of the counted classes no more than the capacity breed, drawn at random. */
  readonly waits?: CeilingPhase;
  /** How the young of one animal vary; Poisson where it is missing. */
  readonly offspring?: Offspring;
  /** Where both sexes are followed. */
  readonly mating?: Mating;
}

/** Around a mean of m, the entry of `births`. */
export type Offspring =
  /** Up to `largest` young, each with chance m / largest. */
  | { readonly by: 'binomial'; readonly largest: number }
  /** Variance m + m²/size. */
  | { readonly by: 'negative binomial'; readonly size: number }
  /** By class the chances of 0, 1, 2, … young, null for a class that does not breed; each of them lives with chance m over their mean. */
  | { readonly by: 'table'; readonly chances: readonly (Float64Array | null)[] };

/** Scales all births of a patch by φ(F, M), with F and M the animals of these classes there at the start of the phase. */
export interface Mating {
  readonly form: 'female-dominant' | 'harmonic mean' | 'minimum';
  /** 1 for each class that counts. */
  readonly females: Uint8Array;
  readonly males: Uint8Array;
  /** h. */
  readonly femalesPerMale: number;
}
export interface SurvivalPhase extends PhaseBase {
  readonly kind: 'survival';
  readonly survival: RateTable;
}
export interface AgeingPhase extends PhaseBase {
  readonly kind: 'ageing';
  /** Share of class c that goes on to `next[c]`; the others stay. */
  readonly advance: Float64Array;
  /** The same by patch, P×C, where it is not the same in all. */
  readonly advanceIn?: Float64Array;
  /** Classes that last longer than a year; `advance` of the fixed ones is solved when the model is compiled. */
  readonly stages?: readonly StageDuration[];
  /** Class after c, or -1 where the animals leave the model. */
  readonly next: Int32Array;
}
/** A stage that lasts for so many years. */
export interface StageDuration {
  readonly class: number;
  readonly years: number;
  readonly as: 'fixed' | 'geometric';
}
export interface DemographyPhase extends PhaseBase {
  readonly kind: 'demography';
  readonly fates: PatchMatrices;
  readonly births: PatchMatrices;
}
export interface DispersalPhase extends PhaseBase, Ways {
  readonly kind: 'dispersal';
  /** Class c disperses in this phase. */
  readonly moves: Uint8Array;
  /** Share that sets out, P×C; where `shares` is given, the sum of the shares. */
  readonly leaving: RateTable;
  /** The rule and the links of each stretch of steps in which they are constant, where they change with the years. */
  readonly byYear?: { readonly epochs: readonly Ways[]; readonly epochOf: Int32Array };
}

/** Who of the leavers goes where; of a phase, in the first year. */
export interface Ways {
  readonly rule: DispersalRule;
  readonly links?: readonly Link[];
}

/** In every stretch of years in which they stay the same; the first alone where they always do. */
export interface WaysByYear {
  readonly first: Ways;
  readonly byYear?: { readonly epochs: readonly Ways[]; readonly epochOf: Int32Array };
}

/** Of those that take this way, in either direction, a share turns back and stays at home; of the others a share dies. */
export interface Link {
  /** Indices of two patches, the lower first. */
  readonly between: readonly [number, number];
  /** Null for the distance of all others. */
  readonly distanceKm: number | null;
  /** Factor of the distance, and what is added to it then; 1 and 0 where they are missing. */
  readonly distanceTimes?: number;
  readonly distanceAddKm?: number;
  readonly crossingDeath: number;
  readonly turnBack: number;
}
export type DispersalRule =
  | {
      readonly by: 'kernel';
      readonly kernel: DispersalKernel;
      /** Absent for the middles of the patches. */
      readonly between?: 'nearest edges';
      /** A factor of the weight of each target patch. */
      readonly attraction: Float64Array;
      readonly leavers: 'all arrive' | 'may miss';
      /** Areas of the patches where they differ from those of the first year. */
      readonly areaKm2?: Float64Array;
      readonly hazardPerKm: number;
      readonly survivalOnTheWay: number;
    }
  /** Share of the animals present in `from` that goes to `to`, at to * P + from. */
  | { readonly by: 'shares'; readonly shares: Float64Array };

export interface CeilingPhase extends PhaseBase {
  readonly kind: 'ceiling';
  readonly counted: Uint8Array;
  /** In the first year. */
  readonly capacity: Float64Array;
  /** One number a patch, where it changes with the years. */
  readonly capacityByYear?: RateTable;
  /** Where nobody is taken the surplus waits: see `waits` of a breeding. At random where it is missing. */
  readonly takes?: 'at random' | 'youngest first' | 'nobody';
}

interface HandledBase extends PhaseBase {
  /** At t − 1 whether it is done in step t; null for every step. */
  readonly active: Int32Array | null;
  /** 1 for each patch that animals come from (or, released, come to), and for each class. */
  readonly patches: Uint8Array;
  readonly classes: Uint8Array;
  /** P×C: numbers or shares. */
  readonly amounts: RateTable;
}

/** Animals wanted of each group: a number, a share of it, or a share of what exceeds a level. */
interface QuotaBase extends HandledBase {
  readonly rule: 'number' | 'share' | 'excess';
  /** All patches are one group, whose amount and level stand at patch 0; else each is one. */
  readonly together: boolean;
  /** Each class is a group of its own; else the amount stands at class 0. */
  readonly byClass: boolean;
  /** By patch. */
  readonly levels: Float64Array;
}
export interface TakePhase extends QuotaBase {
  readonly kind: 'take';
}
export interface MovePhase extends QuotaBase {
  readonly kind: 'move';
  readonly to: number;
  /** By class, of handling and of the first year, at once. */
  readonly survival: Float64Array;
  /** Of those that survive, the share that goes back to where it came from. */
  readonly homing: number;
}
export interface AddPhase extends HandledBase {
  readonly kind: 'add';
  /** By class. */
  readonly survival: Float64Array;
}

export type Phase =
  | CountPhase
  | BreedingPhase
  | SurvivalPhase
  | AgeingPhase
  | DemographyPhase
  | DispersalPhase
  | CeilingPhase
  | TakePhase
  | MovePhase
  | AddPhase;
