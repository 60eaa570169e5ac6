// Growth of a nonnegative matrix, with its stable distribution and reproductive values, whatever its life cycle looks like.
import { strongComponents, type Components } from './components.ts';
import { solveBelow } from './downstream.ts';
import { irreduciblePair, irreducibleRate } from './irreducible-pair.ts';
import { periodOfIrreducible } from './period.ts';
import { toShares } from './positive-pair.ts';
import { principalPart } from './principal-part.ts';
import { transpose } from './sparse-product.ts';
import type { SparseMatrix } from './sparse.ts';

/** States that can all reach one another. */
export interface LeadingBlock {
  /** Ascending. */
  readonly states: Int32Array;
  /** 0 where the block has no loop. */
  readonly growthRate: number;
  /** Common divisor of the loop lengths; 0 where there is no loop. */
  readonly period: number;
  /** Blocks that this one sends to, by index; always higher indices. */
  readonly feeds: readonly number[];
}

export interface Leading {
  /** Largest growth of any block; 0 where no state can ever come back. */
  readonly growthRate: number;
  /** Stable distribution, sums to 1; null where it is not unique. Zero where the fastest block does not send to. */
  readonly right: Float64Array | null;
  /** Reproductive values, the first that is not 0 scaled to 1; null where they are not unique. */
  readonly left: Float64Array | null;
  /** Why the vectors are null. */
  readonly reason?: string;
  /** Each feeds only blocks after it. */
  readonly blocks: readonly LeadingBlock[];
  /** One block, with a loop. */
  readonly irreducible: boolean;
  /** Irreducible with period 1. */
  readonly primitive: boolean;
  /** Of the fastest block; 0 where there is no loop. */
  readonly period: number;
}

/** Growth rates that differ by less than this share are taken as equal. */
const equalGrowth = 1e-10;

/**
 * Leading eigenvalue and vectors of a nonnegative square matrix. The life cycle is first split into blocks on the pattern
 * of its entries (so that a growth of 0 is known, not computed), each block is solved, and the vectors of the fastest are
 * carried to the blocks it feeds and is fed by: w_D = (λI − A_DD)⁻¹ A_DK w_K, and the same transposed.
 * Relative accuracy of the growth about 1e-13. Errors: throws where an entry is negative or not a finite number.
 */
export function leading(matrix: SparseMatrix): Leading {
  checkEntries(matrix);
  const components = strongComponents(matrix);
  const pairs = components.states.map((states) => solveBlock(matrix, states));
  const feeds = feedsOf(matrix, components);
  const blocks = pairs.map(({ growthRate, period, states }, b) => ({
    states,
    growthRate,
    period,
    feeds: feeds[b] ?? [],
  }));
  const growthRate = blocks.reduce((highest, block) => Math.max(highest, block.growthRate), 0);
  const fastest = blocks.flatMap((block, b) => (block.growthRate >= growthRate * (1 - equalGrowth) ? [b] : []));
  const period = growthRate > 0 ? (blocks[fastest[0] ?? 0]?.period ?? 0) : 0;
  const irreducible = blocks.length === 1 && growthRate > 0;
  const facts = { growthRate, blocks, irreducible, primitive: irreducible && period === 1, period };
  const reason = reasonAgainst(growthRate, fastest.length);
  const main = fastest[0];
  if (reason !== null || main === undefined)
    return { ...facts, right: null, left: null, reason: reason ?? 'no states' };
  const right = carry({ matrix, components, growthRate }, main, pairs[main]?.right ?? new Float64Array(0));
  const mirrored = { matrix: transpose(matrix), components, growthRate };
  const left = carry(mirrored, main, pairs[main]?.left ?? new Float64Array(0));
  return { ...facts, right: toShares(right), left: firstToOne(left) };
}

/** The growth alone, as `leading` gives it to about 1e-12 of itself: much cheaper for large matrices, whose vectors cost most. */
export function growthRateOf(matrix: SparseMatrix): number {
  checkEntries(matrix);
  const blocks = strongComponents(matrix).states.map((states) => principalPart(matrix, states));
  return blocks.reduce(
    (most, block) => (periodOfIrreducible(block) === 0 ? most : Math.max(most, irreducibleRate(block))),
    0,
  );
}

function checkEntries(matrix: SparseMatrix): void {
  if (matrix.rows !== matrix.columns) throw new RangeError(`Not square: ${matrix.rows} × ${matrix.columns}.`);
  const bad = matrix.values.findIndex((value) => !(value >= 0 && value < Infinity));
  if (bad >= 0)
    throw new RangeError(`Entry ${bad} is ${matrix.values[bad]}; a projection matrix holds numbers from 0.`);
}

interface SolvedBlock {
  readonly states: Int32Array;
  readonly growthRate: number;
  readonly period: number;
  readonly right: Float64Array;
  readonly left: Float64Array;
}

function solveBlock(matrix: SparseMatrix, states: Int32Array): SolvedBlock {
  const block = principalPart(matrix, states);
  const period = periodOfIrreducible(block);
  const one = Float64Array.of(1);
  if (period === 0) return { states, growthRate: 0, period, right: one, left: one };
  return { states, period, ...irreduciblePair(block) };
}

function feedsOf(matrix: SparseMatrix, { of, states }: Components): number[][] {
  const feeds = states.map(() => new Set<number>());
  if (states.length === 1) return [[]];
  for (let j = 0; j < matrix.columns; j++) {
    const from = of[j] ?? 0;
    for (let k = matrix.columnStart[j] ?? 0; k < (matrix.columnStart[j + 1] ?? 0); k++) {
      const to = of[matrix.rowIndex[k] ?? 0] ?? 0;
      if (to !== from) feeds[from]?.add(to);
    }
  }
  return feeds.map((set) => [...set].sort((a, b) => a - b));
}

function reasonAgainst(growthRate: number, fastest: number): string | null {
  if (growthRate === 0) return 'No animal or its young ever come back to a class they came from, so nothing persists.';
  if (fastest < 2) return null;
  return `${fastest} groups of states that do not exchange in both directions grow equally fast, so the spread over them depends on the start.`;
}

interface Carrying {
  readonly matrix: SparseMatrix;
  readonly components: Components;
  readonly growthRate: number;
}

/** Extends the vector of block `main` to all blocks that it reaches in `matrix`, one after the other; 0 elsewhere. */
function carry({ matrix, components, growthRate }: Carrying, main: number, vector: Float64Array): Float64Array {
  const { of, states } = components;
  const x = new Float64Array(matrix.columns);
  const inflow = new Float64Array(matrix.columns);
  const send = (block: number, values: Float64Array): void => {
    (states[block] ?? []).forEach((state, place) => {
      const value = values[place] ?? 0;
      x[state] = value;
      for (let k = matrix.columnStart[state] ?? 0; k < (matrix.columnStart[state + 1] ?? 0); k++) {
        const to = matrix.rowIndex[k] ?? 0;
        if (of[to] !== block) inflow[to] = (inflow[to] ?? 0) + (matrix.values[k] ?? 0) * value;
      }
    });
  };
  send(main, vector);
  for (const block of reachOrder(matrix, components, main)) {
    const here = states[block] ?? new Int32Array(0);
    const given = Float64Array.from(here, (state) => inflow[state] ?? 0);
    if (given.some((value) => value > 0)) send(block, solveBelow(principalPart(matrix, here), growthRate, given));
  }
  return x;
}

/** Blocks after `main` in the direction in which `matrix` sends: upwards, or downwards where it is transposed. */
function reachOrder(matrix: SparseMatrix, { of, states }: Components, main: number): number[] {
  const upwards = states.map((_, b) => b).slice(main + 1);
  const downwards = states
    .map((_, b) => b)
    .slice(0, main)
    .reverse();
  for (let j = 0; j < matrix.columns; j++) {
    for (let k = matrix.columnStart[j] ?? 0; k < (matrix.columnStart[j + 1] ?? 0); k++) {
      const difference = (of[matrix.rowIndex[k] ?? 0] ?? 0) - (of[j] ?? 0);
      if (difference !== 0) return difference > 0 ? upwards : downwards;
    }
  }
  return [];
}

function firstToOne(x: Float64Array): Float64Array {
  const first = x.find((value) => value > 0) ?? 1;
  return x.map((value) => value / first);
}
