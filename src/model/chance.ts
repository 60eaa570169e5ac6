// What chance does beside the draws of single animals: years that differ, and catastrophes.
import type { DenseMatrix } from '../numeric/sparse.ts';
import type { VariedShape } from './variation/shape.ts';
import type { UncertainDistribution } from './uncertainty/distribution.ts';
import type { Ast } from '../spec/expression/ast.ts';

/** One number a patch, for each stretch of steps in which it is constant. */
export interface PatchNumbers {
  readonly epochs: readonly Float64Array[];
  /** Index into `epochs` for step t (1-based) at t - 1; empty where there is one epoch. */
  readonly epochOf: Int32Array;
}

/** Parts of a phase that a condition scales by class; `leaving` is the share that sets out in a dispersal. */
export type ScaledPart = 'survival' | 'births' | 'fates' | 'leaving';

/** The rate of a class in a phase (an index into the phases of the model). */
export interface ScaledRate {
  readonly phase: number;
  readonly part: ScaledPart;
  readonly class: number;
}

/** A rate of a class, or a named parameter, that differs from year to year. */
export interface Varied {
  /** Such as `survival of adult`, or the name of the parameter. */
  readonly name: string;
  readonly of: ({ readonly kind: 'rate' } & ScaledRate) | { readonly kind: 'parameter' };
  readonly shape: VariedShape;
  /** On the scale of the number; where the SD is 0 it does not vary. */
  readonly mean: PatchNumbers;
  readonly sd: PatchNumbers;
}

/** A rate that is an expression over parameters that vary, or over resampled drivers: it is worked out anew every year. */
export interface Response extends ScaledRate {
  readonly name: string;
  /** Over varied parameters, drivers, attributes of the patch and `year`. */
  readonly expression: Ast;
  /** Patches in which the rate is this expression. */
  readonly patches: readonly number[];
  /** Its value at the means of the parameters, averaged over resampled years, in these patches; 0 elsewhere. */
  readonly base: PatchNumbers;
  readonly bounds: 'share' | 'from zero';
}

/** Correlation of underlying normal numbers. */
export interface Correlation {
  /** One number for all pairs, or a matrix in the order of the names. */
  readonly of: number | DenseMatrix;
  /** How far (root of the sum of squared changes) an impossible table was moved to the nearest possible one; 0 for not. */
  readonly repaired: number;
}

/** Drivers of which every year of the model has those of a given year, each given year with the same chance. */
export interface Resampled {
  /** In their order. */
  readonly names: readonly string[];
  /** Calendar years of the values. */
  readonly years: readonly number[];
  /** Of driver d in given year y at d · years + y. */
  readonly values: Float64Array;
}

export interface Variation {
  readonly resampled: Resampled | null;
  /** Of each driver that responses read and that follows the calendar, its values, one a step. */
  readonly dated: ReadonlyMap<string, Float64Array>;
  /** In the order of their names. */
  readonly varied: readonly Varied[];
  readonly responses: readonly Response[];
  readonly betweenRates: Correlation;
  /** By distance it is exp(−distance / range); the landscape has the distances. */
  readonly betweenPatches: Correlation | { readonly rangeKm: number };
  readonly autocorrelation: number;
  /** Values of the attributes that the responses read, by patch. */
  readonly attributes: ReadonlyMap<string, Float64Array>;
}

/** What a rate is multiplied by where a catastrophe is on. */
export interface MultipliedRate extends ScaledRate {
  readonly times: number;
}

/** A rare event, bad or good. All its times are steps. */
export interface Catastrophe {
  readonly name: string;
  /** A step: that one begins in a given patch, or somewhere in the landscape. */
  readonly chance: number;
  readonly over: 'patch' | 'landscape';
  /** The chance as it was given, of at least one in so many years; absent where it was given a year. */
  readonly stated?: { readonly chance: number; readonly years: number };
  /** Patches in which it can begin. */
  readonly origins: readonly number[];
  readonly reach: 'everywhere' | 'one patch' | { readonly radiusKm: number };
  readonly multiplies: readonly MultipliedRate[];
  readonly lasts: number;
  /** From one beginning to the next at least; never less than it lasts. */
  readonly wait: number;
  readonly capacity: { readonly times: number; readonly steps: number } | null;
}

/** A parameter that is not exactly known. */
export interface Uncertain {
  readonly name: string;
  /** What is used where nothing is drawn. */
  readonly value: number;
  readonly distribution: UncertainDistribution;
}

export interface Uncertainty {
  /** In the order of their names. */
  readonly parameters: readonly Uncertain[];
  readonly correlation: Correlation;
  /** Draws of the author's own, instead of distributions. */
  readonly table: readonly Readonly<Record<string, number>>[] | null;
}
