// What a sweep says: the response to each factor with its spread, what matters most and by which measure of it, and where growth
// goes through 1.
import { isSampled, type DesignName } from '../design/design.ts';
import { isText, levelsOf, type Value } from '../design/factor.ts';
import { ownUnit } from '../manifest.ts';
import { noiseShare } from '../sensitivity/observed.ts';
import { partialRankCorrelations, type RankCorrelation } from '../sensitivity/rank-correlation.ts';
import { screening, type FactorScreen } from '../sensitivity/screening.ts';
import { sharesOfVariance, type FactorShares } from '../sensitivity/shares-of-variance.ts';
import { assumptionsOf } from './assumptions.ts';
import { differenceColumns, observedOf, quantityColumns, type QuantityColumn } from './columns.ts';
import { rankScenarios, type Ranking } from './ranking.ts';
import { crossings, openOrders, responseTo, type Response, type RowsAsked } from './response.ts';
import { columnOf, type Swept } from './swept.ts';

export interface SweepSummary {
  readonly format: 'skein-sweep-summary/1';
  readonly tool: { readonly name: 'skein'; readonly version: string; readonly kernel: string };
  readonly model: string;
  readonly hash: string;
  readonly design: DesignName;
  readonly points: number;
  readonly runs: { readonly replicates: number; readonly years: number; readonly seed: number } | null;
  readonly failed: {
    readonly points: number;
    readonly reasons: readonly { readonly reason: string; readonly points: number }[];
  };
  /** The unit is empty where the language has none for it. */
  readonly factors: readonly { readonly name: string; readonly base: Value; readonly unit: string }[];
  readonly quantities: readonly QuantitySummary[];
  /** Which scenario is best where; empty where none are compared. */
  readonly rankings: readonly Ranking[];
  /** What each number of sensitivity assumes. */
  readonly assumptions: readonly string[];
}

export interface QuantitySummary {
  readonly name: string;
  readonly unit: string;
  readonly meaning: string;
  readonly least: number;
  readonly greatest: number;
  readonly mean: number;
  /** Of the variance over the points, what comes from the number of replicates; null without chance. */
  readonly noise: number | null;
  /** Without that noise; null but for the design `sobol indices`. */
  readonly variance: number | null;
  /** Of a difference from runs, at how many points its 95 % interval lies above 0, below, and at how many it holds 0; else null. */
  readonly told: { readonly above: number; readonly below: number; readonly not: number } | null;
  /** The factors, what matters most first. */
  readonly factors: readonly FactorSummary[];
  /** What the order of the factors is by. */
  readonly orderedBy: string;
}

export interface FactorSummary {
  readonly name: string;
  readonly response: Response;
  /** Where the mean response goes through 1; null but for growth. */
  readonly throughOne: readonly number[] | null;
  readonly shares: FactorShares | null;
  readonly screen: FactorScreen | null;
  readonly rankCorrelation: RankCorrelation | null;
}

export function summariseSweep(swept: Swept): SweepSummary {
  const { manifest, failures } = swept;
  const { tool, model, hash, design, points, runs } = manifest;
  const orderOf = openOrders();
  const failed = [...failures].map(([reason, count]) => ({ reason, points: count }));
  return {
    format: 'skein-sweep-summary/1',
    tool,
    model,
    hash,
    design: design.design,
    points,
    runs,
    failed: { points: failed.reduce((sum, one) => sum + one.points, 0), reasons: failed },
    factors: design.factors.map(({ name, base }) => ({ name, base, unit: unitOf(manifest, name) })),
    quantities: [...quantityColumns(swept), ...differenceColumns(swept)].map((one) =>
      summariseQuantity(swept, one, orderOf),
    ),
    rankings: rankingsOf(swept, orderOf),
    assumptions: assumptionsOf(design.design, { runs: runs !== null, told: swept.perhapsBest.size > 0 }),
  };
}

function unitOf({ columns }: Swept['manifest'], name: string): string {
  const unit = columns.find((one) => one.name === name)?.unit ?? '';
  return unit === ownUnit ? '' : unit;
}

type OrderOf = RowsAsked['orderOf'];

function rankingsOf(swept: Swept, orderOf: OrderOf): readonly Ranking[] {
  const { manifest, numbers, values } = swept;
  const { scenarios, design } = manifest;
  const [base] = scenarios;
  if (base === undefined) return [];
  const factors = design.factors.map(({ name }, k) => ({ name, values: values[k] ?? [], rows: rowsOf(swept, k) }));
  return manifest.quantities.flatMap(({ name, scenario, better }) => {
    if (scenario !== base || better === null) return [];
    const ranked = scenarios.flatMap((one) => {
      const [whole, observed] = [numbers.get(columnOf(name, one)), observedOf(numbers, columnOf(name, one))];
      const perhapsBest = swept.perhapsBest.get(columnOf(name, one)) ?? null;
      return observed === null || whole === undefined ? [] : [{ name: one, whole, observed, perhapsBest }];
    });
    return [rankScenarios({ quantity: name, better, scenarios: ranked, factors, sampled: isSampled(design), orderOf })];
  });
}

function summariseQuantity(swept: Swept, column: QuantityColumn, orderOf: OrderOf): QuantitySummary {
  const { name, unit, meaning, whole, observed, told, growth } = column;
  const { design, runs } = swept.manifest;
  const known = whole.some(Number.isNaN) ? whole.filter((value) => !Number.isNaN(value)) : whole;
  const count = design.factors.length;
  const shares = design.design === 'sobol indices' ? sharesOfVariance(observed, count) : null;
  const screens = design.design === 'morris' ? screening(observed, count, design.seed) : [];
  const ranks = ranked(design.design) ? rankCorrelations(swept, { whole, known, orderOf }) : [];
  const factors = design.factors.map((factor, k): FactorSummary => {
    const response = responseTo(swept.values[k] ?? [], whole, {
      rows: rowsOf(swept, k),
      sampled: isSampled(design),
      orderOf,
      ...(told === null ? {} : { told }),
    });
    return {
      name: factor.name,
      response,
      throughOne: growth ? crossings(response, 1) : null,
      shares: shares?.factors[k] ?? null,
      screen: screens[k] ?? null,
      rankCorrelation: ranks[k] ?? null,
    };
  });
  const { by, weight } = order(design.design);
  return {
    name,
    unit,
    meaning,
    ...spanOf(known),
    noise: runs === null || observed.first === observed.second ? null : noiseShare(observed),
    variance: shares?.variance ?? null,
    told: told === null ? null : toldAt(told, whole),
    factors: factors.toSorted((a, b) => weight(b) - weight(a)),
    orderedBy: by,
  };
}

/** Over the points with a number. */
function toldAt(told: Int8Array, whole: Float64Array): NonNullable<QuantitySummary['told']> {
  const own = told.filter((_, row) => !Number.isNaN(whole[row] ?? NaN));
  const [above, below] = [own.filter((sign) => sign > 0).length, own.filter((sign) => sign < 0).length];
  return { above, below, not: own.length - above - below };
}

function spanOf(known: Float64Array): Pick<QuantitySummary, 'least' | 'greatest' | 'mean'> {
  let [least, greatest, sum] = [Infinity, -Infinity, 0];
  for (let i = 0; i < known.length; i++) {
    const value = known[i] ?? NaN;
    least = Math.min(least, value);
    greatest = Math.max(greatest, value);
    sum += value;
  }
  return { least, greatest, mean: sum / known.length };
}

/** Where one number at a time changes, the points at which the others are as in the model. */
function rowsOf({ manifest: { design, points } }: Swept, k: number): Uint32Array {
  if (design.design !== 'one at a time') return ascending(0, points);
  const sizes = design.factors.map((factor) => levelsOf(factor).length);
  const first = 1 + sizes.slice(0, k).reduce((sum, size) => sum + size, 0);
  return ascending(first, sizes[k] ?? 0);
}

function ascending(first: number, count: number): Uint32Array {
  const rows = new Uint32Array(count);
  for (let i = 0; i < count; i++) rows[i] = first + i;
  return rows;
}

function ranked(design: DesignName): boolean {
  return design === 'grid' || design === 'list' || design === 'latin hypercube' || design === 'sobol';
}

/** Over the points with a measure, by the factors that are numbers. */
function rankCorrelations(
  { manifest, values }: Swept,
  { whole, known, orderOf }: { readonly whole: Float64Array; readonly known: Float64Array; readonly orderOf: OrderOf },
): readonly (RankCorrelation | null)[] {
  const { factors } = manifest.design;
  const columns = factors.map((factor, k) => {
    const own = values[k];
    if (isText(factor) || !(own instanceof Float64Array)) return new Float64Array(known.length);
    return known.length === whole.length ? own : own.filter((_, row) => !Number.isNaN(whole[row]));
  });
  return partialRankCorrelations(columns, known, orderOf);
}

function order(design: DesignName): { readonly by: string; readonly weight: (factor: FactorSummary) => number } {
  switch (design) {
    case 'sobol indices':
      return { by: 'share of the variance in all', weight: ({ shares }) => shares?.total ?? -1 };
    case 'morris':
      return { by: 'mean size of the effects', weight: ({ screen }) => screen?.meanSize ?? -1 };
    case 'one at a time':
      return { by: 'how far the measure goes', weight: ({ response }) => reachOf(response) };
    default:
      return {
        by: 'share of the variance between the values of the number',
        weight: ({ response }) => response.explained ?? -1,
      };
  }
}

function reachOf({ groups }: Response): number {
  const means = groups.map(({ mean }) => mean);
  return Math.max(...means) - Math.min(...means);
}
