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
  /** Ascending. */
  readonly rows: Uint32Array;
  /** Whether the other numbers differ between the points by chance: those of a grid are balanced, and one at a time they stay. */
  readonly sampled: boolean;
  /** Of a whole column: `openOrders`. */
  readonly orderOf: (values: Float64Array) => Uint32Array;
}

/** The ascending order of a column, worked out once for all that ask for it. */
export function openOrders(): RowsAsked['orderOf'] {
  const known = new Map<Float64Array, Uint32Array>();
  return (values) => {
    const order = known.get(values) ?? ascendingOrder(values);
    known.set(values, order);
    return order;
  };
}

export interface ResponseAsked extends RowsAsked {
  /** By point, 0 where a difference is not told from 0. */
  readonly told?: Int8Array;
}

/** Over the points `rows`; those without a measure are left out. */
export function responseTo(
  values: Float64Array | readonly string[],
  measure: Float64Array,
  { rows, sampled, orderOf, told }: ResponseAsked,
): Response {
  const known = knownRows(rows, measure);
  const groups = groupsOf(values, { rows: known, sampled, orderOf });
  const measured = measuredIn(groups, measure, orderOf);
  return {
    groups: groups.map((own, g) => {
      const group = groupOf(values, own, measured[g] ?? new Float64Array(0));
      if (told === undefined) return group;
      return { ...group, told: own.filter((row) => told[row] !== 0).length / own.length };
    }),
    explained: explainedBy(measured, sampled),
  };
}

function knownRows(rows: Uint32Array, measure: Float64Array): Uint32Array {
  let missing = 0;
  for (let i = 0; i < rows.length; i++) if (Number.isNaN(measure[rows[i] ?? 0])) missing++;
  return missing === 0 ? rows : rows.filter((row) => !Number.isNaN(measure[row]));
}

/** Rows by value, or in slices of equally many where there are many values, or too few points a value to say anything of it. */
export function groupsOf(
  values: Float64Array | readonly string[],
  { rows, sampled, orderOf }: RowsAsked,
  slices = usualSlices,
): readonly Uint32Array[] {
  const byValue = new Map<Value, number[]>();
  for (let i = 0; i < rows.length; i++) {
    const row = rows[i] ?? 0;
    const value = values[row] ?? NaN;
    const own = byValue.get(value);
    if (own !== undefined) own.push(row);
    else if (byValue.size < mostValues || !(values instanceof Float64Array)) byValue.set(value, [row]);
    else return slicesOf(ordered(values, rows, orderOf), slices);
  }
  if (sampled && values instanceof Float64Array && rows.length < 2 * byValue.size) {
    const most = Math.min(slices, Math.max(1, Math.floor(rows.length / fewestInSlice)));
    return slicesOf(ordered(values, rows, orderOf), most);
  }
  const all = [...byValue.entries()];
  if (values instanceof Float64Array) all.sort(([a], [b]) => Number(a) - Number(b));
  return all.map(([, own]) => Uint32Array.from(own));
}

/** Rows from the least value to the greatest. */
function ordered(values: Float64Array, rows: Uint32Array, orderOf: RowsAsked['orderOf']): Uint32Array {
  const order = orderOf(values);
  if (rows.length === values.length) return order;
  const wanted = new Uint8Array(values.length);
  for (const row of rows) wanted[row] = 1;
  return order.filter((row) => wanted[row] === 1);
}

function slicesOf(sorted: Uint32Array, slices: number): readonly Uint32Array[] {
  return Array.from({ length: slices }, (_, s) =>
    sorted.subarray(Math.round((s * sorted.length) / slices), Math.round(((s + 1) * sorted.length) / slices)),
  );
}

/** The measure in each group, ascending: on one way through the order of all of it. */
function measuredIn(
  groups: readonly Uint32Array[],
  measure: Float64Array,
  orderOf: RowsAsked['orderOf'],
): readonly Float64Array[] {
  const of = new Int32Array(measure.length).fill(-1);
  groups.forEach((own, g) => {
    for (let i = 0; i < own.length; i++) of[own[i] ?? 0] = g;
  });
  const measured = groups.map((own) => new Float64Array(own.length));
  const filled = new Uint32Array(groups.length);
  const order = orderOf(measure);
  for (let i = 0; i < order.length; i++) {
    const row = order[i] ?? 0;
    const g = of[row] ?? -1;
    const into = measured[g];
    if (into === undefined) continue;
    const at = filled[g] ?? 0;
    into[at] = measure[row] ?? NaN;
    filled[g] = at + 1;
  }
  return measured;
}

function groupOf(values: Float64Array | readonly string[], rows: Uint32Array, sorted: Float64Array): ResponseGroup {
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

function meanOf(values: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i] ?? NaN;
  return sum / values.length;
}

/**
 * Between / total; of sampled points ε² (Kelley 1935), (between − (g − 1) · within mean square) / total. Null with fewer than two
 * groups, or with a point in each.
 */
function explainedBy(values: readonly Float64Array[], sampled: boolean): number | null {
  const n = values.reduce((sum, own) => sum + own.length, 0);
  if (values.length < 2 || n <= values.length) return null;
  const middles = values.map(meanOf);
  const mean = values.reduce((sum, own, g) => sum + (middles[g] ?? 0) * own.length, 0) / n;
  let [between, within] = [0, 0];
  for (const [g, own] of values.entries()) {
    const middle = middles[g] ?? 0;
    between += own.length * (middle - mean) * (middle - mean);
    within += squaresAround(own, middle);
  }
  const total = between + within;
  if (!(total > 0)) return null;
  const byChance = sampled ? ((values.length - 1) * within) / (n - values.length) : 0;
  return Math.min(1, Math.max(0, (between - byChance) / total));
}

function squaresAround(values: Float64Array, middle: number): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) {
    const off = (values[i] ?? NaN) - middle;
    sum += off * off;
  }
  return sum;
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
