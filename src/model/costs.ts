// What the actions of a scenario cost, by step: fixed sums, and what each animal handled costs.
import type { SpecPath } from '../spec/document.ts';
import { readQuantity } from '../spec/quantity.ts';
import type { ActionSpec, Spec } from '../spec/schema/spec.ts';
import { fail, type Context } from './context.ts';
import { activeYears } from './years.ts';

export interface Money {
  readonly currency: string;
  readonly priceYear: number | null;
  /** By how much money of a year later is worth less, as a share. */
  readonly discount: number;
}

/** Sums of money by step, at t − 1. The middle is halfway between the least and the most, and all three are alike where no range is given. */
export interface Sums {
  readonly least: Float64Array;
  readonly middle: Float64Array;
  readonly most: Float64Array;
}

export interface ActionCost {
  /** Its name, which for a take, a move or a release is that of its phase, too. */
  readonly action: string;
  /** Once, by the kilometre and yearly, whatever becomes of the animals. */
  readonly fixed: Sums;
  /** Of each animal handled in the step; null where nobody is paid for. */
  readonly perAnimal: Sums | null;
}

/** Of all actions of a scenario, in the currency of `money`, undiscounted. */
export interface PlanCost {
  /** Null where the spec has no `money`, and no action a cost. */
  readonly money: Money | null;
  readonly actions: readonly ActionCost[];
}

type CostSpec = NonNullable<ActionSpec['cost']>;
type CostKey = keyof CostSpec;
type Bound = 'least' | 'middle' | 'most';

/** Kilometres of the way that an action lays or changes; NaN where it lays none. */
export type KilometresOf = (action: string) => number;

export function resolveCosts(context: Context, actions: readonly string[], kilometresOf: KilometresOf): PlanCost {
  const { spec } = context;
  const costs = actions.flatMap((action) => {
    const own = spec.actions?.[action];
    return own?.cost === undefined ? [] : [costOf(context, { action, own, cost: own.cost, kilometresOf })];
  });
  return { money: moneyOf(context, spec), actions: costs };
}

function moneyOf(context: Context, { money }: Spec): Money | null {
  if (money === undefined) return null;
  const discount = readQuantity(money.discount ?? 0, 'share');
  const value = discount.ok ? discount.value : NaN;
  if (!(value >= 0 && value < 1)) {
    fail(context, 'share-out-of-range', ['money', 'discount'], {
      message: `The discount is ${String(money.discount)}`,
      details: { expected: 'a share from 0 to below 1, such as `3 %`' },
    });
  }
  return { currency: money.currency, priceYear: money['price-year'] ?? null, discount: value };
}

interface Costing {
  readonly action: string;
  readonly own: ActionSpec;
  readonly cost: CostSpec;
  readonly kilometresOf: KilometresOf;
}

function costOf(context: Context, { action, own, cost, kilometresOf }: Costing): ActionCost {
  const { steps } = context.time;
  const active = activeSteps(context, action, own);
  const first = active.indexOf(true);
  const path = ['actions', action, 'cost'];
  const kilometres = cost['per-km'] === undefined ? 0 : kilometresOf(action);
  const at = (key: CostKey, step: number, bound: Bound): number => priceAt(context, cost, { key, step, bound, path });
  const sums = (sumAt: (step: number, bound: Bound) => number): Sums => {
    const of = (bound: Bound) =>
      Float64Array.from({ length: steps }, (_, t) => (active[t] === true ? sumAt(t, bound) : 0));
    return { least: of('least'), middle: of('middle'), most: of('most') };
  };
  return {
    action,
    fixed: sums(
      (t, bound) =>
        at('yearly', t, bound) + (t === first ? at('once', t, bound) + kilometres * at('per-km', t, bound) : 0),
    ),
    perAnimal: cost['per-animal'] === undefined ? null : sums((t, bound) => at('per-animal', t, bound)),
  };
}

/** At t − 1 whether the action holds, or is done, in step t. */
function activeSteps(context: Context, action: string, own: ActionSpec): readonly boolean[] {
  const { firstYear, steps } = context.time;
  if (own.kind === 'take' || own.kind === 'move' || own.kind === 'add') {
    const active = activeYears(context, own.years, ['actions', action, 'years']);
    return Array.from({ length: steps }, (_, t) => active === null || active[t] === 1);
  }
  const { from = -Infinity, until = Infinity } = own;
  return Array.from({ length: steps }, (_, t) => from <= firstYear + t && firstYear + t <= until);
}

interface Price {
  readonly key: CostKey;
  readonly step: number;
  readonly bound: Bound;
  readonly path: SpecPath;
}

function priceAt(context: Context, cost: CostSpec, { key, step, bound, path }: Price): number {
  const written = cost[key];
  if (written === undefined) return 0;
  const year = context.time.firstYear + step;
  const value = (expression: number | string, at: SpecPath): number => {
    context.numbers.varies(expression, at);
    return context.numbers.value(expression, at, { year });
  };
  const at = [...path, key];
  if (!Array.isArray(written)) return value(written, at);
  const [one, other] = [value(written[0] ?? 0, [...at, 0]), value(written[1] ?? 0, [...at, 1])];
  const [least, most] = [Math.min(one, other), Math.max(one, other)];
  return bound === 'middle' ? (least + most) / 2 : bound === 'least' ? least : most;
}
