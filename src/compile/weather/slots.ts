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
  /** Slots of variation that scale rates. */
  readonly rates: readonly RateSlot[];
}

export function planSlots(model: Model): SlotPlan {
  const first = model.crowding.length;
  const varied = (model.variation?.varied ?? []).map((_, k) => first + k);
  const rates: RateSlot[] = (model.variation?.varied ?? []).flatMap(({ of }, k) =>
    of.kind === 'rate' ? [{ slot: first + k, phase: of.phase, part: of.part, class: of.class }] : [],
  );
  let count = first + varied.length;
  const responses = (model.variation?.responses ?? []).map(({ phase, part, class: c }) => {
    const known = rates.find((one) => one.phase === phase && one.part === part && one.class === c);
    if (known !== undefined) return known.slot;
    rates.push({ slot: count, phase, part, class: c });
    return count++;
  });
  return { count, varied, responses, rates };
}
