// Factors: the numbers of a model (or its scenario) that a sweep changes, and the values they take.
import { pinned } from '../../machine/pinned.ts';
import { valueAt, type UncertainDistribution } from '../../model/uncertainty/distribution.ts';
import { normalQuantile } from '../../numeric/normal-quantile.ts';

/** Of a factor at a point; a scenario is named by a text. */
export type Value = number | string;

/** The values of one factor at points in a row; words where some of its values are none. */
export type FactorColumn = Float64Array<ArrayBuffer> | readonly Value[];

/** In the order of the factors. */
export type Columns = readonly FactorColumn[];

/** Of one point. */
export function columnsOfPoint(values: readonly Value[]): Columns {
  return values.map((value) => (typeof value === 'number' ? Float64Array.of(value) : [value]));
}

export type Range =
  | {
      readonly by: 'from to';
      readonly from: number;
      readonly to: number;
      readonly scale: 'even' | 'ratio';
      readonly steps: number;
    }
  | { readonly by: 'values'; readonly values: readonly Value[] }
  | { readonly by: 'how sure it is'; readonly distribution: UncertainDistribution; readonly steps: number };

export interface Factor {
  /** A named parameter, a place of the model such as `natal.leaving`, or `scenario`. */
  readonly name: string;
  readonly range: Range;
  /** In the model as it stands. */
  readonly base: Value;
}

/** 2^-33: no share of a distribution is 0 or 1. */
const tiny = 1 / 8589934592;

/** At a share of the range, from 0 to 1. */
export function valueAtShare({ range }: Factor, share: number): Value {
  switch (range.by) {
    case 'from to':
      return between(range, share);
    case 'values':
      return range.values[Math.min(range.values.length - 1, Math.floor(share * range.values.length))] ?? NaN;
    case 'how sure it is':
      return valueAt(range.distribution, normalQuantile(Math.min(1 - tiny, Math.max(tiny, share))));
  }
}

function between({ from, to, scale }: Extract<Range, { by: 'from to' }>, share: number): number {
  if (share <= 0) return from;
  if (share >= 1) return to;
  if (scale === 'even') return from + share * (to - from);
  const low = pinned.log(from);
  return pinned.exp(low + share * (pinned.log(to) - low));
}

/** The values of a grid: the ends and so many steps between; of a distribution the middles of shares of equal chance. */
export function levelsOf(factor: Factor): readonly Value[] {
  const { range } = factor;
  if (range.by === 'values') return range.values;
  const { steps } = range;
  if (range.by === 'how sure it is') {
    return Array.from({ length: steps }, (_, i) => valueAtShare(factor, (i + 0.5) / steps));
  }
  if (steps === 1) return [range.from];
  return Array.from({ length: steps }, (_, i) => valueAtShare(factor, i / (steps - 1)));
}

/** Values that are given one by one, the base among them. */
export function valuesOf({ base, range }: Factor): readonly Value[] {
  return range.by === 'values' ? [base, ...range.values] : [base];
}

/** Whether a factor has values that are no numbers. */
export function isText(factor: Factor): boolean {
  return valuesOf(factor).some((value) => typeof value === 'string');
}
