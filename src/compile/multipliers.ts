// What the conditions of a year multiply the named rates by.
import type { MultipliedRate, ScaledPart } from '../model/chance.ts';
import type { Model } from '../model/model.ts';

/**
 * For each crowding one multiplier a patch, as read at the start of the first phase that it changes; then for each catastrophe
 * the share of years in which it is on.
 */
export type Multipliers = readonly Float64Array[];

export function unitMultipliers(model: Model): Multipliers {
  const every = (value: number) => new Float64Array(model.patches.length).fill(value);
  return [...model.crowding.map(() => every(1)), ...model.catastrophes.map(() => every(0))];
}

const atRest = new WeakMap<Model, Multipliers>();

/** Those of nobody, made once for a model: not to be written to. */
export function multipliersAtRest(model: Model): Multipliers {
  const made = atRest.get(model) ?? unitMultipliers(model);
  atRest.set(model, made);
  return made;
}

export interface RateOf {
  readonly phase: number;
  readonly part: ScaledPart;
  readonly patch: number;
  readonly class: number;
}

/** Product of the multipliers of all conditions that name this rate; of a catastrophe the mean over the years. */
export function multiplierOf(model: Model, multipliers: Multipliers, rate: RateOf): number {
  let factor = 1;
  model.crowding.forEach((crowding, k) => {
    const named = crowding.changes.some(
      ({ phase, part, classes }) => phase === rate.phase && part === rate.part && classes[rate.class] === 1,
    );
    if (named) factor *= multipliers[k]?.[rate.patch] ?? 1;
  });
  model.catastrophes.forEach(({ multiplies }, k) => {
    const on = multipliers[model.crowding.length + k]?.[rate.patch] ?? 0;
    if (on > 0) for (const one of multiplies) if (isRate(one, rate)) factor *= 1 - on * (1 - one.times);
  });
  return factor;
}

function isRate(one: MultipliedRate, rate: RateOf): boolean {
  return one.phase === rate.phase && one.part === rate.part && one.class === rate.class;
}

/** The phase at whose start a crowding reads its count: the first that it changes. */
export function readingPhase(model: Model, crowding: number): number {
  const phases = model.crowding[crowding]?.changes.map(({ phase }) => phase) ?? [];
  return Math.min(...phases);
}
