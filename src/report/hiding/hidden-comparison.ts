// A comparison that may be handed out where places are secret: what its plans do is told from the hidden spec, without lengths of ways.
import type { Comparison } from '../../compare/results.ts';
import { actionsOf } from '../../spec/plans/scenarios.ts';
import type { Hidden } from './hide.ts';

/** Null where places are told as they are. */
export function hiddenComparison(comparison: Comparison, hidden: Hidden | null): Comparison {
  if (hidden === null) return comparison;
  const { spec, hash } = hidden;
  const scenarios = comparison.scenarios.map((plan) => ({ ...plan, actions: actionsOf(spec, plan.name) }));
  return { ...comparison, hash, scenarios };
}
