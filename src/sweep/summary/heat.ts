// A measure over two numbers at a time: its mean in each cell, the other numbers taken together.
import { ascendingOrder } from '../../numeric/order.ts';
import { isSampled } from '../design/design.ts';
import type { Value } from '../design/factor.ts';
import { toldApart } from './ranking.ts';
import { groupsOf } from './response.ts';
import type { SweepSummary } from './summarise.ts';
import { columnOf, type Swept } from './swept.ts';

export interface HeatMap {
  readonly quantity: string;
  readonly unit: string;
  readonly x: HeatAxis;
  readonly y: HeatAxis;
  /** At y * x.groups.length + x; NaN where no point lies. */
  readonly cells: Float64Array;
}

export interface HeatAxis {
  readonly name: string;
  /** Least and greatest value of each group, in order. */
  readonly groups: readonly (readonly [Value, Value])[];
}

/** Of each quantity over the two numbers that matter most; none where only one number is swept, or one at a time. */
export function heatMaps(swept: Swept, { quantities, design }: SweepSummary): readonly HeatMap[] {
  if (design === 'one at a time' || swept.values.length < 2) return [];
  const names = swept.manifest.design.factors.map(({ name }) => name);
  return quantities.flatMap(({ name, unit, factors }) => {
    const measure = swept.numbers.get(name);
    const [first, second] = factors.map((factor) => names.indexOf(factor.name));
    if (measure === undefined || first === undefined || second === undefined) return [];
    const rows = Uint32Array.from(measure.keys()).filter((row) => !Number.isNaN(measure[row] ?? NaN));
    const [x, y] = [axisOf(swept, first, rows), axisOf(swept, second, rows)];
    return [{ quantity: name, unit, x: x.axis, y: y.axis, cells: cellsOf(measure, rows, [x, y]) }];
  });
}

interface Grouped {
  readonly axis: HeatAxis;
  /** Group of each row. */
  readonly of: Int32Array;
}

function axisOf({ manifest, values }: Swept, k: number, rows: Uint32Array): Grouped {
  const own = values[k] ?? [];
  const groups = groupsOf(own, { rows, sampled: isSampled(manifest.design), orderOf: ascendingOrder }, 10);
  const of = new Int32Array(manifest.points).fill(-1);
  groups.forEach((group, g) => {
    for (const row of group) of[row] = g;
  });
  const ends = groups.map((group): readonly [Value, Value] => [
    own[group[0] ?? 0] ?? NaN,
    own[group.at(-1) ?? 0] ?? NaN,
  ]);
  return { axis: { name: manifest.design.factors[k]?.name ?? '', groups: ends }, of };
}

function cellsOf(measure: Float64Array, rows: Uint32Array, [x, y]: readonly [Grouped, Grouped]): Float64Array {
  const width = x.axis.groups.length;
  const sums = new Float64Array(width * y.axis.groups.length);
  const counts = new Float64Array(sums.length);
  for (const row of rows) {
    const cell = (y.of[row] ?? 0) * width + (x.of[row] ?? 0);
    sums[cell] = (sums[cell] ?? 0) + (measure[row] ?? 0);
    counts[cell] = (counts[cell] ?? 0) + 1;
  }
  return sums.map((sum, cell) => sum / (counts[cell] ?? 0));
}

export interface PreferredMap {
  readonly quantity: string;
  readonly scenarios: readonly string[];
  readonly x: HeatAxis;
  readonly y: HeatAxis;
  /** Index of the scenario that is best in the mean; −1 where no point lies, −2 where several are equally good. */
  readonly cells: Int32Array;
  /** Share of the points of a cell at which the best scenario is told apart from all others; NaN where no point lies. */
  readonly told: Float64Array;
}

/** Which scenario is best in each cell, from the maps of a quantity under each of them. */
export function preferredMaps(swept: Swept, summary: SweepSummary): readonly PreferredMap[] {
  return summary.rankings.flatMap(({ quantity, better, scenarios, factors }) => {
    const names = swept.manifest.design.factors.map(({ name }) => name);
    const [first, second] = factors.map((factor) => names.indexOf(factor.name));
    if (first === undefined || second === undefined || summary.design === 'one at a time') return [];
    const measures = scenarios.map(({ name }) => swept.numbers.get(columnOf(quantity, name)) ?? new Float64Array(0));
    const rows = Uint32Array.from(measures[0]?.keys() ?? []).filter((row) =>
      measures.every((one) => !Number.isNaN(one[row] ?? NaN)),
    );
    const axes = [axisOf(swept, first, rows), axisOf(swept, second, rows)] as const;
    const maps = measures.map((measure) => cellsOf(measure, rows, axes));
    const sign = better === 'less' ? 1 : -1;
    const cells = Int32Array.from(maps[0] ?? [], (value, cell) => {
      if (Number.isNaN(value)) return -1;
      const own = maps.map((map) => sign * (map[cell] ?? NaN));
      const best = Math.min(...own);
      return own.filter((value) => value === best).length > 1 ? -2 : own.indexOf(best);
    });
    const perhaps = scenarios.map(({ name }) => swept.perhapsBest.get(columnOf(quantity, name)) ?? null);
    const toldBest = toldApart(
      measures.map((measure) => measure.map((value) => sign * value)),
      perhaps,
    );
    const told = cellsOf(
      Float64Array.from(toldBest, (best) => (best < 0 ? 0 : 1)),
      rows,
      axes,
    );
    return [{ quantity, scenarios: scenarios.map(({ name }) => name), x: axes[0].axis, y: axes[1].axis, cells, told }];
  });
}
