// The map of one phase over all patches and classes, at given multipliers and a given state.
import { chancesIn, type Landscape } from '../landscape/landscape.ts';
import type { CeilingPhase, DispersalPhase, Model, MovePhase, Phase, TakePhase } from '../model/model.ts';
import { sparseFromTriplets, type SparseMatrix } from '../numeric/sparse.ts';
import { keptShares } from './ceiling.ts';
import { takenShares } from './handling.ts';
import { birthsMap, fatesMap, lifeMap, type LifePhase } from './life-map.ts';
import { multiplierOf, type Multipliers } from './multipliers.ts';
import { roomOf } from './weather/room.ts';
import { tableAt } from './rates.ts';

export interface MapRequest {
  readonly model: Model;
  readonly landscape: Landscape;
  readonly step: number;
  readonly multipliers: Multipliers;
  /** P·C animals at the start of the phase; null for nobody, where ceilings take nobody. */
  readonly state: Float64Array | null;
  /** Everything, or only the animals that were there before, or only the new ones. */
  readonly part?: 'all' | 'fates' | 'births';
}

/** P·C × P·C; index p * C + c. */
export function phaseMap(index: number, request: MapRequest): SparseMatrix {
  const phase = request.model.phases[index];
  const size = request.model.patches.length * request.model.classes.length;
  const triplets = new TripletList(size);
  if (phase !== undefined) fill(triplets, { phase, index, request });
  return sparseFromTriplets(triplets.finish());
}

class TripletList {
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

  finish() {
    return {
      rows: this.#size,
      columns: this.#size,
      rowIndex: Int32Array.from(this.#row),
      columnIndex: Int32Array.from(this.#column),
      values: Float64Array.from(this.#value),
    };
  }
}

interface FillRequest {
  readonly phase: Phase;
  readonly index: number;
  readonly request: MapRequest;
}

function fill(triplets: TripletList, { phase, index, request }: FillRequest): void {
  switch (phase.kind) {
    case 'count':
      fillIdentity(triplets, request);
      return;
    case 'dispersal':
      fillDispersal(triplets, { phase, index, request });
      return;
    case 'ceiling':
      fillCeiling(triplets, phase, request);
      return;
    case 'take':
    case 'move':
      fillHandling(triplets, phase, request);
      return;
    case 'add':
      fillIdentity(triplets, request);
      return;
    case 'survival':
    case 'breeding':
    case 'ageing':
    case 'demography':
      fillLife(triplets, { phase, index, request });
  }
}

function fillIdentity(triplets: TripletList, { model, part }: MapRequest): void {
  if (part === 'births') return;
  for (let i = 0; i < model.patches.length * model.classes.length; i++) triplets.add(i, i, 1);
}

function fillLife(triplets: TripletList, fillRequest: FillRequest & { readonly phase: LifePhase }): void {
  const { phase, index, request } = fillRequest;
  const { model, step, multipliers } = request;
  const n = model.classes.length;
  const make = request.part === 'fates' ? fatesMap : request.part === 'births' ? birthsMap : lifeMap;
  for (let p = 0; p < model.patches.length; p++) {
    const animals = request.state?.subarray(p * n, p * n + n);
    const here = { model, phase: index, patch: p, step, multipliers, room: roomOf(model, request.landscape, p) };
    const map = make(phase, animals === undefined ? here : { ...here, animals });
    for (let i = 0; i < n * n; i++) triplets.add(p * n + Math.floor(i / n), p * n + (i % n), map[i] ?? 0);
  }
}

function fillDispersal(triplets: TripletList, fillRequest: FillRequest & { readonly phase: DispersalPhase }): void {
  const { phase, index, request } = fillRequest;
  const { model, landscape, step } = request;
  if (request.part === 'births') return;
  const movement = landscape.movements[index];
  const leaving = tableAt(phase.leaving, step);
  const chances = movement === null || movement === undefined ? new Float64Array(0) : chancesIn(movement, step);
  const n = model.classes.length;
  for (let p = 0; p < model.patches.length; p++) {
    for (let c = 0; c < n; c++) {
      const factor = multiplierOf(model, request.multipliers, { phase: index, part: 'leaving', patch: p, class: c });
      const share = phase.moves[c] === 1 ? (leaving[p * n + c] ?? 0) * factor : 0;
      triplets.add(p * n + c, p * n + c, 1 - share);
      if (share === 0 || movement === null || movement === undefined) continue;
      for (let k = movement.start[p] ?? 0; k < (movement.start[p + 1] ?? 0); k++) {
        triplets.add((movement.destinations[k] ?? 0) * n + c, p * n + c, share * (chances[k] ?? 0));
      }
    }
  }
}

/** Of each cell a share is taken; those moved enter the same class elsewhere. */
function fillHandling(
  triplets: TripletList,
  phase: TakePhase | MovePhase,
  { model, state, step, part }: MapRequest,
): void {
  if (part === 'births') return;
  const n = model.classes.length;
  const taken = takenShares(phase, { animals: state ?? new Float64Array(model.patches.length * n), classes: n, step });
  taken.forEach((share, i) => {
    triplets.add(i, i, 1 - share);
    if (phase.kind !== 'move') return;
    const alive = share * (phase.survival[i % n] ?? 0);
    triplets.add(phase.to * n + (i % n), i, alive * (1 - phase.homing));
    triplets.add(i, i, alive * phase.homing);
  });
}

function fillCeiling(triplets: TripletList, phase: CeilingPhase, request: MapRequest): void {
  const { model, landscape, state, part, step } = request;
  if (part === 'births') return;
  const n = model.classes.length;
  for (let p = 0; p < model.patches.length; p++) {
    const animals = state?.subarray(p * n, p * n + n) ?? new Float64Array(n);
    const kept = keptShares(phase, { patch: p, animals, room: roomOf(model, landscape, p), step });
    for (let c = 0; c < n; c++) triplets.add(p * n + c, p * n + c, kept[c] ?? 1);
  }
}
