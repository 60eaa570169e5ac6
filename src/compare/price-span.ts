// How far two plans may lie apart in cost where prices are ranges: nobody knows where in its range a price will be.
import { totalCost, type CostRange } from '../results/costs.ts';
import type { PlanRun } from './plans-run.ts';

export interface PriceSpan {
  readonly lower: number;
  readonly upper: number;
}

type Costed = Pick<PlanRun, 'compiled' | 'results'>;

/**
 * Present value under `to` less under `from`, from the mean numbers of animals handled: each price anywhere between its ends, and
 * the same in both plans where they share the action. Null where no price is a range.
 */
export function priceSpan(from: Costed, to: Costed): PriceSpan | null {
  const [before, after] = [costsByAction(from), costsByAction(to)];
  const all = [...before.values(), ...after.values()];
  if (all.every(({ least, most }) => least === most)) return null;
  let [lower, upper] = [0, 0];
  for (const action of new Set([...before.keys(), ...after.keys()])) {
    const [own, other] = [after.get(action), before.get(action)];
    const ends =
      own !== undefined && other !== undefined
        ? [own.least - other.least, own.most - other.most]
        : [(own?.least ?? 0) - (other?.most ?? 0), (own?.most ?? 0) - (other?.least ?? 0)];
    lower += Math.min(...ends);
    upper += Math.max(...ends);
  }
  return { lower, upper };
}

/** Present values, by action. */
function costsByAction({ compiled, results }: Costed): ReadonlyMap<string, CostRange> {
  const { cost } = compiled;
  const handled = (action: string, step: number): number =>
    results.handled.find(({ phase }) => phase === action)?.byYear[step - 1]?.handled.mean ?? 0;
  return new Map(
    cost.actions.map((one) => [one.action, totalCost({ ...cost, actions: [one] }, handled).presentValue] as const),
  );
}
