// One mean year of a model from a given spread of animals, for the sake of the movement in it: each phase as its mean.
import type { CrowdingCoefficients } from '../compile/coefficients.ts';
import type { Landscape, Movement } from '../landscape/landscape.ts';
import { pinned } from '../machine/pinned.ts';
import type { Model, Phase, RatePart, RateTable } from '../model/model.ts';

export interface MeanYear {
  readonly model: Model;
  readonly landscape: Landscape;
  readonly coefficients: readonly CrowdingCoefficients[];
}

/** Called with the animals that arrive alive. */
type Moved = (from: number, to: number, animals: number) => void;

interface Moment extends MeanYear {
  /** From 1. */
  readonly step: number;
  readonly phase: number;
  /** P×C, changed by each phase in turn. */
  readonly animals: Float64Array;
  /** The multiplier of each crowding in each patch, once it is read. */
  readonly multipliers: Float64Array[];
  readonly moved: Moved;
}

/** Runs the phases of one step over `animals` (P×C, overwritten) and tells all movement. */
export function runMeanYear(year: MeanYear, step: number, animals: Float64Array, moved: Moved): void {
  const multipliers = year.model.crowding.map(() => new Float64Array(year.model.patches.length).fill(1));
  year.model.phases.forEach((one, phase) => {
    const moment = { ...year, step, phase, animals, multipliers, moved };
    readCrowding(moment);
    act(moment, one);
  });
}

function act(moment: Moment, phase: Phase): void {
  switch (phase.kind) {
    case 'count':
      return;
    case 'breeding':
      return breed(moment, phase.births, phase.into);
    case 'survival':
      return scale(moment, (p, c) => rate(moment, phase.survival, p, c) * multiplier(moment, 'survival', p, c));
    case 'ageing':
      return age(moment, phase.advance, phase.next);
    case 'demography':
      return project(moment, phase.fates, phase.births);
    case 'dispersal':
      return disperse(moment, phase.moves, phase.leaving);
    case 'ceiling': {
      const factor = phase.capacity.map((most, p) => {
        const present = crowd(moment, Float64Array.from(phase.counted), p);
        return present > most ? most / present : 1;
      });
      return scale(moment, (p, c) => (phase.counted[c] ? (factor[p] ?? 1) : 1));
    }
  }
}

function readCrowding({ model, coefficients, phase, animals, multipliers }: Moment): void {
  model.crowding.forEach((crowding, k) => {
    const coefficient = coefficients[k];
    if (coefficient === undefined || Math.min(...crowding.changes.map((one) => one.phase)) !== phase) return;
    const g = multipliers[k];
    for (let p = 0; g !== undefined && p < model.patches.length; p++) {
      g[p] = pressure(coefficient, p, crowd({ model, animals }, crowding.counted, p));
    }
  });
}

function pressure({ form, coefficient, alleeHalf }: CrowdingCoefficients, p: number, present: number): number {
  const [k, half] = [coefficient[p] ?? 0, alleeHalf[p] ?? 0];
  const allee = half > 0 ? present / (present + half) : 1;
  switch (form[p]) {
    case 'beverton-holt':
      return allee / (1 + k * present);
    case 'ricker':
      return allee * pinned.exp(-k * present);
    case 'ceiling':
      return present > k ? (allee * k) / present : allee;
    default:
      return allee;
  }
}

function multiplier({ model, phase, multipliers }: Moment, part: RatePart, p: number, c: number): number {
  let product = 1;
  model.crowding.forEach((crowding, k) => {
    const applies = crowding.changes.some((one) => one.phase === phase && one.part === part && one.classes[c] === 1);
    if (applies) product *= multipliers[k]?.[p] ?? 1;
  });
  return product;
}

function crowd({ model, animals }: Pick<Moment, 'model' | 'animals'>, weights: Float64Array, p: number): number {
  const classes = model.classes.length;
  return weights.reduce((sum, weight, c) => sum + weight * (animals[p * classes + c] ?? 0), 0);
}

function table(step: number, { epochs, epochOf }: RateTable): Float64Array {
  return epochs[epochOf.length === 0 ? 0 : (epochOf[step - 1] ?? 0)] ?? new Float64Array(0);
}

function rate(moment: Moment, rates: RateTable, p: number, c: number): number {
  return table(moment.step, rates)[p * moment.model.classes.length + c] ?? 0;
}

function scale({ model, animals }: Moment, factor: (p: number, c: number) => number): void {
  const classes = model.classes.length;
  for (let i = 0; i < animals.length; i++)
    animals[i] = (animals[i] ?? 0) * factor(Math.floor(i / classes), i % classes);
}

function breed(moment: Moment, births: RateTable, into: Float64Array): void {
  const { model, animals } = moment;
  const classes = model.classes.length;
  for (let p = 0; p < model.patches.length; p++) {
    let young = 0;
    for (let c = 0; c < classes; c++) {
      young += (animals[p * classes + c] ?? 0) * rate(moment, births, p, c) * multiplier(moment, 'births', p, c);
    }
    for (let c = 0; c < classes; c++)
      animals[p * classes + c] = (animals[p * classes + c] ?? 0) + young * (into[c] ?? 0);
  }
}

function age({ model, animals }: Moment, advance: Float64Array, next: Int32Array): void {
  const classes = model.classes.length;
  const before = animals.slice();
  before.forEach((count, i) => {
    const c = i % classes;
    const gone = count * (advance[c] ?? 0);
    const to = next[c] ?? -1;
    animals[i] = (animals[i] ?? 0) - gone;
    if (to >= 0) animals[i - c + to] = (animals[i - c + to] ?? 0) + gone;
  });
}

function project(moment: Moment, fates: RateTable, births: RateTable): void {
  const { model, animals, step } = moment;
  const classes = model.classes.length;
  const before = animals.slice();
  const [fate, birth] = [table(step, fates), table(step, births)];
  animals.fill(0);
  before.forEach((count, i) => {
    const [p, from] = [Math.floor(i / classes), i % classes];
    const [g, h] = [multiplier(moment, 'fates', p, from), multiplier(moment, 'births', p, from)];
    for (let to = 0; to < classes; to++) {
      const entry = (p * classes + to) * classes + from;
      const at = p * classes + to;
      animals[at] = (animals[at] ?? 0) + count * ((fate[entry] ?? 0) * g + (birth[entry] ?? 0) * h);
    }
  });
}

function disperse(moment: Moment, moves: Uint8Array, leaving: RateTable): void {
  const movement = moment.landscape.movements[moment.phase];
  if (movement === null || movement === undefined) return;
  const before = moment.animals.slice();
  const classes = moment.model.classes.length;
  before.forEach((count, i) => {
    const [p, c] = [Math.floor(i / classes), i % classes];
    const leavers = moves[c] === 1 ? count * rate(moment, leaving, p, c) : 0;
    if (leavers > 0) spread(moment, movement, i, leavers);
  });
}

function spread({ model, animals, moved }: Moment, movement: Movement, index: number, leavers: number): void {
  const classes = model.classes.length;
  const [p, c] = [Math.floor(index / classes), index % classes];
  animals[index] = (animals[index] ?? 0) - leavers;
  for (let k = movement.start[p] ?? 0; k < (movement.start[p + 1] ?? 0); k++) {
    const to = movement.destinations[k] ?? 0;
    const arrive = leavers * (movement.chance[k] ?? 0);
    animals[to * classes + c] = (animals[to * classes + c] ?? 0) + arrive;
    moved(p, to, arrive);
  }
}
