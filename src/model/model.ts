// A model with every name resolved, every default filled and one unit system (km, km², steps): what the compiler reads.
// Patches stand in the order of their names, classes in the order of the spec. Index p is a patch, c a class.
import type { Outline, Point } from '../numeric/plane/point.ts';
import type { Catastrophe, Uncertainty, Variation } from './chance.ts';
import type { DispersalKernel } from './kernel-shape.ts';

export interface Patch {
  readonly name: string;
  /** Kilometres on the plane; where places are degrees, on a plane that is good for drawing only. */
  readonly at: readonly [number, number] | null;
  /** Longitude and latitude on WGS84, where places are given so. */
  readonly degrees?: Point;
  /** Polygons with their holes on the same plane as `at`; absent where the patch is a point. */
  readonly outline?: Outline;
  /** The outline in degrees, where it is given so. */
  readonly degreesOutline?: Outline;
  /** In the first year. */
  readonly areaKm2: number | null;
  /** In the first year. */
  readonly capacity: number | null;
  /** The calendar years in which there is this patch, where it comes or goes. */
  readonly exists?: { readonly from?: number | undefined; readonly until?: number | undefined };
  /** Position in the author's list, for printing. */
  readonly fileOrder: number;
}

/** One number a patch and class, at p * classes + c, for each stretch of steps in which it is constant. */
export interface RateTable {
  readonly epochs: readonly Float64Array[];
  /** Index into `epochs` for step t (1-based) at t - 1; empty where there is one epoch. */
  readonly epochOf: Int32Array;
  /** For each number of a table what it was written as, where that is an expression. */
  readonly written?: readonly (WrittenNumber | null)[];
}

export interface WrittenNumber {
  readonly expression: number | string;
  readonly path: readonly (string | number)[];
  readonly what: string;
}

/** One C×C matrix a patch, at p * C * C + to * C + from. */
export type PatchMatrices = RateTable;

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

/** Which part of a phase a condition scales. */
export type RatePart = 'survival' | 'births' | 'fates';

/**
 * A condition: a multiplier g(N) in each patch, read once at the start of the first phase that it changes and applied to
 * every rate it names. N = Σ weight[c] · n[p, c].
 */
export interface Crowding {
  readonly name: string;
  /** `allee`: only the Allee factor acts, and there is no capacity (NaN). */
  readonly form: 'beverton-holt' | 'ricker' | 'theta' | 'hassell' | 'allee';
  /** Of the forms that have one. */
  readonly shapeNumber?: number;
  readonly counted: Float64Array;
  /** Rates by phase (an index into `phases`), part and class. */
  readonly changes: readonly { readonly phase: number; readonly part: RatePart; readonly classes: Uint8Array }[];
  /** In the first year. */
  readonly capacity: Float64Array;
  /** One number a patch, where it changes with the years. */
  readonly capacityByYear?: RateTable;
  /** Half-saturation of the Allee factor N / (N + h) in each patch; 0 where there is none. */
  readonly alleeHalf: Float64Array;
  readonly whereDeclining: 'none' | 'ceiling' | { readonly as: number } | null;
}

/** What must be so at a count, and at how many counts one after the other. All comparisons are strict but that of `fallen`. */
export type OutcomeEvent =
  | { readonly is: 'below' | 'above'; readonly than: number }
  /** By this share of the count at the start, or more. */
  | { readonly is: 'fallen'; readonly by: number };

export interface OutcomeRule {
  readonly name: string;
  /** By class; two where the count is that of the scarcer sex, each with the weights of one sex. */
  readonly weights: readonly Float64Array[];
  /** 1 for each patch that counts. */
  readonly patches: Uint8Array;
  /** The sum over the patches, the largest count of a patch, or the smallest. */
  readonly over: 'sum' | 'largest' | 'smallest';
  readonly event: OutcomeEvent;
  /** Counts one after the other at which it must be so. */
  readonly counts: number;
  /** In words, from the rule itself. */
  readonly definition: string;
  readonly words: OutcomeWords;
}

/** To be put behind 'having' or 'have', and behind 'being' or 'are'. */
export interface OutcomeWords {
  readonly happened: string;
  readonly now: string;
}

export type Sex = 'female' | 'male';

export interface NamedNumber {
  readonly name: string;
  readonly value: number;
  readonly expression: string;
  readonly source: string | null;
  readonly basis: string | null;
}

/** What was counted in the past; the patch is an index, the year a calendar year. */
export interface ObservedCounts {
  readonly counts: readonly { readonly patch: number; readonly year: number; readonly animals: number }[];
  /** 1 for each class that the counts hold. */
  readonly of: Uint8Array;
  /** Standard error of a count as a share of it; null where it is not known. */
  readonly error: number | null;
}

/** A run goes on until its chances are known so well. */
export interface Precision {
  /** Half the width of the 95 % interval from the number of runs. */
  readonly halfWidth: number;
  /** Replicates of all draws together after which it ends all the same. */
  readonly atMost: number;
}

export interface Model {
  readonly title: string;
  readonly question: string | null;
  readonly by: string | null;
  readonly madeFor: string | null;
  readonly date: string | null;
  readonly status: string | null;
  readonly invented: boolean;
  /** Calendar year of step 1 and of the count that ends it; the start is the count of the year before. */
  readonly firstYear: number;
  readonly steps: number;
  readonly counts: 'females' | 'both sexes';
  readonly oldest: 'open-ended' | 'terminal' | null;
  readonly patches: readonly Patch[];
  readonly classes: readonly string[];
  /** By class; missing where the sexes are not told apart. */
  readonly sexes?: readonly Sex[];
  readonly parameters: readonly NamedNumber[];
  /** From one count to the next: the phases after `count` in the author's list, then those before it, `count` last. */
  readonly phases: readonly Phase[];
  /** The year as its author wrote it. */
  readonly year: readonly string[];
  readonly crowding: readonly Crowding[];
  readonly catastrophes: readonly Catastrophe[];
  /** Null where every number is taken as known. */
  readonly uncertainty: Uncertainty | null;
  /** Draws of what is not known; 0 for the numbers as they are. */
  readonly draws: number;
  /** Null where no rate varies from year to year. */
  readonly variation: Variation | null;
  /** Whole animals, P×C. */
  readonly start: StartRule;
  /** Absent where none are given. */
  readonly observed?: ObservedCounts;
  readonly outcomes: readonly OutcomeRule[];
  readonly replicates: number;
  /** Absent where just the replicates are run. */
  readonly precision?: Precision | undefined;
  /** Whether chances are estimated by splitting, too. */
  readonly rare?: true | undefined;
  readonly seed: number;
  /** Every default that was used, in words. */
  readonly defaults: readonly string[];
}

/** How the animals at count 0 are given; a stable spread needs the compiled matrix. */
export type StartRule =
  | { readonly by: 'table'; readonly animals: Float64Array }
  | { readonly by: 'total'; readonly total: number; readonly spread: 'stable within patch' | 'stable over all' }
  | {
      readonly by: 'counted';
      readonly counted: Float64Array;
      readonly of: Uint8Array;
      readonly rest: 'stable within patch' | 'none';
    };
