// Whole models of every plan at a point: the spec is read and its plans are laid once, with a new parameter for every number that is
// swept, and at each point only what rests on these is made anew. Whatever the number is: a rate, a capacity, a distance, what an
// action does. Before it is trusted it is held against the compiler at two points.
import { buildImage } from '../../compile/image/build.ts';
import {
  compileAlone,
  compileBase,
  compilePlan,
  compileScenario,
  costsOf,
  hasError,
  type Alone,
  type CompiledModel,
  type CompileMemory,
  type Parts,
  type PlanMemory,
} from '../../compilation.ts';
import { LandscapeMemory } from '../../landscape/memory.ts';
import type { PlanCost } from '../../model/costs.ts';
import { ModelMemory } from '../../model/memory.ts';
import { asNow, layActions, type Laid } from '../../spec/plans/lay.ts';
import { withScenario } from '../../spec/plans/scenarios.ts';
import { sameBytes } from '../../numeric/bytes.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import type { Factor, Value } from '../design/factor.ts';
import { namedFactors, type NamedFactors } from './named-factors.ts';

export interface MovedPlan extends Parts {
  readonly image: ArrayBuffer;
  readonly cost: PlanCost;
}

/** Of the scenarios that are named; null at points that have to be compiled whole, to say what stands against them. */
export type MovingPlans = (values: readonly Value[], scenarios: readonly string[]) => readonly MovedPlan[] | null;

interface Asked {
  readonly factors: readonly Factor[];
  readonly scenarios: readonly string[];
  /** The spec with other values of the factors. */
  readonly change: (values: readonly Value[]) => Spec;
  /** A point other than the base. */
  readonly probe: readonly Value[];
}

/** Null where some factor is no number, or something rests on it in another way than the compiler has it. */
export function movingPlans({ factors, scenarios, change, probe }: Asked): MovingPlans | null {
  const base = factors.map((factor) => factor.base);
  const named = namedFactors(change(base), factors);
  if (named === null) return null;
  const open = openPlans(named, scenarios);
  const holds = (values: readonly Value[]): boolean => {
    const moved = open?.(values, scenarios) ?? null;
    return moved === null || isCompiled(moved, { spec: change(values), scenarios });
  };
  return open !== null && open(base, scenarios) !== null && holds(base) && holds(probe) ? open : null;
}

function openPlans(named: NamedFactors, scenarios: readonly string[]): MovingPlans | null {
  const { spec, names } = named;
  const moving = new Set(names);
  const memory = (): CompileMemory => ({ model: new ModelMemory(moving), landscape: new LandscapeMemory() });
  const ofBase = memory();
  const plans = new Map<string, { readonly laid: Laid; readonly memory: PlanMemory }>();
  for (const scenario of scenarios) {
    if (scenario === asNow) continue;
    const laid = layActions(spec, new Set(spec.scenarios?.[scenario] ?? []));
    if (hasError(laid.findings)) return null;
    plans.set(scenario, { laid, memory: { own: memory(), extended: memory() } });
  }
  const partsOf = (values: readonly Value[], alone: Alone, scenario: string): Parts | null => {
    const plan = plans.get(scenario);
    if (plan === undefined || alone.parts === null) return scenario === asNow ? alone.parts : null;
    const { laid } = plan;
    const own = {
      spec: named.withValues(laid.spec, values),
      base: laid.base === null ? null : named.withValues(laid.base, values),
    };
    const made = compilePlan(alone.parts, { laid: own, scenario }, plan.memory);
    return hasError(made.findings) ? null : made.parts;
  };
  return (values, wanted) => {
    const alone = compileAlone(named.withValues(spec, values), ofBase);
    const moved: MovedPlan[] = [];
    for (const scenario of wanted) {
      const parts = partsOf(values, alone, scenario);
      if (parts === null) return null;
      const actions = actionsIn(spec, scenario);
      const { cost, findings } = costsOf(alone, parts.model, actions);
      if (hasError(findings)) return null;
      moved.push({ ...parts, image: buildImage(parts), cost });
    }
    return moved;
  };
}

/** In the order of their text, as costs are summed. */
function actionsIn({ actions = {}, scenarios = {} }: Spec, scenario: string): readonly string[] {
  const chosen = new Set(scenarios[scenario] ?? []);
  return Object.keys(actions).filter((name) => chosen.has(name));
}

interface Compiling {
  readonly spec: Spec;
  readonly scenarios: readonly string[];
}

/** Whether the compiler makes the same of it, to the last byte. */
function isCompiled(moved: readonly MovedPlan[], { spec, scenarios }: Compiling): boolean {
  const base = compileBase(spec);
  return scenarios.every((name, s) => {
    const { compiled } = compileScenario(base, withScenario(spec, name));
    const own = moved[s];
    return compiled !== null && own !== undefined && sameBytes(own.image, compiled.image) && sameAsked(own, compiled);
  });
}

/** What is asked of the runs, and what they cost, stand in no image. */
function sameAsked(own: MovedPlan, compiled: CompiledModel): boolean {
  const text = ({ model, cost, startAnimals }: Pick<MovedPlan, 'model' | 'cost' | 'startAnimals'>): string => {
    const { outcomes, steps, seed, replicates, firstYear } = model;
    return JSON.stringify({ outcomes, steps, seed, replicates, firstYear, cost, startAnimals: [...startAnimals] });
  };
  return text(own) === text(compiled);
}
