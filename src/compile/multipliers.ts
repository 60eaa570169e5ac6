// What the conditions of a year multiply the named rates by.
import type { Model, RatePart } from '../model/model.ts';

/** For each crowding one multiplier a patch, as read at the start of the first phase that it changes. */
export type Multipliers = readonly Float64Array[];

export function unitMultipliers(model: Model): Multipliers {
  return model.crowding.map(() => new Float64Array(model.patches.length).fill(1));
}

export interface RateOf {
  readonly phase: number;
  readonly part: RatePart;
  readonly patch: number;
  readonly class: number;
}

/** Product of the multipliers of all conditions that name this rate. */
export function multiplierOf(model: Model, multipliers: Multipliers, rate: RateOf): number {
  let factor = 1;
  model.crowding.forEach((crowding, k) => {
    const named = crowding.changes.some(
      ({ phase, part, classes }) => phase === rate.phase && part === rate.part && classes[rate.class] === 1,
    );
    if (named) factor *= multipliers[k]?.[rate.patch] ?? 1;
  });
  return factor;
}

/** The phase at whose start a crowding reads its count: the first that it changes. */
export function readingPhase(model: Model, crowding: number): number {
  const phases = model.crowding[crowding]?.changes.map(({ phase }) => phase) ?? [];
  return Math.min(...phases);
}
