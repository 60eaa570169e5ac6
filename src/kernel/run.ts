// Runs replicates in batches of lanes. What a replicate gives depends on its number and the seed alone, never on its batch.
import * as layout from '../../assembly/layout.ts';
import { headerOf, readNames } from '../compile/image/read.ts';
import type { Machine } from '../machine/machine.ts';
import { openOwnImage } from './open.ts';
import { eachStep } from './moved.ts';
import type { RawRun } from './output.ts';

/** Numbers in 32 bits. */
const wordSize = 4294967296;

export interface RunRequest {
  readonly replicates: number;
  readonly steps: number;
  /** A whole number below 2^53. */
  readonly seed: number;
  /** Number of the first replicate; 0 unless a run is split. */
  readonly firstReplicate?: number;
  /** Replicates side by side, at most 16. */
  readonly lanes?: number;
  /** Told after each batch how many replicates are done. */
  readonly onProgress?: (done: number) => void;
}

export function runReplicates(image: ArrayBuffer, request: RunRequest): RawRun {
  const machine = openOwnImage(image);
  const { replicates, steps } = request;
  const columns = headerOf(image)[layout.headerColumns] ?? 0;
  const ways = headerOf(image)[layout.headerWays] ?? 0;
  const movedSoFar = new Float64Array((steps + 1) * ways);
  const { phases } = readNames(image);
  const counts = new Float64Array((steps + 1) * columns * replicates);
  const stopped: RawRun['stopped'][number][] = [];
  const most = Math.min(request.lanes ?? layout.lanes, layout.lanes);
  for (let first = 0; first < replicates; first += most) {
    const batch = { first, lanes: Math.min(most, replicates - first), columns, counts, ways, movedSoFar };
    runBatch(machine, request, batch);
    stopped.push(...stopsOf(machine, batch, phases));
    request.onProgress?.(first + batch.lanes);
  }
  return { replicates, steps, columns, counts, stopped, moved: eachStep(movedSoFar, ways) };
}

interface Batch {
  /** Position of the first lane among the replicates of the run. */
  readonly first: number;
  readonly lanes: number;
  readonly columns: number;
  readonly counts: Float64Array;
  readonly ways: number;
  /** Animals moved up to step t over way w, at t * ways + w. */
  readonly movedSoFar: Float64Array;
}

function runBatch(machine: Machine, request: RunRequest, batch: Batch): void {
  const firstNumber = (request.firstReplicate ?? 0) + batch.first;
  const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), layout.lanes);
  for (let lane = 0; lane < layout.lanes; lane++) numbers[lane] = firstNumber + lane;
  machine.start(batch.lanes, request.seed % wordSize, Math.floor(request.seed / wordSize));
  keepCounts(machine, request, batch, 0);
  for (let step = 1; step <= request.steps; step++) {
    machine.step();
    keepCounts(machine, request, batch, step);
    keepMoved(machine, batch, step);
  }
}

function keepCounts(machine: Machine, request: RunRequest, batch: Batch, step: number): void {
  const observed = new Float64Array(machine.memory.buffer, machine.observed(), batch.columns * layout.lanes);
  for (let column = 0; column < batch.columns; column++) {
    const lanes = observed.subarray(column * layout.lanes, column * layout.lanes + batch.lanes);
    batch.counts.set(lanes, (step * batch.columns + column) * request.replicates + batch.first);
  }
}

function keepMoved(machine: Machine, { ways, movedSoFar }: Batch, step: number): void {
  const moved = new Float64Array(machine.memory.buffer, machine.moved(), ways);
  const sums = movedSoFar.subarray(step * ways, (step + 1) * ways);
  for (let way = 0; way < ways; way++) sums[way] = (sums[way] ?? 0) + (moved[way] ?? 0);
}

function stopsOf(machine: Machine, batch: Batch, phases: readonly string[]): RawRun['stopped'] {
  const table = new Int32Array(machine.memory.buffer, machine.stops(), layout.lanes * 3);
  return Array.from({ length: batch.lanes }, (_, lane) => table.subarray(lane * 3, lane * 3 + 3)).flatMap(
    ([code = 0, index = 0, step = 0], lane) =>
      code === layout.faultNone
        ? []
        : [
            {
              replicate: batch.first + lane,
              step,
              reason: stopReason(code, phases[index] ?? `phase ${String(index)}`),
            },
          ],
  );
}

function stopReason(code: number, phase: string): string {
  if (code === layout.faultTooMany) return `more than 1,000,000,000 animals in the phase ${phase}`;
  throw new Error(`The kernel stopped a replicate with the unknown code ${String(code)}.`);
}
