// One plan by itself, with what it costs and whether another is at least as good in all risks and in cost.
import { criterionE } from '../analysis/criterion-e.ts';
import { isBeaten } from './best.ts';
import { meanOf, varianceOf } from './paired-mean.ts';
import type { Objective } from './objectives.ts';
import type { Amount, ComparedPlan, OverBoth, PlanCost, PlanDifference, RiskPrice } from './results.ts';
import type { PlanRun, PlansRun } from './plans-run.ts';
import { priceSpan } from './price-span.ts';
import { costPerRisk } from './worth-the-money.ts';

interface Beside {
  readonly objectives: readonly Objective[];
  /** 1 for the futures that count. */
  readonly ended: Uint8Array;
  readonly differences: readonly PlanDifference[];
  readonly beaten: readonly OverBoth[];
  readonly money: boolean;
}

export function comparedPlans(run: PlansRun, beside: Beside): readonly ComparedPlan[] {
  const takes = run.runs.some(({ ledger }) => ledger.takes);
  const free = notBeatenIn(beside);
  return run.runs.map((one, p) => {
    const { results, plan, ledger } = one;
    const cost = beside.money ? costOf(one) : null;
    return {
      name: plan.name,
      actions: plan.actions,
      cost,
      outcomes: results.outcomes.map(({ name, definition, ever, atEnd }) => ({
        name,
        definition,
        probability: ever.probability,
        intervals: {
          runs: ever.interval,
          unknown: ever.intervalFromUnknown,
          ...(ever.noUnknown === undefined ? {} : { noUnknown: ever.noUnknown }),
        },
        atEnd,
      })),
      animalsAtEnd: lastYear(one),
      meanLowestCount: results.meanLowestCount.mean,
      animalsTaken: takes ? amountOf(ledger.taken, one) : null,
      changeAtEnd: changeAtEnd(one),
      notBeaten: free[p] ?? true,
      beaten: beside.beaten[p] ?? { runs: 0, draws: null },
      prices: cost === null || p === 0 ? [] : pricesOf(run, p, beside),
      handled: results.handled,
      ...windowsOf(one),
    };
  });
}

function windowsOf({ compiled, results }: PlanRun): Pick<ComparedPlan, 'criterionE'> {
  const found = criterionE(compiled, results);
  return found === null ? {} : { criterionE: found };
}

function costOf(run: PlanRun): PlanCost {
  const discounted = amountOf(run.ledger.presentValue, run);
  const plain = amountOf(run.ledger.undiscounted, run);
  return {
    presentValue: discounted.mean,
    presentValueSd: discounted.sd,
    undiscounted: plain.mean,
    undiscountedSd: plain.sd,
    least: amountOf(run.ledger.least, run).mean,
    most: amountOf(run.ledger.most, run).mean,
  };
}

/** Over the futures that came to their end. */
function amountOf(values: Float64Array, { ledger }: PlanRun): Amount {
  const kept = values.filter((_, i) => ledger.ended[i] === 1);
  return { mean: meanOf(kept), sd: kept.length < 2 ? null : Math.sqrt(varianceOf(kept)) };
}

function lastYear({ results }: PlanRun): ComparedPlan['animalsAtEnd'] {
  const last = results.abundance.whole.at(-1);
  if (last === undefined) throw new RangeError('A run has no year.');
  const { mean, sd, quantiles } = last;
  return { mean, sd, quantiles };
}

/** Mean animals a year, over the last fifth of the years. */
function changeAtEnd({ results: { abundance, years } }: PlanRun): number {
  const stretch = Math.max(1, Math.round(years / 5));
  const [then, now] = [abundance.whole.at(-1 - stretch), abundance.whole.at(-1)];
  return ((now?.mean ?? 0) - (then?.mean ?? 0)) / stretch;
}

function notBeatenIn({ objectives, ended }: Beside): readonly boolean[] {
  const deciding = objectives.filter(({ decides, better }) => decides && better !== null);
  const plans = deciding[0]?.values.length ?? 0;
  const means = deciding.map(({ values, better }) =>
    values.map(
      (plan) => (better === 'less' ? 1 : -1) * meanOf(Float64Array.from(plan).filter((_, i) => ended[i] === 1)),
    ),
  );
  return Array.from({ length: plans }, (_, p) => !isBeaten(means, p));
}

function pricesOf({ runs }: PlansRun, p: number, { differences, objectives }: Beside): readonly RiskPrice[] {
  const [now, own] = [runs[0], runs[p]];
  if (now === undefined || own === undefined) return [];
  const [from, to] = [now.plan.name, own.plan.name];
  const more = amountOf(own.ledger.presentValue, own).mean - amountOf(now.ledger.presentValue, now).mean;
  const ends = priceSpan(now, own) ?? { lower: more, upper: more };
  return differences
    .filter((one) => one.of === 'chance' && one.from === from && one.to === to)
    .map(({ outcome, estimate, interval, toldApart }): RiskPrice => {
      const hoped = objectives.find(({ name }) => name === outcome)?.better === 'more';
      const less = { estimate: -estimate, lower: -interval.upper, upper: -interval.lower };
      const price = toldApart
        ? costPerRisk({ estimate: more, ...ends }, hoped ? { estimate, ...interval } : less)
        : null;
      if (price === null) return { outcome, costPerRisk: null, why: 'no reliable gain' };
      if (!(more > 0)) return { outcome, costPerRisk: null, why: 'costs no more' };
      return { outcome, costPerRisk: price, why: 'priced' };
    });
}
