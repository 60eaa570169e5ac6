// A model with every name resolved, every default filled and one unit system (km, km², steps): what the compiler reads.
// Patches stand in the order of their names, those that a plan adds after all others, classes in the order of the spec. Index p is a patch, c a class.
import type { Outline, Point } from '../numeric/plane/point.ts';
import type { Catastrophe, Uncertainty, Variation } from './chance.ts';
import type { Phase } from './phase.ts';
import type { RateTable } from './rate-table.ts';

export type * from './phase.ts';
export type * from './rate-table.ts';

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
