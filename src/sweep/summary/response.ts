// How a measure answers one factor: its mean and spread at each value, or in slices of equally many points.
import { ascendingOrder } from '../../numeric/order.ts';
import type { Value } from '../design/factor.ts';

export interface ResponseGroup {
  /** The value, or the least and greatest of the slice. */
  readonly from: Value;
  readonly to: Value;
  readonly points: number;
  readonly mean: number;
  /** Values that 5 and 95 % of the points do not exceed: what the other factors do. */
  readonly lower: number;
  readonly upper: number;
  /** Of a difference from runs, the share of the points that tell it from 0; absent of all else. */
  readonly told?: number;
}

export interface Response {
  readonly groups: readonly ResponseGroup[];
  /** Share of the variance of the measure that lies between the groups; of sampled points, less what chance alone would put there. */
  readonly explained: number | null;
}

const mostValues = 60;
const usualSlices = 20;
/** Points of a sampled design that a group holds at least, so that its mean is not that of one point's other numbers. */
const fewestInSlice = 5;

export interface RowsAsked {
  readonly rows: readonly number[];
  /** Whether the other numbers differ between the points by chance: those of a grid are balanced, and one at a time they stay. */
  readonly sampled: boolean;
}

export interface ResponseAsked extends RowsAsked {
  /** By point, 0 where a difference is not told from 0. */
  readonly told?: Int8Array;
}

/** Over the points `rows`; those without a measure are left out. */
export function responseTo(
  values: Float64Array | readonly string[],
  measure: Float64Array,
  { rows, sampled, told }: ResponseAsked,
): Response {
  const known = rows.filter((row) => !Number.isNaN(measure[row] ?? NaN));
  const groups = groupsOf(values, { rows: known, sampled });
  return {
    groups: groups.map((own) => {
      const group = groupOf(values, measure, own);
      if (told === undefined) return group;
      return { ...group, told: own.filter((row) => told[row] !== 0).length / own.length };
    }),
    explained: explainedBy(groups, measure, sampled),
  };
}

/** Rows by value, or in slices of equally many where there are many values, or too few points a value to say anything of it. */
export function groupsOf(
  values: Float64Array | readonly string[],
  { rows, sampled }: RowsAsked,
  slices = usualSlices,
): readonly (readonly number[])[] {
  const byValue = new Map<Value, number[]>();
  for (const row of rows) {
    const value = values[row] ?? NaN;
    const own = byValue.get(value);
    if (own !== undefined) own.push(row);
    else if (byValue.size < mostValues) byValue.set(value, [row]);
    else return slicesOf(values, rows, slices);
  }
  if (sampled && values instanceof Float64Array && rows.length < 2 * byValue.size)
    return slicesOf(values, rows, Math.min(slices, Math.max(1, Math.floor(rows.length / fewestInSlice))));
  const all = [...byValue.entries()];
  if (values instanceof Float64Array) all.sort(([a], [b]) => Number(a) - Number(b));
  return all.map(([, own]) => own);
}

function slicesOf(
  values: Float64Array | readonly string[],
  rows: readonly number[],
  slices: number,
): readonly (readonly number[])[] {
  const keys = new Float64Array(rows.length);
  for (let i = 0; i < keys.length; i++) keys[i] = Number(values[rows[i] ?? 0]);
  const order = ascendingOrder(keys);
  const sorted = new Array<number>(order.length);
  for (let i = 0; i < order.length; i++) sorted[i] = rows[order[i] ?? 0] ?? 0;
  return Array.from({ length: slices }, (_, s) =>
    sorted.slice(Math.round((s * sorted.length) / slices), Math.round(((s + 1) * sorted.length) / slices)),
  );
}

function groupOf(
  values: Float64Array | readonly string[],
  measure: Float64Array,
  rows: readonly number[],
): ResponseGroup {
  const sorted = measuredAt(measure, rows).sort();
  const at = (share: number): number => {
    const place = share * (sorted.length - 1);
    const [low = NaN, high = low] = [sorted[Math.floor(place)], sorted[Math.ceil(place)]];
    return low + (place - Math.floor(place)) * (high - low);
  };
  const [first = 0, last = first] = [rows[0], rows.at(-1)];
  return {
    from: values[first] ?? NaN,
    to: values[last] ?? NaN,
    points: rows.length,
    mean: meanOf(sorted),
    lower: at(0.05),
    upper: at(0.95),
  };
}

function measuredAt(measure: Float64Array, rows: readonly number[]): Float64Array {
  const values = new Float64Array(rows.length);
  for (let i = 0; i < values.length; i++) values[i] = measure[rows[i] ?? 0] ?? NaN;
  return values;
}

function meanOf(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/**
 * Between / total; of sampled points ε² (Kelley 1935), (between − (g − 1) · within mean square) / total. Null with fewer than two
 * groups, or with a point in each.
 */
function explainedBy(groups: readonly (readonly number[])[], measure: Float64Array, sampled: boolean): number | null {
  const n = groups.reduce((sum, own) => sum + own.length, 0);
  if (groups.length < 2 || n <= groups.length) return null;
  const values = groups.map((own) => measuredAt(measure, own));
  const mean = values.reduce((sum, own) => sum + meanOf(own) * own.length, 0) / n;
  let [between, within] = [0, 0];
  for (const own of values) {
    const middle = meanOf(own);
    between += own.length * (middle - mean) * (middle - mean);
    for (const value of own) within += (value - middle) * (value - middle);
  }
  const total = between + within;
  if (!(total > 0)) return null;
  const byChance = sampled ? ((groups.length - 1) * within) / (n - groups.length) : 0;
  return Math.min(1, Math.max(0, (between - byChance) / total));
}

/** Values of a factor at which the mean of the groups goes through a level, between neighbours by a straight line. */
export function crossings({ groups }: Response, level: number): readonly number[] {
  return groups.flatMap((group, i) => {
    const before = groups[i - 1];
    if (before === undefined || typeof group.from !== 'number' || typeof before.from !== 'number') return [];
    const [low, high] = [before.mean - level, group.mean - level];
    if (!(low * high < 0) && !(low === 0 && high !== 0)) return [];
    const [x0, x1] = [(before.from + Number(before.to)) / 2, (group.from + Number(group.to)) / 2];
    return [x0 + (x1 - x0) * (low / (low - high))];
  });
}
