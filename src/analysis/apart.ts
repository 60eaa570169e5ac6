// Patches each for itself: nobody moves between them, and nobody takes, moves or releases animals.
import { buildImage } from '../compile/image/build.ts';
import type { Compiled } from '../compile/year-map.ts';
import { openYear } from '../kernel/year.ts';
import type { CeilingPhase, Phase } from '../model/model.ts';

const settledShare = 1e-12;
const longest = 3000;
/** After so many years, few patches that still change are left to a method that is better at slow ones. */
const early = 300;
const few = 64;

export interface SettledApart {
  /** P·C, as they are at the end. */
  readonly animals: Float64Array;
  /** 1 for each patch that stands still, or has died out. */
  readonly still: Uint8Array;
}

/** All patches side by side in the kernel, until each stands still or so many years have gone by. */
export function settledApart(compiled: Compiled, start: Float64Array): SettledApart {
  const apart = allApart(compiled);
  const n = apart.model.classes.length;
  const year = openYear(buildImage({ ...apart, startAnimals: new Float64Array(start.length) }));
  const still = new Uint8Array(apart.model.patches.length);
  let animals = start;
  for (let t = 0, moving = still.length; t < longest && moving > 0 && !(t >= early && moving <= few); t++) {
    const next = year(animals);
    moving = 0;
    still.forEach((_, p) => {
      let [change, size, first] = [0, 0, 0];
      for (let i = p * n; i < p * n + n; i++) {
        change += Math.abs((next[i] ?? 0) - (animals[i] ?? 0));
        size += Math.abs(next[i] ?? 0);
        first += start[i] ?? 0;
      }
      const gone = size < 1e-9 * Math.max(1, first);
      if (gone) next.fill(0, p * n, p * n + n);
      still[p] = gone || change <= settledShare * size ? 1 : 0;
      moving += 1 - (still[p] ?? 0);
    });
    animals = next;
  }
  return { animals, still };
}

function allApart({ model, landscape, coefficients }: Compiled): Compiled {
  const never = new Int32Array(model.steps);
  const phases = model.phases.map((phase): Phase => {
    if (phase.kind === 'dispersal') return { ...phase, moves: new Uint8Array(model.classes.length) };
    return 'active' in phase ? { ...phase, active: never } : phase;
  });
  return {
    model: { ...model, phases, catastrophes: [], outcomes: [], variation: null },
    landscape: { movements: landscape.movements },
    coefficients,
  };
}

/** A compiled model of one patch alone. */
export function onePatch({ model, coefficients }: Compiled, p: number): Compiled {
  const n = model.classes.length;
  const pick = (values: Float64Array, size: number): Float64Array => values.slice(p * size, p * size + size);
  const table = (rates: { readonly epochs: readonly Float64Array[]; readonly epochOf: Int32Array }, size: number) => ({
    epochs: rates.epochs.map((epoch) => pick(epoch, size)),
    epochOf: rates.epochOf,
  });
  const never = new Int32Array(model.steps);
  // Years that follow change nothing here: what is asked for is the first year again and again.
  const ceilingOf = ({ capacityByYear, ...phase }: CeilingPhase): CeilingPhase => ({
    ...phase,
    capacity: pick(phase.capacity, 1),
  });
  const waitsOf = (waits: CeilingPhase | undefined) => (waits === undefined ? {} : { waits: ceilingOf(waits) });
  const phases = model.phases.map((phase) => {
    switch (phase.kind) {
      case 'survival':
        return { ...phase, survival: table(phase.survival, n) };
      case 'breeding':
        return { ...phase, births: table(phase.births, n), ...waitsOf(phase.waits) };
      case 'demography':
        return { ...phase, fates: table(phase.fates, n * n), births: table(phase.births, n * n) };
      case 'ceiling':
        return ceilingOf(phase);
      case 'dispersal':
        return { ...phase, moves: new Uint8Array(n) };
      case 'take':
      case 'move':
        return { ...phase, active: never, patches: new Uint8Array(1), levels: pick(phase.levels, 1), to: 0 };
      case 'add':
        return { ...phase, active: never, amounts: table(phase.amounts, n) };
      case 'ageing':
        return phase.advanceIn === undefined ? phase : { ...phase, advanceIn: pick(phase.advanceIn, n) };
      case 'count':
        return phase;
    }
  });
  return {
    model: { ...model, patches: model.patches.slice(p, p + 1), phases },
    landscape: { movements: phases.map(() => null) },
    coefficients: coefficients.map(({ form, coefficient, coefficientByYear, alleeHalf, ...others }) => ({
      ...others,
      form: form.slice(p, p + 1),
      coefficient: pick(coefficient, 1),
      alleeHalf: pick(alleeHalf, 1),
    })),
  };
}
