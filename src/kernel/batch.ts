// Runs replicates in batches of lanes. What a replicate gives depends on its number and the seed alone, never on its batch.
import * as layout from '../../assembly/layout.ts';
import { headerOf, readNames } from '../compile/image/read.ts';
import type { Machine } from '../machine/instance.ts';
import { eachStep } from './moved.ts';
import type { BatchCounts, Stop } from './output.ts';
import type { WeatherTape } from './weather-tape.ts';

/** Numbers in 32 bits. */
const wordSize = 4294967296;

export interface RunRequest {
  readonly steps: number;
  /** A whole number below 2^53. */
  readonly seed: number;
  /** Number of the first replicate; 0 unless a run is split. */
  readonly firstReplicate?: number;
  /** Whether animals that move are counted for each way and step. */
  readonly keepMoved?: boolean;
  /** Whether the counts of a batch may be written over by the next: fresh memory costs more than it takes to fill it. */
  readonly reuse?: boolean;
}

/** Replicates side by side, at most. */
export const lanes = layout.lanes;

/** Replicates of a run: so many from a position on, at most sixteen. */
export interface Batch {
  readonly first: number;
  readonly lanes: number;
}

/** The fixed batches of so many replicates. */
export function batchesOf(replicates: number, sideBySide: number = lanes): readonly Batch[] {
  const most = Math.min(sideBySide, lanes);
  return Array.from({ length: Math.ceil(replicates / most) }, (_, i) => ({
    first: i * most,
    lanes: Math.min(most, replicates - i * most),
  }));
}

/** On an instance in which the image is open. Memory for counts is taken from `spare` as long as there is some. */
export function runnerOn(
  machine: Machine,
  image: ArrayBuffer,
  request: RunRequest,
  spare: Float64Array<ArrayBuffer>[] = [],
): (batch: Batch) => BatchCounts {
  const run = tapedRunnerOn(machine, image, request, spare);
  return (batch) => run(batch, null);
}

/** Under a tape, its replicates are those of the batch, and the weather of the image is drawn from the same as that on it. */
export type TapedRunner = (batch: Batch, tape: WeatherTape | null) => BatchCounts;

export function tapedRunnerOn(
  machine: Machine,
  image: ArrayBuffer,
  request: RunRequest,
  spare: Float64Array<ArrayBuffer>[] = [],
): TapedRunner {
  const header = headerOf(image);
  const columns = header[layout.headerColumns] ?? 0;
  const ways = request.keepMoved === true ? (header[layout.headerWays] ?? 0) : null;
  const { phases } = readNames(image);
  const size = (request.steps + 1) * columns * layout.lanes;
  const shared = request.reuse === true ? new Float64Array(size) : null;
  return (batch, tape) => {
    const counts = shared ?? memoryOf(size, spare);
    const movedSoFar = new Float64Array((request.steps + 1) * (ways ?? 0));
    startBatch(machine, request, batch);
    const observed = observedIn(machine, columns);
    counts.set(observed);
    const go = tape === null ? machine.step : tape.stepsOn(machine);
    for (let step = 1; step <= request.steps; step++) {
      go(step);
      counts.set(observed, step * observed.length);
      if (ways !== null) movedSoFar.set(new Float64Array(machine.memory.buffer, machine.moved(), ways), step * ways);
    }
    const stopped = stopsOf(machine, batch, phases);
    return { ...batch, counts, stopped, moved: ways === null ? null : eachStep(movedSoFar, ways) };
  };
}

/** Everything in it is written over. */
function memoryOf(size: number, spare: Float64Array<ArrayBuffer>[]): Float64Array<ArrayBuffer> {
  const last = spare.pop();
  return last?.length === size ? last : new Float64Array(size);
}

function startBatch(machine: Machine, { seed, firstReplicate = 0 }: RunRequest, { first, lanes }: Batch): void {
  const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), layout.lanes);
  for (let lane = 0; lane < layout.lanes; lane++) numbers[lane] = firstReplicate + first + lane;
  machine.start(lanes, seed % wordSize, Math.floor(seed / wordSize));
}

function observedIn(machine: Machine, columns: number): Float64Array {
  return new Float64Array(machine.memory.buffer, machine.observed(), columns * layout.lanes);
}

function stopsOf(machine: Machine, { first, lanes }: Batch, phases: readonly string[]): readonly Stop[] {
  const table = new Int32Array(machine.memory.buffer, machine.stops(), layout.lanes * 3);
  const stops: Stop[] = [];
  for (let lane = 0; lane < lanes; lane++) {
    const code = table[lane * 3] ?? 0;
    if (code === layout.faultNone) continue;
    const [index = 0, step = 0] = table.subarray(lane * 3 + 1, lane * 3 + 3);
    const reason = stopReason(code, phases[index] ?? `phase ${String(index)}`);
    stops.push({ replicate: first + lane, step, reason });
  }
  return stops;
}

function stopReason(code: number, phase: string): string {
  if (code === layout.faultTooMany) return `more than 1,000,000,000 animals in the phase ${phase}`;
  throw new Error(`The kernel stopped a replicate with the unknown code ${String(code)}.`);
}
