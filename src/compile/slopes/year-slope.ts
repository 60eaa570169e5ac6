// How the matrix of a whole year, at given animals at the count, moves with a number of the model: the product rule over its phases.
import { movementSlopes } from '../../landscape/movement-slopes.ts';
import type { CeilingPhase, DispersalPhase, MovePhase, Phase, TakePhase } from '../../model/model.ts';
import type { ModelSlopes } from '../../model/slopes/slopes.ts';
import { multiply, product, weightedSum } from '../../numeric/sparse-product.ts';
import { sparseFromTriplets, type SparseMatrix } from '../../numeric/sparse.ts';
import { addedAnimals } from '../handling.ts';
import type { LifePhase, LifeRequest } from '../life-map.ts';
import { multiplierOf, readingPhase, unitMultipliers, type Multipliers } from '../multipliers.ts';
import { phaseMap } from '../phase-map.ts';
import { tableAt } from '../rates.ts';
import { roomOf } from '../weather/room.ts';
import { readMultipliers, type Compiled } from '../year-map.ts';
import { birthFactorSlope } from './birth-factors.ts';
import { keptSlopes } from './ceiling-slope.ts';
import { multiplierSlope } from './crowding-slope.ts';
import { takenSlope } from './handling-slope.ts';
import { lifeSlope } from './life-slope.ts';

export interface YearSlopeRequest {
  readonly compiled: Compiled;
  readonly slopes: ModelSlopes;
  /** By crowding and patch. */
  readonly coefficientSlopes: readonly Float64Array[];
  /** Of the phases, where an earlier walk from the same animals has told them. */
  readonly maps?: readonly SparseMatrix[];
}

/** P·C × P·C. The animals at the count are held; those within the year move, and with them crowding and ceilings. */
export function yearSlope(request: YearSlopeRequest, before: Float64Array): SparseMatrix {
  let year: SparseMatrix | null = null;
  let slope: SparseMatrix | null = null;
  walkYear(request, { animals: before, slopes: new Float64Array(before.length) }, (map, moved) => {
    slope = slope === null || year === null ? moved : weightedSum([1, product(map, slope)], [1, product(moved, year)]);
    year = year === null ? map : product(map, year);
  });
  if (slope === null) throw new RangeError('A year has at least one phase.');
  return slope;
}

export interface MovingAnimals {
  readonly animals: Float64Array;
  readonly slopes: Float64Array;
}

/** The animals after the year and their slopes; told of the map of each phase and how it moves. */
export function walkYear(
  request: YearSlopeRequest,
  { animals, slopes }: MovingAnimals,
  visit: (map: SparseMatrix, moved: SparseMatrix) => void,
): MovingAnimals {
  const { model, landscape } = request.compiled;
  const multipliers = unitMultipliers(model);
  landscape.strikes?.forEach(({ on }, k) => multipliers[model.crowding.length + k]?.set(on));
  const multiplierSlopes = model.crowding.map(() => new Float64Array(model.patches.length));
  let [state, stateSlope] = [animals, slopes];
  model.phases.forEach((phase, index) => {
    readCrowding(request, { index, multipliers, multiplierSlopes, state, stateSlope });
    const map = request.maps?.[index] ?? phaseMap(index, { model, landscape, step: 1, multipliers, state });
    const moved = phaseSlope(request, { phase, index, multipliers, multiplierSlopes, state, stateSlope });
    visit(map, moved);
    const carried = multiply(map, stateSlope);
    stateSlope = multiply(moved, state).map((value, i) => value + (carried[i] ?? 0));
    state = multiply(map, state);
    if (phase.kind === 'add') {
      const added = addedAnimals(phase, 1);
      state = state.map((value, i) => value + (added[i] ?? 0));
    }
  });
  return { animals: state, slopes: stateSlope };
}

interface Moment {
  readonly index: number;
  readonly multipliers: Multipliers;
  readonly multiplierSlopes: readonly Float64Array[];
  readonly state: Float64Array;
  readonly stateSlope: Float64Array;
}

function readCrowding(
  request: YearSlopeRequest,
  { index, multipliers, multiplierSlopes, state, stateSlope }: Moment,
): void {
  const { model, landscape, coefficients } = request.compiled;
  model.crowding.forEach((crowding, k) => {
    const own = coefficients[k];
    const moved = request.slopes.crowding[k];
    if (readingPhase(model, k) !== index || own === undefined || moved === undefined) return;
    readMultipliers({ model, landscape, k, own, into: multipliers[k] }, state);
    model.patches.forEach((_, p) => {
      const count = (values: Float64Array): number =>
        crowding.counted.reduce((sum, weight, c) => sum + weight * (values[p * model.classes.length + c] ?? 0), 0);
      const into = multiplierSlopes[k];
      if (into === undefined) return;
      into[p] = multiplierSlope(own, p, {
        count: count(state),
        countSlope: count(stateSlope),
        coefficientSlope: request.coefficientSlopes[k]?.[p] ?? 0,
        alleeHalfSlope: moved.alleeHalf[p] ?? 0,
        shapeNumberSlope: moved.shapeNumber,
        room: roomOf(model, landscape, p),
      });
    });
  });
}

interface PhaseMoment extends Moment {
  readonly phase: Phase;
}

class Entries {
  readonly #size: number;
  readonly #row: number[] = [];
  readonly #column: number[] = [];
  readonly #value: number[] = [];

  constructor(size: number) {
    this.#size = size;
  }

  add(row: number, column: number, value: number): void {
    if (value === 0) return;
    this.#row.push(row);
    this.#column.push(column);
    this.#value.push(value);
  }

  matrix(): SparseMatrix {
    const [rowIndex, columnIndex, values] = [this.#row, this.#column, this.#value];
    return sparseFromTriplets({ rows: this.#size, columns: this.#size, rowIndex, columnIndex, values });
  }
}

function phaseSlope(request: YearSlopeRequest, moment: PhaseMoment): SparseMatrix {
  const entries = new Entries(moment.state.length);
  const { phase } = moment;
  switch (phase.kind) {
    case 'count':
    case 'add':
      break;
    case 'take':
    case 'move':
      addHandling(entries, request, { ...moment, phase });
      break;
    case 'dispersal':
      addDispersal(entries, request, { ...moment, phase });
      break;
    case 'ceiling':
      addCeiling(entries, request, { ...moment, phase });
      break;
    case 'survival':
    case 'breeding':
    case 'ageing':
    case 'demography':
      addLife(entries, request, { ...moment, phase });
  }
  return entries.matrix();
}

function addHandling(
  entries: Entries,
  { compiled }: YearSlopeRequest,
  { phase, state, stateSlope }: Moment & { readonly phase: TakePhase | MovePhase },
): void {
  const classes = compiled.model.classes.length;
  takenSlope(phase, { state, stateSlope, classes }).forEach((slope, i) => {
    entries.add(i, i, -slope);
    if (phase.kind !== 'move') return;
    const alive = slope * (phase.survival[i % classes] ?? 0);
    entries.add(phase.to * classes + (i % classes), i, alive * (1 - phase.homing));
    entries.add(i, i, alive * phase.homing);
  });
}

function addLife(
  entries: Entries,
  { compiled, slopes }: YearSlopeRequest,
  { phase, index, multipliers, multiplierSlopes, state, stateSlope }: Moment & { readonly phase: LifePhase },
): void {
  const { model, landscape } = compiled;
  const n = model.classes.length;
  const moved = slopes.phases[index] ?? null;
  model.patches.forEach((_, p) => {
    const animals = state.subarray(p * n, p * n + n);
    const room = roomOf(model, landscape, p);
    const request: LifeRequest = { model, phase: index, patch: p, step: 1, multipliers, room, animals };
    const slope = lifeSlope({
      phase,
      slopes: moved,
      request,
      multiplierSlopes: multiplierSlopes.map((own) => own[p] ?? 0),
    });
    if (phase.kind === 'breeding') {
      const animalSlopes = stateSlope.subarray(p * n, p * n + n);
      const factors = birthFactorSlope({ phase, request, animalSlopes, slopes: slopes.phases });
      factors.forEach((own, i) => (slope[i] = (slope[i] ?? 0) + own));
    }
    for (let i = 0; i < n * n; i++) entries.add(p * n + Math.floor(i / n), p * n + (i % n), slope[i] ?? 0);
  });
}

function addDispersal(
  entries: Entries,
  { compiled, slopes }: YearSlopeRequest,
  { phase, index, multipliers }: Moment & { readonly phase: DispersalPhase },
): void {
  const { model, landscape } = compiled;
  const moved = slopes.phases[index];
  const movement = landscape.movements[index];
  if (moved?.kind !== 'dispersal') return;
  const n = model.classes.length;
  const [leaving, leavingSlope] = [tableAt(phase.leaving, 1), tableAt(moved.leaving, 1)];
  movementSlopes(model, phase, moved).forEach((ways, p) => {
    for (let c = 0; c < n; c++) {
      if (phase.moves[c] !== 1) continue;
      const from = p * n + c;
      const factor = multiplierOf(model, multipliers, { phase: index, part: 'leaving', patch: p, class: c });
      const [share, shareSlope] = [(leaving[from] ?? 0) * factor, (leavingSlope[from] ?? 0) * factor];
      entries.add(from, from, -shareSlope);
      for (const { to, slope } of ways) entries.add(to * n + c, from, share * slope);
      for (let k = movement?.start[p] ?? 0; k < (movement?.start[p + 1] ?? 0); k++) {
        entries.add((movement?.destinations[k] ?? 0) * n + c, from, shareSlope * (movement?.chance[k] ?? 0));
      }
    }
  });
}

function addCeiling(
  entries: Entries,
  { compiled, slopes }: YearSlopeRequest,
  { phase, index, state, stateSlope }: Moment & { readonly phase: CeilingPhase },
): void {
  const n = compiled.model.classes.length;
  const moved = slopes.phases[index];
  compiled.model.patches.forEach((_, p) => {
    const kept = keptSlopes(phase, {
      patch: p,
      room: roomOf(compiled.model, compiled.landscape, p),
      animals: state.subarray(p * n, p * n + n),
      animalSlopes: stateSlope.subarray(p * n, p * n + n),
      capacitySlope: moved?.kind === 'ceiling' ? (moved.capacity[p] ?? 0) : 0,
    });
    kept.forEach((slope, c) => {
      entries.add(p * n + c, p * n + c, slope);
    });
  });
}
