// What a run says, as data. These objects are printed by `--json` and read by the page; each carries its `format`.
import type { OutcomeEvent, OutcomeWords } from '../model/model.ts';

/** A 95 % interval with its name: what it does and does not account for. */
export interface Interval {
  readonly lower: number;
  readonly upper: number;
  readonly level: number;
  readonly method: string;
  readonly from: 'the number of runs' | 'what is not known';
}

/**
 * Why there is no interval from what is not known although it was drawn: its ends are not seen in so few draws; no number that is not
 * exactly known enters; the draws differ by no more than their numbers of runs explain.
 */
export type NoUnknown = 'too few draws' | 'nothing unknown' | 'within the noise';

export interface FromUnknown {
  /** From what is not known; null where it was not drawn, or says nothing. */
  readonly intervalFromUnknown: Interval | null;
  /** Absent where there is one, and where nothing was drawn. */
  readonly noUnknown?: NoUnknown;
}

export interface Chance extends FromUnknown {
  readonly probability: number;
  /** From the number of runs. */
  readonly interval: Interval;
}

export interface Quantiles {
  readonly '0.05': number;
  readonly '0.25': number;
  readonly '0.5': number;
  readonly '0.75': number;
  readonly '0.95': number;
}

export interface YearSummary {
  readonly year: number;
  readonly mean: number;
  readonly sd: number;
  readonly quantiles: Quantiles;
}

/** When an outcome comes first. */
export interface WhenFirst {
  /** Calendar year by which this share of all finished runs has come to it; null where fewer ever do. */
  readonly quantiles: Readonly<Record<keyof Quantiles, number | null>>;
  /** Years from the start to it, the mean over the runs that come to it; null where none does. */
  readonly meanYears: number | null;
}

export interface OutcomeResult {
  readonly name: string;
  readonly definition: string;
  readonly event: OutcomeEvent;
  /** Counts one after the other at which it must be so. */
  readonly counts: number;
  readonly words: OutcomeWords;
  readonly ever: Chance;
  readonly atEnd: Chance;
  readonly whenFirst: WhenFirst;
  readonly byYear: readonly {
    readonly year: number;
    /** Share of the runs that have come to it by this year, with a band that holds for the whole curve at once. */
    readonly ever: number;
    readonly lower: number;
    readonly upper: number;
    /** Share of the runs in which it is so in this year. */
    readonly now: number;
  }[];
}

/** Animals by year: taken; moved (caught); released. */
export interface HandledResult {
  /** Name of the phase. */
  readonly phase: string;
  readonly does: 'take' | 'move' | 'add';
  readonly byYear: readonly {
    readonly year: number;
    readonly handled: Amounts;
    /** Of those moved or released, the ones that did not live through it. */
    readonly died: Amounts;
    /** What was wanted and not there. */
    readonly shortfall: Amounts;
  }[];
  /** Over all years. */
  readonly inAll: { readonly handled: Amounts; readonly died: Amounts; readonly shortfall: Amounts };
}

export interface Amounts {
  readonly mean: number;
  readonly sd: number;
  readonly quantiles: Quantiles;
}

/** A count of the past. */
export interface ComparedCount {
  /** Null for all counted patches together, in the years in which each of them was counted. */
  readonly patch: string | null;
  readonly year: number;
  readonly animals: number;
  /** Against the band from the 0.05 to the 0.95 quantile; null where the year is none that the model runs through. */
  readonly lies: 'below' | 'within' | 'above' | null;
  /** Whether the 95 % interval of the count itself leaves the band, too; null where its error is not known. */
  readonly beyondError: boolean | null;
}

/** Counts of the past beside the same classes and patches in the runs. */
export interface ObservedResult {
  readonly classes: readonly string[];
  /** Standard error of a count as a share of it; null where it is not known. */
  readonly error: number | null;
  /** First of all counted patches together (`patch` is null), then of each. */
  readonly abundance: readonly { readonly patch: string | null; readonly byYear: readonly YearSummary[] }[];
  readonly counts: readonly ComparedCount[];
  /** Counts of single patches in years of the model, and those of them that lie outside the band. */
  readonly compared: number;
  readonly outside: number;
  readonly beyondError: number | null;
}

/** Quantiles that were read from counts in fixed bins, since there were too many to keep each. */
export interface Sketched {
  readonly quantilesOf: 'abundance.whole' | 'abundance.patches' | 'patchesInUse' | 'observed.abundance';
  /** Counts below this are exact all the same. */
  readonly exactBelow: number;
  /** How far a quantile of larger counts can be off, as a share of itself. */
  readonly relativeError: number;
}

/** One window of criterion E of the IUCN Red List, and what a run says of it; never a listing. */
export interface CriterionWindow {
  readonly category: 'Critically Endangered' | 'Endangered' | 'Vulnerable';
  readonly years: number;
  /** Of extinction within these years, at least. */
  readonly chance: number;
  /** With the band that holds for the whole curve; null where the run looks less far ahead. */
  readonly found: { readonly probability: number; readonly lower: number; readonly upper: number } | null;
  readonly says: 'consistent with' | 'not consistent with' | 'undecided' | 'looks less far ahead';
}

export interface CriterionE {
  /** The outcome that nobody is left anywhere. */
  readonly outcome: string;
  /** Mean age of mothers in the stable population near zero, in years. */
  readonly generationLength: number;
  readonly windows: readonly CriterionWindow[];
}

/** The chance of an outcome by splitting, for those too rare for plain runs; or why there is none. */
export interface RareResult {
  readonly outcome: string;
  readonly definition: string;
  /** Null where there is an estimate. */
  readonly reason: string | null;
  /** Of having ever come to it, as in plain runs. */
  readonly probability: number | null;
  readonly standardError: number | null;
  readonly interval: Interval | null;
  /** Of a rise `above`, else `below`; the threshold last, with the share of the trials from the level before that passed. */
  readonly levels: readonly { readonly below?: number; readonly above?: number; readonly passed: number }[];
  readonly repeats: number;
  /** Of each level in each repeat. */
  readonly trials: number;
  /** Years of replicates that it took, those of the pilot among them. */
  readonly replicateYears: number;
}

/** What a run that goes on until it is precise came to. */
export interface ReachedPrecision {
  /** Half the width of a 95 % interval from the number of runs: what was asked for, and the widest of any outcome. */
  readonly asked: number;
  readonly halfWidth: number;
  readonly reached: boolean;
  /** Replicates at which it would have ended without. */
  readonly atMost: number;
}

/** One draw of what is not known. */
export interface DrawRow {
  /** From 1. */
  readonly draw: number;
  readonly values: Readonly<Record<string, number>>;
  /** Why no model can have these values; null where it was run. */
  readonly failure: string | null;
  /** By outcome, the share of its runs that came to it; null where it was not run. */
  readonly ever: readonly (number | null)[];
}

export interface Draws {
  readonly number: number;
  readonly failed: number;
  readonly replicatesEach: number;
  readonly rows: readonly DrawRow[];
}

export interface RunResults {
  readonly format: 'skein-run/1';
  readonly tool: { readonly name: 'skein'; readonly version: string; readonly kernel: string };
  readonly model: string;
  /** SHA-256 of everything that decides the result. */
  readonly hash: string;
  readonly seed: number;
  readonly replicates: number;
  readonly years: number;
  /** Calendar year of step 1 and of the count that ends it; the start is the count of the year before. */
  readonly firstYear: number;
  readonly abundance: {
    readonly whole: readonly YearSummary[];
    readonly patches: readonly {
      readonly patch: string;
      readonly byYear: readonly YearSummary[];
      /** Share of the runs in which nobody is there, in the order of `byYear`; absent where it was not counted. */
      readonly empty?: readonly number[];
    }[];
  };
  readonly outcomes: readonly OutcomeResult[];
  /** What takes, moves and releases came to, in the order of the year. */
  readonly handled: readonly HandledResult[];
  readonly meanLowestCount: { readonly mean: number; readonly sd: number; readonly standardError: number };
  readonly patchesInUse: readonly { readonly year: number; readonly mean: number; readonly quantiles: Quantiles }[];
  /** Absent where the model gives no counts of the past. */
  readonly observed?: ObservedResult;
  /** Empty where every quantile is a count that some run had. */
  readonly sketched: readonly Sketched[];
  /** Where the model says how sure its numbers are, but no draws were asked for. */
  readonly notDrawn?: true;
  /** Absent where no outcome is that nobody is left anywhere. */
  readonly criterionE?: CriterionE;
  /** One an outcome; absent where it was not asked for. */
  readonly rare?: readonly RareResult[];
  /** Absent where no precision was asked for. */
  readonly precision?: ReachedPrecision;
  /** Draws of what is not known: absent where none were asked for. */
  readonly draws?: Draws;
  /** Runs that had to be stopped, with the reason; they are in no other number. */
  readonly stopped: { readonly runs: number; readonly reasons: readonly string[] };
  /** Where places are hidden: the hash then leaves them out. */
  readonly places?: 'shifted' | 'schematic';
  readonly cautions: readonly string[];
}

/** How numbers change in the long run near zero where years differ by chance. */
export interface LongRunGrowth {
  /** exp of `logGrowth`. */
  readonly growthRate: number;
  /** Mean yearly change of the natural logarithm of numbers (ln λ_s), and its standard error. */
  readonly logGrowth: number;
  readonly standardError: number;
  /** Variance that a year adds to the logarithm in the long run. */
  readonly yearlyVariance: number;
  /** That were simulated, all courses together. */
  readonly years: number;
}

/** Near zero, where neither crowding nor ceilings matter, with the rates of the first year. */
export interface PathGrowth {
  /** Of a year in which everything that varies is at its mean. */
  readonly withoutChance: number;
  readonly withChance: LongRunGrowth | null;
  /** Why there is none; null where there is one. */
  readonly reason: string | null;
}

export interface PathResults {
  readonly format: 'skein-path/1';
  readonly tool: { readonly name: 'skein'; readonly version: string; readonly kernel: string };
  readonly model: string;
  readonly hash: string;
  readonly years: number;
  /** Calendar year of step 1 and of the count that ends it; the start is the count of the year before. */
  readonly firstYear: number;
  readonly abundance: readonly {
    readonly year: number;
    readonly patch: string;
    readonly class: string;
    readonly animals: number;
  }[];
  readonly growth: PathGrowth;
  /** Where places are hidden: the hash then leaves them out. */
  readonly places?: 'shifted' | 'schematic';
  readonly cautions: readonly string[];
}
