// The chance of having fallen below a number by each year: by the diffusion approximation, beside the share of simulated futures.
import { log } from '../machine/pinned.ts';
import { dot } from '../numeric/dot.ts';
import { chanceFallenBy, type Drift } from './diffusion.ts';
import type { Vectors } from './sensitivity.ts';

/** One outcome as runs found it. */
export interface SimulatedFall {
  readonly outcome: string;
  readonly definition: string;
  /** Weight of each state of the matrix in the count. */
  readonly counted: Float64Array;
  /** Animals of that count below which it comes. */
  readonly threshold: number;
  readonly replicates: number;
  /** From the first count after the start; `ever` is the share of runs, with a band that holds for all years at once. */
  readonly byYear: readonly FallenBy[];
}

export interface FallenBy {
  readonly year: number;
  readonly ever: number;
  readonly lower: number;
  readonly upper: number;
}

/**
 * ln of the count at the start over the threshold. The start counts as the steady growth that it comes to: each animal by what it is
 * worth, ⟨v, n₀⟩/⟨v, w⟩ animals made up as w (Lande & Orzack 1988, from memory). −∞ where the steady growth has none to count.
 */
export function logDistanceOf(
  { counted, threshold }: Pick<SimulatedFall, 'counted' | 'threshold'>,
  { right, left }: Vectors,
  start: Float64Array,
): number {
  const animals = (dot(counted, right) * dot(left, start)) / dot(left, right);
  return animals > 0 ? log(animals / threshold) : -Infinity;
}

/** The chance at the counts of the years 1, 2, …, of numbers that are counted once a year. */
export function fallingCurve(years: number, logDistance: number, drift: Drift): Float64Array {
  return Float64Array.from({ length: years }, (_, t) => chanceFallenBy(t + 1, logDistance, drift, 'once a year'));
}
