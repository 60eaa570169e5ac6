// What a comparison says, as data: printed by `--json` and read by the page.
import type {
  CriterionE,
  Chance,
  FromUnknown,
  Interval,
  NoUnknown,
  Quantiles,
  ReachedPrecision,
  RunResults,
} from '../results/results.ts';
import type { Better } from './best.ts';
import type { PairedCounts } from './paired-share.ts';
import type { PlanAction } from './plan.ts';

/** Over futures; the spread is null for a single one. */
export interface Amount {
  readonly mean: number;
  readonly sd: number | null;
}

export interface AmountWithRange extends Amount {
  readonly quantiles: Quantiles;
}

/** Shares from 0 to 1: with other futures of the same number, and over the draws of what is not known. */
export interface OverBoth {
  readonly runs: number;
  /** Null where nothing was drawn. */
  readonly draws: number | null;
}

/** The mean over the futures, and how far these lie apart. */
export interface PlanCost {
  readonly presentValue: number;
  readonly presentValueSd: number | null;
  readonly undiscounted: number;
  readonly undiscountedSd: number | null;
  /** Present value at the lower and at the upper ends of prices that are ranges. */
  readonly least: number;
  readonly most: number;
}

export interface PlanOutcome {
  readonly name: string;
  readonly definition: string;
  /** Of having happened at some count. */
  readonly probability: number;
  readonly intervals: {
    readonly runs: Interval;
    readonly unknown: Interval | null;
    /** Why there is none, where it was drawn. */
    readonly noUnknown?: NoUnknown;
  };
  readonly atEnd: Chance;
}

/** Money for each unit of chance bettered (less of what is feared, more of what is hoped for), against the first plan. */
export interface RiskPrice {
  readonly outcome: string;
  /** Null where the plan betters no chance for sure, or costs no more. */
  readonly costPerRisk: { readonly estimate: number; readonly lower: number; readonly upper: number } | null;
  readonly why: 'priced' | 'no reliable gain' | 'costs no more';
}

export interface ComparedPlan {
  readonly name: string;
  readonly actions: readonly PlanAction[];
  /** Null where the model knows no money. */
  readonly cost: PlanCost | null;
  readonly outcomes: readonly PlanOutcome[];
  readonly animalsAtEnd: AmountWithRange;
  readonly meanLowestCount: number;
  /** Over all years; null where nothing is taken in any plan. */
  readonly animalsTaken: Amount | null;
  /** How the mean count changes a year over the last fifth of the years. */
  readonly changeAtEnd: number;
  /** No other plan is at least as good in every objective and better in one. */
  readonly notBeaten: boolean;
  /** Chance that some plan is. */
  readonly beaten: OverBoth;
  readonly prices: readonly RiskPrice[];
  readonly handled: RunResults['handled'];
  /** Where an outcome is that nobody is left anywhere; plans change how long a generation is, and so the windows. */
  readonly criterionE?: CriterionE;
}

export interface PlanDifference extends FromUnknown {
  /** Name of the objective. */
  readonly outcome: string;
  readonly of: 'chance' | 'animals' | 'money';
  readonly from: string;
  readonly to: string;
  /** Under `to` less under `from`. */
  readonly estimate: number;
  readonly interval: Interval;
  readonly method: string;
  /** Of money where prices are ranges: between which amounts the difference lies with every price anywhere in its range; else null. */
  readonly prices: { readonly lower: number; readonly upper: number } | null;
  /** Futures by what became of them under the two; null for amounts. */
  readonly futures: PairedCounts | null;
  /** No interval holds 0, nor does what few draws were seen of that from what is not known. */
  readonly toldApart: boolean;
}

export interface BestPlan {
  readonly outcome: string;
  readonly scenario: string;
  /** Chance of being best with other futures of the same number; plans that are equally good share it. */
  readonly probability: number;
  /** Share of the draws in which it is; null where nothing was drawn. */
  readonly probabilityOverDraws: number | null;
}

/** A patch under a plan against the first plan. */
export interface PatchChange {
  readonly patch: string;
  readonly scenario: string;
  /** Animals at the last count, more or less, with its 95 % interval. */
  readonly animals: { readonly estimate: number; readonly lower: number; readonly upper: number };
  /** Chance of standing empty at some count, under the first plan and under this one. */
  readonly everEmpty: { readonly before: number; readonly after: number };
  /** The difference of these chances. */
  readonly everEmptyChange: { readonly estimate: number; readonly lower: number; readonly upper: number };
}

/** What a move does to where it takes its animals from. */
export interface SourceRisk {
  readonly scenario: string;
  readonly action: string;
  readonly source: string;
  readonly change: PatchChange;
  /** Animals that 95 of 100 futures without the plan still count there in the first year of the move; a floor for stopping. */
  readonly stopBelow: number;
  readonly year: number;
}

export interface Robustness {
  readonly variant: string;
  readonly what: string;
  /** Why it was not run; null where it was. */
  readonly notRun: string | null;
  /** Plans by the first objective, the best first; empty where it was not run. */
  readonly order: readonly string[];
  /** Plans that the rule of the statement leaves here; empty where it supports none over the first. */
  readonly supports: readonly string[];
  /** Every pair of plans that the model tells apart stands the same way round; null where it was not run. */
  readonly holds: boolean | null;
  /** Pairs that do not: better here, worse here; or equal. */
  readonly reversed: readonly {
    readonly better: string;
    readonly worse: string;
    readonly toldApart: boolean;
    readonly equal: boolean;
  }[];
}

export type Strength = 'clear' | 'limited' | 'none';

export interface Statement {
  /** One sentence. */
  readonly text: string;
  /** What stands against it, in sentences. */
  readonly reservations: readonly string[];
  readonly rule: string;
  readonly strength: Strength;
  /** Plans that the rule leaves. */
  readonly plans: readonly string[];
}

export interface ObjectiveWords {
  readonly name: string;
  readonly definition: string;
  readonly of: 'chance' | 'animals' | 'money';
  /** Null where neither is better by itself. */
  readonly better: Better | null;
  /** It counts for being beaten: in all risks and in cost. */
  readonly decides: boolean;
}

export interface Comparison {
  readonly format: 'skein-compare/1';
  readonly tool: RunResults['tool'];
  readonly model: string;
  readonly hash: string;
  readonly seed: number;
  readonly replicates: number;
  readonly years: number;
  readonly firstYear: number;
  readonly money: { readonly currency: string; readonly priceYear: number | null; readonly discount: number } | null;
  readonly objectives: readonly ObjectiveWords[];
  readonly scenarios: readonly ComparedPlan[];
  readonly differences: readonly PlanDifference[];
  readonly best: readonly BestPlan[];
  readonly patches: readonly PatchChange[];
  readonly sources: readonly SourceRisk[];
  /** Empty where it was not asked for. */
  readonly robustness: readonly Robustness[];
  readonly statement: Statement;
  /** What is and is not said of the time after the last year. */
  readonly afterHorizon: string;
  readonly notDrawn?: true;
  readonly draws?: { readonly number: number; readonly failed: number; readonly replicatesEach: number };
  /** How sharp the differences of chances came to be, where it was asked for. */
  readonly precision?: ReachedPrecision;
  readonly stopped: RunResults['stopped'];
  readonly cautions: readonly string[];
}
