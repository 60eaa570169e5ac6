// What a plan costs, undiscounted and as present value: pure sums over steps.
import type { PlanCost } from '../model/costs.ts';

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
  const [undiscounted, presentValue] = [new Float64Array(3), new Float64Array(3)];
  const discount = money?.discount ?? 0;
  for (const { action, fixed, perAnimal } of actions) {
    const ofYears = [fixed.least, fixed.middle, fixed.most];
    const ofAnimals = perAnimal === null ? null : [perAnimal.least, perAnimal.middle, perAnimal.most];
    let worth = 1;
    for (let t = 0; t < fixed.middle.length; t++) {
      const handled = ofAnimals === null ? 0 : handledIn(action, t + 1);
      for (let bound = 0; bound < 3; bound++) {
        const cost = (ofYears[bound]?.[t] ?? 0) + (ofAnimals === null ? 0 : handled * (ofAnimals[bound]?.[t] ?? 0));
        undiscounted[bound] = (undiscounted[bound] ?? 0) + cost;
        presentValue[bound] = (presentValue[bound] ?? 0) + cost * worth;
      }
      worth /= 1 + discount;
    }
  }
  return { undiscounted: rangeOf(undiscounted), presentValue: rangeOf(presentValue) };
}

function rangeOf([least = 0, middle = 0, most = 0]: Float64Array): CostRange {
  return { least, middle, most };
}
