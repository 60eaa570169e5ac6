// Replicates that go on from saved states, each until a count of it first lies below a level: the parts of multilevel splitting.
import * as layout from '../../assembly/layout.ts';
import { headerOf } from '../compile/image/read.ts';
import type { Machine } from '../machine/instance.ts';
import { openOwnImage } from './open.ts';

const wordSize = 4294967296;

/** Where a trial begins: a replicate as it stood when its count first lay below a level. */
export interface Entrance {
  readonly step: number;
  /** The count then. */
  readonly value: number;
  /** The whole state of its lane; null for the start. */
  readonly state: Uint8Array | null;
}

export interface TrialRequest {
  /** A trial ends when its count is below this. */
  readonly level: number;
  /** Of the outcome whose count it is, from 0. */
  readonly outcome: number;
  /** Counts are taken as less than nothing, −N, so that a rise falls below a level. */
  readonly rising?: boolean;
  readonly steps: number;
  readonly seed: number;
  /** Trial i is replicate `firstReplicate` + i: from its entrance on it meets a chance of its own. */
  readonly firstReplicate: number;
}

export interface TrialsDone {
  /** Of the trials that came below the level, where they did. */
  readonly hits: readonly Entrance[];
  /** Of each trial its lowest count from its entrance on, up to where it ended. */
  readonly lowest: Float64Array;
  /** Years of replicates that were run. */
  readonly replicateYears: number;
  /** Replicates that the kernel had to stop. */
  readonly stopped: number;
}

export class Trials {
  readonly #machine: Machine;
  readonly #steps: number;
  readonly #firstColumn: number;
  readonly #room: number;

  constructor(image: ArrayBuffer) {
    this.#machine = openOwnImage(image);
    const header = headerOf(image);
    this.#steps = header[layout.headerSteps] ?? 0;
    this.#firstColumn = 1 + (header[layout.headerPatches] ?? 0);
    this.#room = this.#machine.reserve(this.#machine.laneBytes());
    if (this.#room === 0) throw new Error('There is no memory for the state of a replicate.');
  }

  /** The count of an outcome at the start, which is the same in every replicate. */
  startCount(outcome: number): number {
    const machine = this.#machine;
    machine.start(1, 0, 0);
    const at = machine.observed() + (this.#firstColumn + outcome) * layout.lanes * 8;
    return new Float64Array(machine.memory.buffer, at, 1)[0] ?? 0;
  }

  /** One trial from each entrance. A trial whose entrance lies below the level already has come there by a jump. */
  run(entrances: readonly Entrance[], request: TrialRequest): TrialsDone {
    const lowest = Float64Array.from(entrances, ({ value, state }) => (state === null ? Infinity : value));
    const hits = new Map<number, Entrance>();
    entrances.forEach((entrance, i) => {
      if (entrance.state !== null && entrance.value < request.level) hits.set(i, entrance);
    });
    const open = entrances.map((_, i) => i).filter((i) => !hits.has(i));
    let [replicateYears, stopped] = [0, 0];
    for (const lanes of sameStep(open, entrances)) {
      const ended = this.#batch(lanes, { entrances, request, lowest, hits });
      replicateYears += ended.years * lanes.length;
      stopped += ended.stopped;
    }
    const inOrder = [...hits].sort(([a], [b]) => a - b).map(([, entrance]) => entrance);
    return { hits: inOrder, lowest, replicateYears, stopped };
  }

  #batch(lanes: readonly number[], work: Work): { readonly years: number; readonly stopped: number } {
    const { request, lowest, hits } = work;
    const machine = this.#machine;
    const first = this.#open(lanes, work);
    const open = new Set(lanes.keys());
    const column = (this.#firstColumn + request.outcome) * layout.lanes;
    let [step, stopped] = [first, 0];
    while (step < Math.min(request.steps, this.#steps) && open.size > 0) {
      machine.step();
      step++;
      const values = new Float64Array(machine.memory.buffer, machine.observed() + column * 8, layout.lanes);
      const stops = new Int32Array(machine.memory.buffer, machine.stops(), layout.lanes * 3);
      for (const lane of open) {
        const [i, count] = [lanes[lane] ?? 0, values[lane] ?? 0];
        const value = request.rising === true ? -count : count;
        if (stops[lane * 3] !== layout.faultNone) {
          stopped++;
          open.delete(lane);
          continue;
        }
        lowest[i] = Math.min(lowest[i] ?? Infinity, value);
        if (value >= request.level) continue;
        hits.set(i, { step, value, state: this.#save(lane) });
        open.delete(lane);
      }
    }
    return { years: step - first, stopped };
  }

  /** Puts the states of the entrances into the lanes, each under a replicate number of its own; the step they are at. */
  #open(lanes: readonly number[], { entrances, request }: Work): number {
    const { seed, firstReplicate } = request;
    const machine = this.#machine;
    const numberLanes = (): void => {
      const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), layout.lanes);
      lanes.forEach((i, lane) => (numbers[lane] = firstReplicate + i));
    };
    const step = entrances[lanes[0] ?? 0]?.step ?? 0;
    const fresh = lanes.every((i) => entrances[i]?.state === null);
    numberLanes();
    machine.start(fresh ? lanes.length : 0, seed % wordSize, Math.floor(seed / wordSize));
    if (fresh) return step;
    machine.setBatchStep(step);
    lanes.forEach((i, lane) => {
      const state = entrances[i]?.state;
      if (!state) throw new Error('A trial from the start shares its lanes with one from a saved state.');
      new Uint8Array(machine.memory.buffer, this.#room, state.length).set(state);
      if (machine.restoreLane(lane, this.#room) === 0) throw new Error('A state was saved at another step.');
    });
    // The saved states carry the numbers of the replicates that they are from.
    numberLanes();
    return step;
  }

  #save(lane: number): Uint8Array {
    this.#machine.saveLane(lane, this.#room);
    return new Uint8Array(this.#machine.memory.buffer, this.#room, this.#machine.laneBytes()).slice();
  }
}

interface Work {
  readonly entrances: readonly Entrance[];
  readonly request: TrialRequest;
  readonly lowest: Float64Array;
  readonly hits: Map<number, Entrance>;
}

/** Groups of at most sixteen trials that begin at the same step, since lanes go on together. */
function* sameStep(trials: readonly number[], entrances: readonly Entrance[]): Generator<readonly number[]> {
  const byStep = new Map<number, number[]>();
  for (const i of trials) {
    const step = entrances[i]?.step ?? 0;
    const group = byStep.get(step) ?? [];
    byStep.set(step, group);
    group.push(i);
  }
  for (const group of byStep.values()) {
    for (let at = 0; at < group.length; at += layout.lanes) yield group.slice(at, at + layout.lanes);
  }
}
