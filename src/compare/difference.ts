// Any two plans in one objective: how far they lie apart in the same futures, and whether they can be told apart at all.
import { sameBytes } from '../numeric/bytes.ts';
import { fromUnknown } from '../results/draws/intervals.ts';
import type { FromUnknown, Interval } from '../results/results.ts';
import type { Objective } from './objectives.ts';
import {
  meanDifferenceFromRuns,
  meanDifferenceFromUnknown,
  overDrawsMethod,
  shareDifferenceFromRuns,
  shareDifferenceFromUnknown,
} from './over-draws.ts';
import { meanDifference, pairedMeanMethod } from './paired-mean.ts';
import {
  countPairs,
  pairedShareDifference,
  pairedShareMethod,
  type Estimate,
  type PairedCounts,
} from './paired-share.ts';
import type { PlanDifference } from './results.ts';
import type { PlansRun } from './plans-run.ts';
import { priceSpan } from './price-span.ts';

export interface Pair {
  readonly objective: Objective;
  readonly from: number;
  readonly to: number;
}

/** `ended` says which futures count. */
export function differenceOf(run: PlansRun, { objective, from, to }: Pair, ended: Uint8Array): PlanDifference {
  const nameOf = (plan: number): string => run.runs[plan]?.plan.name ?? '';
  const names = { outcome: objective.name, of: objective.of, from: nameOf(from), to: nameOf(to) };
  const found =
    objective.of === 'chance'
      ? ofShares(run, { objective, from, to }, ended)
      : ofMeans(run, { objective, from, to }, ended);
  if (areSame(run, { objective, from, to })) return { ...names, ...same(found.futures, run.draws.length > 0) };
  const { estimate, interval, intervalFromUnknown: seen } = found;
  const enters = [from, to].some((plan) => isUnknown(run, plan, objective));
  const unknown = run.draws.length === 0 ? noneDrawn : fromUnknown(seen, { draws: run.draws.length, enters });
  // What few draws have seen is no interval, but where it holds 0 nothing is told apart.
  const prices = pricesOf(run, { objective, from, to });
  const apart =
    excludesZero(interval) &&
    (!enters || seen === null || excludesZero(seen)) &&
    (prices === null || excludesZero(prices));
  return {
    ...names,
    estimate,
    interval,
    ...unknown,
    method: interval.method,
    prices,
    futures: found.futures,
    toldApart: apart,
  };
}

const noneDrawn: FromUnknown = { intervalFromUnknown: null };

function pricesOf({ runs }: PlansRun, { objective, from, to }: Pair): PlanDifference['prices'] {
  const [before, after] = [runs[from], runs[to]];
  return objective.of !== 'money' || before === undefined || after === undefined ? null : priceSpan(before, after);
}

function isUnknown({ runs }: PlansRun, plan: number, { of }: Objective): boolean {
  const { model = false, money = false } = runs[plan]?.unknown ?? {};
  return model || (of === 'money' && money);
}

export function excludesZero({ lower, upper }: Pick<Estimate, 'lower' | 'upper'>): boolean {
  return lower > 0 || upper < 0;
}

type Found = Pick<PlanDifference, 'estimate' | 'interval' | 'intervalFromUnknown' | 'futures'>;

function ofShares({ draws, futures }: PlansRun, pair: Pair, ended: Uint8Array): Found {
  const counts = (first: number, many: number): PairedCounts => {
    const part = (plan: number): Uint8Array =>
      Uint8Array.from(pair.objective.values[plan]?.subarray(first, first + many) ?? []);
    return countPairs(part(pair.from), part(pair.to), ended.subarray(first, first + many));
  };
  const all = counts(0, futures);
  if (draws.length === 0) {
    const found = pairedShareDifference(all);
    return {
      estimate: found.estimate,
      interval: named(found, pairedShareMethod),
      intervalFromUnknown: null,
      futures: all,
    };
  }
  const each = draws.map((draw) => counts(draw.first, draw.futures));
  const { estimate, ...ends } = shareDifferenceFromRuns(each);
  const interval = named(ends, overDrawsMethod);
  return { estimate, interval, intervalFromUnknown: shareDifferenceFromUnknown(each), futures: all };
}

function ofMeans({ draws, futures }: PlansRun, { objective, from, to }: Pair, ended: Uint8Array): Found {
  const [before, after] = [objective.values[from], objective.values[to]];
  const differences = (first: number, many: number): Float64Array => {
    const kept: number[] = [];
    for (let i = first; i < first + many; i++) if (ended[i] === 1) kept.push((after?.[i] ?? 0) - (before?.[i] ?? 0));
    return Float64Array.from(kept);
  };
  if (draws.length === 0) {
    const { estimate, ...ends } = meanDifference(differences(0, futures));
    return { estimate, interval: named(ends, pairedMeanMethod), intervalFromUnknown: null, futures: null };
  }
  const each = draws.map((draw) => differences(draw.first, draw.futures));
  const { estimate, ...ends } = meanDifferenceFromRuns(each);
  const interval = named(ends, overDrawsMethod);
  return { estimate, interval, intervalFromUnknown: meanDifferenceFromUnknown(each), futures: null };
}

function named({ lower, upper }: Pick<Estimate, 'lower' | 'upper'>, method: string): Interval {
  return { lower, upper, level: 0.95, method, from: 'the number of runs' };
}

/** One and the same model down to its last byte, with the same number in every future: no chance is left in it. */
function areSame({ runs }: PlansRun, { objective, from, to }: Pair): boolean {
  const [a, b] = [runs[from]?.compiled.image, runs[to]?.compiled.image];
  if (a === undefined || b === undefined || !sameBytes(a, b)) return false;
  const [before, after] = [objective.values[from], objective.values[to]];
  return before?.every((value, i) => value === after?.[i]) === true;
}

function same(futures: PairedCounts | null, drawn: boolean): Omit<PlanDifference, 'outcome' | 'of' | 'from' | 'to'> {
  const method = 'the two plans are one and the same model';
  const none: Interval = { lower: 0, upper: 0, level: 0.95, method, from: 'the number of runs' };
  const unknown: Interval | null = drawn ? { ...none, from: 'what is not known' } : null;
  return { estimate: 0, interval: none, intervalFromUnknown: unknown, method, prices: null, futures, toldApart: false };
}
