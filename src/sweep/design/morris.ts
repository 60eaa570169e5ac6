// Walks for screening (Morris 1991): on a lattice of four levels, one factor after the other is moved by two thirds of its range.
import { shuffled } from './permutation.ts';
import { wordOf } from './hash.ts';

/** Of the range of each factor. */
export const morrisStep = 2 / 3;

/** Points of one walk over k factors. */
export function morrisSize(factors: number): number {
  return factors + 1;
}

export interface MorrisPlace {
  readonly point: number;
  readonly factor: number;
}

/** Share of the range of a factor at a point. In walk w factor k moves in step `morrisTurn(…)`. */
export function morrisShare(seed: number, factors: number, { point, factor }: MorrisPlace): number {
  const [walk, step] = [Math.floor(point / morrisSize(factors)), point % morrisSize(factors)];
  const word = wordOf(seed, walk, factor, 0x6d2b79f5);
  const low = (word >>> 31) / 3;
  const upwards = ((word >>> 30) & 1) === 1;
  const moved = step > morrisTurn(seed, factors, { walk, factor });
  return upwards === moved ? low + morrisStep : low;
}

export interface MorrisTurn {
  readonly walk: number;
  readonly factor: number;
}

/** The step of the walk, from 0, in which the factor moves. */
export function morrisTurn(seed: number, factors: number, { walk, factor }: MorrisTurn): number {
  return shuffled({ seed, key: wordOf(seed, walk, 0x3c6ef372), size: factors }, factor);
}
