// The plans of a spec as they are run: `as now`, which is always there, and each scenario that the spec names.
import { isHandling } from '../compile/image/handling.ts';
import { compileBase, compileScenario, type CompiledBase, type CompiledModel } from '../pipeline.ts';
import { totalCost } from '../results/costs.ts';
import { withValues, type DrawnValues } from '../results/draws/plan.ts';
import { scenariosOf } from '../spec/plans/scenarios.ts';
import type { Finding } from '../spec/finding.ts';
import type { Spec } from '../spec/schema/spec.ts';
import type { MoveOfPlan } from './patches.ts';
import type { MoneyOf, PlanToRun } from './plan.ts';

export interface PlansOfSpec {
  /** Null where a mistake stands in the way. */
  readonly plans: readonly PlanToRun[] | null;
  readonly findings: readonly Finding[];
}

export function plansOf(spec: Spec): PlansOfSpec {
  const base = compileBase(spec);
  const made = scenariosOf(spec).map(({ name, spec: own }) => ({ name, own, ...compileScenario(base, own) }));
  const drawnBase = lastOf((values: DrawnValues) => compileBase(withValues(spec, values)));
  const findings = made.flatMap((one) => one.findings);
  const plans = made.flatMap(({ name, own, compiled }): readonly PlanToRun[] =>
    compiled === null ? [] : [planOf(name, { spec: own, compiled, drawnBase })],
  );
  return { plans: plans.length < made.length ? null : plans, findings };
}

interface Made {
  readonly spec: Spec;
  readonly compiled: CompiledModel;
  /** All plans of a draw are compiled from one base. */
  readonly drawnBase: (values: DrawnValues) => CompiledBase;
}

/** Keeps what it made last, for callers that ask for the same again. */
function lastOf<Key extends object, Value>(make: (key: Key) => Value): (key: Key) => Value {
  let last: { readonly key: Key; readonly value: Value } | null = null;
  return (key) => {
    if (last?.key !== key) last = { key, value: make(key) };
    return last.value;
  };
}

function planOf(name: string, { spec, compiled, drawnBase }: Made): PlanToRun {
  return {
    name,
    actions: compiled.actions,
    compiled,
    moneyOf: moneyIn(compiled),
    under: (values) => {
      const { compiled: drawn, findings } = compileScenario(drawnBase(values), withValues(spec, values));
      if (drawn !== null) return { compiled: drawn, moneyOf: moneyIn(drawn) };
      const failure = findings.find(({ severity }) => severity === 'error')?.message ?? '';
      return { compiled: null, failure, moneyOf: null };
    },
  };
}

/** What the actions cost in one future; null where the model knows no money. An action that handles animals is a phase of its own name. */
export function moneyIn({ model, cost }: Pick<CompiledModel, 'model' | 'cost'>): MoneyOf | null {
  if (cost.money === null) return null;
  const phases = model.phases.filter(isHandling).map(({ name }) => name);
  const moneyOf: MoneyOf = (handled) => {
    const total = totalCost(cost, (action, step) => {
      const phase = phases.indexOf(action);
      return phase < 0 ? 0 : handled(phase, step);
    });
    const { least, middle, most } = total.presentValue;
    return { presentValue: middle, undiscounted: total.undiscounted.middle, least, most };
  };
  if (cost.actions.some(({ perAnimal }) => perAnimal !== null)) return moneyOf;
  // The same in every future.
  const always = moneyOf(() => 0);
  return () => always;
}

/** Every move of a plan, those that the model itself has left out: they are no part of a choice. */
export function movesOf(spec: Spec, plans: readonly PlanToRun[]): readonly MoveOfPlan[] {
  return plans.flatMap(({ name: scenario, actions, compiled: { model } }) =>
    actions.flatMap(({ name: action }): readonly MoveOfPlan[] => {
      const own = spec.actions?.[action];
      if (own?.kind !== 'move') return [];
      const { years } = own;
      const firstYear = Array.isArray(years) ? Math.min(...years) : (years?.from ?? model.firstYear);
      return [{ scenario, action, sources: [own.from].flat(), firstYear }];
    }),
  );
}
