// Growth of very many small life cycles at a time, in the kernel module, two side by side; with vectors and elasticities
// where they are wanted.
import { loadMachine } from '../machine/machine.ts';
import type { Machine } from '../machine/instance.ts';
import { slowly } from './one-growth.ts';

export interface ManyRequest {
  /** Entry (row, column) of matrix k at (k · order + row) · order + column: numbers from 0. */
  readonly matrices: Float64Array;
  readonly order: number;
  /** Also `right` and `left`. */
  readonly vectors?: boolean;
  readonly elasticities?: boolean;
  /** Vectors of a matrix that resembles all of them, positive, `order` numbers each: halves the time. */
  readonly start?: { readonly right: Float64Array; readonly left: Float64Array };
  /**
   * Results of an earlier request of the same size and wishes, whose arrays are written over. Fresh memory costs more than
   * the solution of small matrices does, since the system hands it out page by page.
   */
  readonly reuse?: ManyGrowths;
}

export interface ManyGrowths {
  /** 0 where no state ever comes back. */
  readonly growthRate: Float64Array;
  /** How far the bounds of the growth, which surely enclose it but for rounding, lie apart, relative to it. At most 1e-9. */
  readonly error: Float64Array;
  /** 1 primitive; above 1 irreducible with this period; 0 reducible. */
  readonly period: Int32Array;
  /** [matrix][state]: stable distributions, each of sum 1. NaN where there is not one: see `without`. */
  readonly right?: Float64Array;
  /** [matrix][state]: reproductive values, the first that is not 0 is 1. NaN as above. */
  readonly left?: Float64Array;
  /** [matrix][row][column]: dλ/da · a/λ, each of sum 1. NaN as above. */
  readonly elasticities?: Float64Array;
  /** Why a matrix, by its index, has no vectors, which only reducible ones can lack. */
  readonly without: ReadonlyMap<number, string>;
}

/** Solves request after request with an instance of the kernel module of its own. Not for runs of images at the same time. */
export interface ManySolver {
  /**
   * Each result depends on its own matrix and on `start` alone, never on others of the request or on their order.
   * Irreducible matrices are solved in the kernel until bounds of the growth by both vectors agree to 1e-13, or as near as
   * rounding lets them come, which `error` tells. Reducible ones, and those whose bounds stay more than 1e-9 apart, are
   * split into blocks and solved one by one (`numeric/leading.ts`), which takes ten to fifty times as long.
   * Errors: throws RangeError where an entry is negative or not finite, a length does not fit, or memory does not suffice.
   */
  readonly solve: (request: ManyRequest) => ManyGrowths;
}

/** Bytes of matrices that are given to the kernel at a time: they stay in the cache next to the cores. */
const bytesAtATime = 1 << 19;
const wantVectors = 1;
const wantElasticities = 2;
/** Multiplications before the first elimination, which is worth about ten of them. */
const coldMultiplications = 6;
const warmMultiplications = 1;

/** Opens an instance of the kernel module, which is kept until nobody holds the solver. Errors: those of `solve`. */
export function openManySolver(machine: Machine = loadMachine()): ManySolver {
  let opened = 0;
  return {
    solve: (request) => {
      const { order } = request;
      const count = checkLengths(request);
      const most = Math.max(2, Math.floor(bytesAtATime / (8 * order * order)) & ~1);
      if (opened !== order) {
        machine.release();
        if (machine.openMany(order, most) === 0) throw new RangeError(`No memory for matrices of order ${order}.`);
        opened = order;
      }
      const results = emptyResults(request, count);
      writeStart(machine, request);
      for (let from = 0; from < count; from += most)
        solvePart(machine, request, results, [from, Math.min(count, from + most)]);
      return results;
    },
  };
}

type Writable = { -readonly [K in keyof ManyGrowths]: ManyGrowths[K] } & { without: Map<number, string> };

function checkLengths({ matrices, order, start }: ManyRequest): number {
  if (!Number.isInteger(order) || order < 1) throw new RangeError(`The order ${order} is no whole number from 1.`);
  const count = matrices.length / (order * order);
  if (!Number.isInteger(count)) {
    throw new RangeError(`${matrices.length} entries are no whole number of matrices of order ${order}.`);
  }
  for (const vector of start ? [start.right, start.left] : []) {
    const fits = vector.length === order && vector.every((value) => value > 0 && value < Infinity);
    if (!fits) throw new RangeError(`A vector to start from needs ${order} positive numbers.`);
  }
  return count;
}

function emptyResults({ order, vectors, elasticities, reuse }: ManyRequest, count: number): Writable {
  const numbers = (before: Float64Array | undefined, size: number): Float64Array =>
    before?.length === size ? before : new Float64Array(size);
  return {
    growthRate: numbers(reuse?.growthRate, count),
    error: numbers(reuse?.error, count),
    period: reuse?.period.length === count ? reuse.period : new Int32Array(count),
    ...(vectors ? { right: numbers(reuse?.right, count * order), left: numbers(reuse?.left, count * order) } : {}),
    ...(elasticities ? { elasticities: numbers(reuse?.elasticities, count * order * order) } : {}),
    without: new Map(),
  };
}

function writeStart(machine: Machine, { order, start }: ManyRequest): void {
  const vectors = new Float64Array(machine.memory.buffer, machine.manyStarts(), 2 * order).fill(1 / order);
  if (!start) return;
  vectors.set(start.right);
  vectors.set(start.left, order);
}

function solvePart(
  machine: Machine,
  request: ManyRequest,
  results: Writable,
  [from, to]: readonly [number, number],
): void {
  const { matrices, order, vectors, elasticities, start } = request;
  const entries = order * order;
  const count = to - from;
  const { buffer } = machine.memory;
  const inputs = new Float64Array(buffer, machine.manyInputs(), count * entries);
  inputs.set(matrices.subarray(from * entries, to * entries));
  const wanted = (vectors ? wantVectors : 0) | (elasticities ? wantElasticities : 0);
  machine.solveMany(count, wanted, start ? warmMultiplications : coldMultiplications);
  results.growthRate.set(new Float64Array(buffer, machine.manyGrowths(), count), from);
  results.error.set(new Float64Array(buffer, machine.manyErrors(), count), from);
  const periods = new Int32Array(buffer, machine.manyPeriods(), count);
  results.period.set(periods, from);
  results.right?.set(new Float64Array(buffer, machine.manyRights(), count * order), from * order);
  results.left?.set(new Float64Array(buffer, machine.manyLefts(), count * order), from * order);
  results.elasticities?.set(inputs, from * entries);
  for (let k = 0; k < count; k++) if ((periods[k] ?? 0) < 1) solveAlone(request, results, from + k);
}

/** What the kernel does not solve. */
function solveAlone({ matrices, order }: ManyRequest, results: Writable, k: number): void {
  const entries = order * order;
  const alone = slowly(matrices.subarray(k * entries, (k + 1) * entries), order, k);
  results.growthRate[k] = alone.growthRate;
  results.error[k] = alone.error;
  results.period[k] = alone.period;
  results.right?.set(alone.right, k * order);
  results.left?.set(alone.left, k * order);
  results.elasticities?.set(alone.elasticities(), k * entries);
  if (alone.reason !== undefined) results.without.set(k, alone.reason);
}
