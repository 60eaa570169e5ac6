// The same plans with only a part of what their actions are hoped to do.
import { printExpression } from '../spec/expression/print.ts';
import { readMeasure, type Dimension } from '../spec/quantity.ts';
import type { ActionSpec, EffectSpec, Spec } from '../spec/schema/spec.ts';

/** A share of 0 leaves plans that do nothing; what cannot be done in part, such as the loss of a patch, stays whole. */
export function withScaledEffects(spec: Spec, share: number): Spec {
  if (share === 0) {
    const names = Object.keys(spec.scenarios ?? {});
    return { ...spec, scenarios: Object.fromEntries(names.map((name) => [name, []])) };
  }
  const actions = structuredClone(spec.actions ?? {});
  for (const action of Object.values(actions)) scale(action, share);
  return { ...spec, actions };
}

function scale(action: ActionSpec, share: number): void {
  switch (action.kind) {
    case 'link':
      for (const key of ['crossing-death', 'turn-back', 'share'] as const) {
        if (action[key] !== undefined) action[key] = partOf(action[key], 'share', share);
      }
      if (action.distance !== undefined) action.distance = partOf(action.distance, 'length', share);
      return;
    case 'habitat':
      if (action.capacity !== undefined) action.capacity = partOf(action.capacity, 'share', share);
      if (action.area !== undefined) action.area = partOf(action.area, 'area', share);
      scaleAll(action.quality ?? {}, share);
      return;
    case 'change':
      scaleAll(action.parameters ?? {}, share);
      for (const classes of Object.values(action.rates ?? {})) scaleAll(classes, share);
      return;
    case 'take':
      if (action['share-of-excess'] !== undefined) action['share-of-excess'] = times(action['share-of-excess'], share);
      if (action.number !== undefined) action.number = amounts(action.number, share);
      if (action.share !== undefined) action.share = amounts(action.share, share);
      return;
    case 'move':
      if (action.number !== undefined) action.number = amounts(action.number, share);
      if (action.share !== undefined) action.share = amounts(action.share, share);
      return;
    case 'add':
      for (const [key, amount] of Object.entries(action.number)) action.number[key] = times(amount, share);
  }
}

function scaleAll(effects: Record<string, EffectSpec>, share: number): void {
  for (const [key, effect] of Object.entries(effects)) effects[key] = partOf(effect, 'share', share);
}

/** Of E(x) = set·times + add, or x·times + add where nothing is set: (1 − share) x + share E(x). */
function partOf({ set, times: factor, add }: EffectSpec, dimension: Dimension, share: number): EffectSpec {
  const [whole, more] = [baseUnits(factor ?? 1, 'share'), baseUnits(add ?? 0, dimension)];
  const rest = 1 - share;
  if (set !== undefined) {
    return { times: rest, add: `${share} * (${baseUnits(set, dimension)} * ${whole} + ${more})` };
  }
  return { times: `${rest} + ${share} * ${whole}`, ...(add === undefined ? {} : { add: `${share} * ${more}` }) };
}

/** An expression in the base unit of its dimension, which needs no unit behind it. */
function baseUnits(text: number | string, dimension: Dimension): string {
  const read = readMeasure(text, dimension);
  return `(${read.ok ? printExpression(read.ast) : String(text)})`;
}

type Amounts = number | string | Record<string, number | string>;

function amounts(written: Amounts, share: number): Amounts {
  if (typeof written !== 'object') return times(written, share);
  return Object.fromEntries(Object.entries(written).map(([key, amount]) => [key, times(amount, share)]));
}

/** `all` is no number and stays. */
function times(amount: number | string, share: number): number | string {
  if (typeof amount === 'number') return amount * share;
  return amount === 'all' ? amount : `${share} * ${baseUnits(amount, 'share')}`;
}
