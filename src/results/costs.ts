// What a plan costs, undiscounted and as present value: pure sums over steps.
import type { PlanCost, Sums } from '../model/costs.ts';

/** How many animals an action handled in a step (1-based), in one future or as a mean over futures. */
export type HandledIn = (action: string, step: number) => number;

/** Money, in the currency of the spec. */
export interface CostRange {
  readonly least: number;
  readonly middle: number;
  readonly most: number;
}

export interface TotalCost {
  readonly undiscounted: CostRange;
  /** Σ cost of step t / (1 + d)^(t − 1): the first year is not discounted. */
  readonly presentValue: CostRange;
}

/** Costs are linear in the animals handled: the mean over futures is the cost of the mean numbers of animals. */
export function totalCost({ money, actions }: PlanCost, handledIn: HandledIn): TotalCost {
  const undiscounted = { least: 0, middle: 0, most: 0 };
  const presentValue = { least: 0, middle: 0, most: 0 };
  const discount = money?.discount ?? 0;
  for (const { action, fixed, perAnimal } of actions) {
    let worth = 1;
    for (let t = 0; t < fixed.middle.length; t++) {
      const handled = perAnimal === null ? 0 : handledIn(action, t + 1);
      for (const bound of ['least', 'middle', 'most'] as const) {
        const cost = at(fixed, bound, t) + (perAnimal === null ? 0 : handled * at(perAnimal, bound, t));
        undiscounted[bound] += cost;
        presentValue[bound] += cost * worth;
      }
      worth /= 1 + discount;
    }
  }
  return { undiscounted, presentValue };
}

function at(sums: Sums, bound: keyof Sums, t: number): number {
  return sums[bound][t] ?? 0;
}
