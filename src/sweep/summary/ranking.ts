// Which scenario is best at each point, and what that depends on: the sensitivity of the ranking, not only of a number.
import type { Value } from '../design/factor.ts';
import type { Observed } from '../sensitivity/observed.ts';
import { groupsOf, type RowsAsked } from './response.ts';

export interface RankedScenario {
  readonly name: string;
  /** By point, over all replicates: the two halves need not be of one size, and do not add up to the same last digit where scenarios are equal. */
  readonly whole: Float64Array;
  readonly observed: Observed;
  /** By point 1 where it is best or cannot be told from the best; null without chance, where numbers say it. */
  readonly perhapsBest: Int8Array | null;
}

export interface RankingGroup {
  readonly from: Value;
  readonly to: Value;
  readonly points: number;
  /** By scenario, the share of these points at which it is best; what is equal shares the point. */
  readonly best: readonly number[];
  /** Best in the mean over these points; `equal` where several are. */
  readonly preferred: string;
  /** Share of these points at which the best scenario is told apart from all others. */
  readonly told: number;
}

export interface Switch {
  /** Null where the values are no numbers. */
  readonly at: number | null;
  readonly from: string;
  readonly to: string;
  /**
   * Values around it, its neighbours and on, at which at half of the points or more the best scenario is not told apart: where it changes
   * is not known closer than that. Null where both neighbours are told apart.
   */
  readonly untold: { readonly from: Value; readonly to: Value } | null;
}

export interface FactorRanking {
  readonly name: string;
  readonly groups: readonly RankingGroup[];
  /** Between which neighbouring values the preferred scenario changes. */
  readonly switches: readonly Switch[];
  /** How much of which scenario is best the number decides by itself: 0 nothing, 1 all of it. */
  readonly decides: number | null;
}

export interface Ranking {
  readonly quantity: string;
  readonly better: 'less' | 'more';
  /** Shares of the points at which it is best, and at which it is so and told apart from all others. */
  readonly scenarios: readonly { readonly name: string; readonly best: number; readonly toldBest: number }[];
  /** Points at which every scenario has a number, and how many of them tell the best scenario apart from all others. */
  readonly points: number;
  readonly told: number;
  /** Share of the points at which both halves of the replicates name the same scenario; null without chance. */
  readonly agree: number | null;
  /** What decides most first. */
  readonly factors: readonly FactorRanking[];
}

export interface RankingRequest {
  readonly quantity: string;
  readonly better: 'less' | 'more';
  readonly scenarios: readonly RankedScenario[];
  /** By factor its values and the points at which it is looked at. */
  readonly factors: readonly {
    readonly name: string;
    readonly values: Float64Array | readonly string[];
    readonly rows: Uint32Array;
  }[];
  /** As of a response. */
  readonly sampled: boolean;
  readonly orderOf: RowsAsked['orderOf'];
}

export function rankScenarios({ quantity, better, scenarios, factors, sampled, orderOf }: RankingRequest): Ranking {
  const sign = better === 'less' ? 1 : -1;
  const half = (pick: (observed: Observed) => Float64Array) => scenarios.map(({ observed }) => pick(observed));
  const [first, second] = [half((observed) => observed.first), half((observed) => observed.second)];
  const worst = scenarios.map(({ whole }) => whole.map((value) => sign * value));
  const points = worst[0]?.length ?? 0;
  // A measure may be missing under one scenario only, such as animals that stand still.
  const isKnown = (row: number): boolean => worst.every((values) => !Number.isNaN(values[row] ?? NaN));
  const known = Uint32Array.from({ length: points }, (_, row) => row).filter(isKnown);
  const noisy = scenarios.some(({ observed }) => observed.first !== observed.second);
  const best = bestShares(worst, known);
  const toldBest = toldApart(
    worst,
    scenarios.map(({ perhapsBest }) => perhapsBest),
  );
  const toldAt = scenarios.map((_, s) => known.filter((row) => toldBest[row] === s).length);
  return {
    quantity,
    better,
    scenarios: scenarios.map(({ name }, s) => ({
      name,
      best: best[s] ?? NaN,
      toldBest: (toldAt[s] ?? 0) / known.length,
    })),
    points: known.length,
    told: toldAt.reduce((sum, own) => sum + own, 0),
    agree: noisy ? agreement(first, second, { known, sign }) : null,
    factors: factors
      .map(({ name, values, rows }) => {
        const own = rows.filter(isKnown);
        return factorRanking(name, values, { worst, toldBest, scenarios, rows: own, best, sampled, orderOf });
      })
      .toSorted((a, b) => (b.decides ?? -1) - (a.decides ?? -1)),
  };
}

/** By point, which scenario is told to be the best one; −1 where several may be. `worst` by scenario, less is better. */
export function toldApart(
  worst: readonly Float64Array[],
  perhapsBest: readonly RankedScenario['perhapsBest'][],
): Int32Array {
  return Int32Array.from(worst[0] ?? [], (_, row) => {
    const least = Math.min(...worst.map((values) => values[row] ?? NaN));
    const may = perhapsBest.map((own, s) => (own === null ? worst[s]?.[row] === least : own[row] === 1));
    return may.filter(Boolean).length === 1 ? may.indexOf(true) : -1;
  });
}

/** By scenario, the share of rows at which it is best. */
function bestShares(worst: readonly Float64Array[], rows: Uint32Array): readonly number[] {
  const shares = worst.map(() => 0);
  for (const row of rows) {
    const least = Math.min(...worst.map((values) => values[row] ?? NaN));
    const ties = worst.filter((values) => values[row] === least).length;
    worst.forEach((values, s) => {
      if (values[row] === least) shares[s] = (shares[s] ?? 0) + 1 / ties;
    });
  }
  return shares.map((share) => share / rows.length);
}

interface Known {
  readonly known: Uint32Array;
  readonly sign: number;
}

/** Null where the halves have no runs. */
function agreement(
  first: readonly Float64Array[],
  second: readonly Float64Array[],
  { known, sign }: Known,
): number | null {
  const inBoth = known.filter((row) => [...first, ...second].every((own) => !Number.isNaN(own[row] ?? NaN)));
  if (inBoth.length === 0) return null;
  const bestOf = (values: readonly Float64Array[], row: number): number =>
    values.reduce((top, own, s) => (sign * (own[row] ?? 0) < sign * (values[top]?.[row] ?? 0) ? s : top), 0);
  return inBoth.filter((row) => bestOf(first, row) === bestOf(second, row)).length / inBoth.length;
}

interface Ranked {
  readonly worst: readonly Float64Array[];
  readonly toldBest: Int32Array;
  readonly scenarios: readonly RankedScenario[];
  readonly rows: Uint32Array;
  readonly best: readonly number[];
  readonly sampled: boolean;
  readonly orderOf: RowsAsked['orderOf'];
}

function factorRanking(name: string, values: Float64Array | readonly string[], ranked: Ranked): FactorRanking {
  const { worst, toldBest, scenarios, rows, best, sampled, orderOf } = ranked;
  const groups = groupsOf(values, { rows, sampled, orderOf }).map((own): RankingGroup => {
    const [first = 0, last = first] = [own[0], own.at(-1)];
    const means = worst.map((one) => own.reduce((sum, row) => sum + (one[row] ?? 0), 0));
    const least = Math.min(...means);
    const equal = means.filter((mean) => mean === least).length > 1;
    const preferred = equal ? 'equal' : (scenarios[means.indexOf(least)]?.name ?? '');
    return {
      from: values[first] ?? NaN,
      to: values[last] ?? NaN,
      points: own.length,
      best: bestShares(worst, own),
      preferred,
      told: own.filter((row) => (toldBest[row] ?? -1) >= 0).length / own.length,
    };
  });
  return { name, groups, switches: switchesOf(groups), decides: decided(groups, { best, sampled }) };
}

function switchesOf(groups: readonly RankingGroup[]): FactorRanking['switches'] {
  return groups.flatMap((group, i) => {
    const before = groups[i - 1];
    if (before === undefined || before.preferred === group.preferred) return [];
    const at = typeof before.to === 'number' && typeof group.from === 'number' ? (before.to + group.from) / 2 : null;
    return [{ at, from: before.preferred, to: group.preferred, untold: untoldAround(groups, i) }];
  });
}

/** Around the step from group i − 1 to group i. */
function untoldAround(groups: readonly RankingGroup[], i: number): Switch['untold'] {
  const isTold = (group: RankingGroup | undefined): boolean => group === undefined || group.told > 0.5;
  let [first, last] = [i, i - 1];
  while (!isTold(groups[first - 1])) first--;
  while (!isTold(groups[last + 1])) last++;
  const [from, to] = [groups[first], groups[last]];
  return from === undefined || to === undefined || first > last ? null : { from: from.from, to: to.to };
}

/**
 * Of the variance of being best, the share between the values of the number, all scenarios together: a correlation ratio, of
 * sampled points ε² (Kelley 1935), which is 0 in the mean where the number decides nothing. Null where nothing differs.
 */
function decided(groups: readonly RankingGroup[], { best, sampled }: Pick<Ranked, 'best' | 'sampled'>): number | null {
  const points = groups.reduce((sum, group) => sum + group.points, 0);
  const total = best.reduce((sum, share) => sum + share * (1 - share), 0);
  if (!(total > 0)) return null;
  const between = groups.reduce(
    (sum, group) =>
      sum +
      group.points *
        best.reduce((inner, share, s) => inner + ((group.best[s] ?? 0) - share) * ((group.best[s] ?? 0) - share), 0),
    0,
  );
  const share = between / points / total;
  if (!sampled) return share;
  return points > groups.length ? Math.max(0, 1 - ((1 - share) * (points - 1)) / (points - groups.length)) : null;
}
