// Money against risk: which plans are not beaten in both, what a further step costs, and what risk less costs.
import { isBeaten } from './best.ts';

export interface CostAndRisk {
  readonly cost: number;
  readonly risk: number;
}

/** Plans that no other plan beats: none costs at most as much with at most the risk, one of the two truly less. */
export function notBeaten(plans: readonly CostAndRisk[]): readonly boolean[] {
  const values = [plans.map(({ cost }) => cost), plans.map(({ risk }) => risk)];
  return plans.map((_, plan) => !isBeaten(values, plan));
}

export interface Step {
  /** Indices of the plans. */
  readonly from: number;
  readonly to: number;
  /** Money for each unit of risk less. */
  readonly costPerRisk: number;
}

/**
 * The way up along the plans that are not beaten, from the cheapest to the dearest, without those that a mix of two others
 * would beat: each step costs more for each unit of risk than the one before it.
 */
export function stepsUp(plans: readonly CostAndRisk[]): readonly Step[] {
  const free = notBeaten(plans);
  const order = [...plans.keys()].filter((i) => free[i]).sort((a, b) => at(plans, a).cost - at(plans, b).cost);
  const kept: number[] = [];
  for (const next of order) {
    if (kept.some((i) => at(plans, i).cost === at(plans, next).cost)) continue;
    while (
      kept.length > 1 &&
      price(plans, at(kept, kept.length - 1), next) <=
        price(plans, at(kept, kept.length - 2), at(kept, kept.length - 1))
    )
      kept.pop();
    kept.push(next);
  }
  return kept.slice(1).map((to, i) => ({ from: at(kept, i), to, costPerRisk: price(plans, at(kept, i), to) }));
}

function price(plans: readonly CostAndRisk[], from: number, to: number): number {
  return (at(plans, to).cost - at(plans, from).cost) / (at(plans, from).risk - at(plans, to).risk);
}

function at<T>(items: readonly T[], i: number): T {
  const item = items[i];
  if (item === undefined) throw new RangeError(`no item ${i} among ${items.length}`);
  return item;
}

export interface CostPerRisk {
  readonly estimate: number;
  /** From the ends of the interval of the risk removed, and of the cost where prices are ranges. */
  readonly lower: number;
  readonly upper: number;
}

/** What a plan costs more than the other; its ends lie apart where prices are ranges. */
export interface MoreCost {
  readonly estimate: number;
  readonly lower: number;
  readonly upper: number;
}

export interface RiskRemoved {
  /** Risk without the plan less risk with it. */
  readonly estimate: number;
  readonly lower: number;
  readonly upper: number;
}

/**
 * Money for each unit of risk less (such as one chance in one). Null where the interval of the risk removed does not lie
 * above 0: a cost for nothing reliable has no price.
 */
export function costPerRisk(more: MoreCost, removed: RiskRemoved): CostPerRisk | null {
  if (!(removed.lower > 0)) return null;
  const ends = [more.lower, more.upper].flatMap((cost) => [cost / removed.lower, cost / removed.upper]);
  return { estimate: more.estimate / removed.estimate, lower: Math.min(...ends), upper: Math.max(...ends) };
}
