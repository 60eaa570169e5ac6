// What resolving one spec leaves for the next that differs from it in the values of some parameters alone: parts of the model that
// read none of them. A part is a function of the spec's words and of the numbers that it asks for, so that what reads no number that
// moves comes out the same, and is kept.
import type { Crowding, Phase, RateTable, WaysByYear } from './model.ts';
import type { Numbers } from './numbers.ts';

/** Parts of one kind, by name. */
class Parts<T> {
  readonly #moving: ReadonlySet<string>;
  /** Null for those that read what moves: they are made anew each time. */
  readonly #kept = new Map<string, { readonly part: T } | null>();

  constructor(moving: ReadonlySet<string>) {
    this.#moving = moving;
  }

  of(name: string, numbers: Numbers, make: () => T): T {
    const known = this.#kept.get(name);
    if (known !== undefined) return known === null ? make() : known.part;
    const { made, names } = numbers.traced(make);
    const moves = [...names].some((one) => this.#moving.has(one));
    this.#kept.set(name, moves ? null : { part: made });
    return made;
  }
}

export class ModelMemory {
  readonly phases: Parts<Phase | null>;
  readonly leaving: Parts<RateTable>;
  readonly ways: Parts<WaysByYear | null>;
  readonly capacities: Parts<Pick<Crowding, 'capacity' | 'capacityByYear'>>;

  /** `moving` are the names of parameters whose values differ between the specs. */
  constructor(moving: ReadonlySet<string>) {
    this.phases = new Parts(moving);
    this.leaving = new Parts(moving);
    this.ways = new Parts(moving);
    this.capacities = new Parts(moving);
  }
}
