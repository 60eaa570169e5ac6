// Slots of a model: numbers by patch that conditions write and phases multiply their rates by. Crowdings come first, in their order.
import type { ScaledPart } from '../../model/chance.ts';
import type { Model } from '../../model/model.ts';

/** A slot that scales the rate of a class. */
export interface RateSlot {
  readonly slot: number;
  readonly phase: number;
  readonly part: ScaledPart;
  readonly class: number;
}

export interface SlotPlan {
  readonly count: number;
  /** Of each varied quantity, in their order. */
  readonly varied: readonly number[];
  /** Of each response; those of one rate share a slot. */
  readonly responses: readonly number[];
  /** Of each driver whose years are drawn; responses alone read them. */
  readonly drivers: readonly number[];
  /** Slots of variation and catastrophes that scale rates. */
  readonly rates: readonly RateSlot[];
  /** Of each catastrophe: one slot for each number that rates are multiplied by, then one for its capacity, if it lowers any. */
  readonly catastrophes: readonly CatastropheSlots[];
  /** What is left of capacities. */
  readonly rooms: readonly number[];
}

export interface CatastropheSlots {
  readonly slots: readonly number[];
  /** What the slot is where the catastrophe is on. */
  readonly values: readonly number[];
  readonly capacity: boolean;
}

export function planSlots(model: Model): SlotPlan {
  const first = model.crowding.length;
  const varied = (model.variation?.varied ?? []).map((_, k) => first + k);
  const rates: RateSlot[] = (model.variation?.varied ?? []).flatMap(({ of }, k) =>
    of.kind === 'rate' ? [{ slot: first + k, phase: of.phase, part: of.part, class: of.class }] : [],
  );
  let count = first + varied.length;
  const drivers = (model.variation?.resampled?.names ?? []).map(() => count++);
  const responses = (model.variation?.responses ?? []).map(({ phase, part, class: c }) => {
    const known = rates.find((one) => one.phase === phase && one.part === part && one.class === c);
    if (known !== undefined) return known.slot;
    rates.push({ slot: count, phase, part, class: c });
    return count++;
  });
  const catastrophes = model.catastrophes.map(({ multiplies, capacity }): CatastropheSlots => {
    const values = [...new Set(multiplies.map(({ times }) => times))];
    const slots = values.map(() => count++);
    for (const { times, phase, part, class: c } of multiplies) {
      rates.push({ slot: slots[values.indexOf(times)] ?? 0, phase, part, class: c });
    }
    if (capacity === null) return { slots, values, capacity: false };
    return { slots: [...slots, count++], values: [...values, capacity.times], capacity: true };
  });
  const rooms = catastrophes.flatMap(({ slots, capacity }) => (capacity ? slots.slice(-1) : []));
  return { count, varied, drivers, responses, rates, catastrophes, rooms };
}
