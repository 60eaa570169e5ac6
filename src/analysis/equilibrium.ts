// Where numbers stand still, whether they come back to it, and from how few they can start.
import { exp, log } from '../machine/pinned.ts';
import { solveDense } from '../numeric/dense-solve.ts';
import { eigenvalues, modulus } from '../numeric/eigenvalues.ts';
import { growthRateOf } from '../numeric/leading.ts';
import type { DenseMatrix } from '../numeric/sparse.ts';
import { jacobianOf, type YearMap } from './year-map.ts';

export interface Equilibrium {
  readonly animals: Float64Array;
  /** Largest modulus of the eigenvalues of the Jacobian: below 1 small disturbances fade by this factor a year. */
  readonly leadingModulus: number;
  readonly stable: boolean;
}

/** Largest number of states for which the Jacobian is handled whole. */
export const largestJacobian = 400;
const settledShare = 1e-12;
/** Years that are followed unless less is asked for. */
export const longestFollowed = 20_000;
/** Newton's method is tried early after so many years, and each time that they have doubled since. */
const firstTry = 100;
/** With more states than this, to go on for years is cheaper than to try Newton's method early. */
const largestTried = 100;

/** Growth from almost nobody: the growth rate of the matrix at zero, above 1 where the species can come in. */
export function invasionGrowth(map: YearMap): number {
  return growthRateOf(map.matrixAt(new Float64Array(map.states)));
}

/**
 * The equilibrium that a start leads to: years are run until they change nothing, then Newton steps on apply(n) − n sharpen
 * it. Null where numbers still move after `longest` years: they cycle or wander.
 */
export function equilibriumFrom(map: YearMap, start: Float64Array, longest = longestFollowed): Equilibrium | null {
  return reachedFrom(map, start, { longest, seen: [] });
}

interface Search {
  readonly longest: number;
  /** All that were met on the way, stable or not: to describe one is dear. */
  readonly seen: Equilibrium[];
}

function reachedFrom(map: YearMap, start: Float64Array, { longest, seen }: Search): Equilibrium | null {
  let animals = start;
  let tryIn = firstTry;
  for (let year = 1; year <= longest; year++) {
    const next = map.apply(animals);
    const change = distance(next, animals);
    animals = next;
    if (!(change > settledShare * size(animals))) break;
    if (size(animals) < 1e-9 * Math.max(1, size(start))) return describeOnce(map, new Float64Array(map.states), seen);
    if (year !== tryIn || map.states > largestTried) continue;
    tryIn *= 2;
    const early = nearbyStable(map, animals, seen);
    if (early) return early;
  }
  const sharp = sharpen(map, animals);
  return sharp && describeOnce(map, sharp, seen);
}

/** Where the years end that lead from a start, whether numbers would come back to it or not; null where they still move. */
export function settledFrom(apply: YearMap['apply'], start: Float64Array, longest: number): Float64Array | null {
  let animals = start;
  for (let year = 0; year < longest; year++) {
    const next = apply(animals);
    const change = distance(next, animals);
    animals = next;
    if (size(animals) < 1e-9 * Math.max(1, size(start))) return new Float64Array(animals.length);
    if (!(change > 1e-10 * size(animals))) return animals;
  }
  return null;
}

/** The stable equilibrium within a tenth of where numbers are, if Newton's method finds one: slow approaches end early. */
function nearbyStable(map: YearMap, animals: Float64Array, seen: Equilibrium[]): Equilibrium | null {
  const sharp = sharpen(map, animals);
  if (!sharp || distance(sharp, animals) > 0.1 * size(animals)) return null;
  const found = describeOnce(map, sharp, seen);
  return found.stable ? found : null;
}

function describeOnce(map: YearMap, animals: Float64Array, seen: Equilibrium[]): Equilibrium {
  const before = seen.find((other) => distance(other.animals, animals) < 1e-6 * (1 + size(animals)));
  if (before) return before;
  const found = describe(map, animals);
  seen.push(found);
  return found;
}

/** Newton's method for apply(n) = n from a guess near by, stable or not. Null where it leaves or does not settle. */
export function sharpen(map: YearMap, guess: Float64Array): Float64Array | null {
  let animals = guess;
  for (let round = 0; round < 30; round++) {
    const image = map.apply(animals);
    const miss = image.map((value, i) => value - (animals[i] ?? 0));
    if (size(miss) <= settledShare * Math.max(size(animals), 1e-9)) return animals;
    if (map.states > largestJacobian) return size(miss) <= 1e-8 * size(animals) ? animals : null;
    const step = solveDense(minusIdentity(jacobianOf(map, animals)), miss);
    if (!step) return null;
    animals = animals.map((value, i) => value - (step[i] ?? 0));
    const least = -1e-9 * size(animals);
    if (!animals.every((value) => value > least)) return null;
  }
  const left = map.apply(animals);
  return distance(left, animals) <= 1e-8 * size(animals) ? animals : null;
}

/** The equilibrium with its stability by the Jacobian ρ(J) < 1. */
export function describe(map: YearMap, animals: Float64Array): Equilibrium {
  const whole = map.states <= largestJacobian;
  const leadingModulus = whole
    ? modulus(eigenvalues(jacobianOf(map, animals))[0] ?? { re: 0, im: 0 })
    : disturbanceGrowth(map, animals);
  return { animals, leadingModulus, stable: leadingModulus < 1 };
}

/**
 * How a small disturbance grows a year, without the Jacobian as a table: the disturbance is followed for 600 years along
 * the tangent of the map, and the mean growth of its size over the last 200 is taken
 * (a little low where several disturbances fade at nearly the same rate).
 */
function disturbanceGrowth(map: YearMap, animals: Float64Array): number {
  const total = Math.max(size(animals), 1e-6);
  let direction = animals.map((value, i) => (value > 0 ? value : total / map.states) * (1 + ((i * 7919) % 101) / 101));
  let logSize = 0;
  for (let year = 0; year < 600; year++) {
    const step = (1e-6 * total) / size(direction);
    const ahead = map.apply(animals.map((value, i) => value + step * (direction[i] ?? 0)));
    const behind = map.apply(animals.map((value, i) => Math.max(0, value - step * (direction[i] ?? 0))));
    const next = ahead.map((value, i) => (value - (behind[i] ?? 0)) / (2 * step));
    const nextSize = size(next);
    const growth = nextSize / size(direction);
    if (growth === 0) return 0;
    if (year >= 400) logSize += log(growth);
    direction = next.map((value) => value / nextSize);
  }
  return exp(logSize / 200);
}

/** Different equilibria that different starts lead to, largest first. */
export function equilibriaFrom(
  map: YearMap,
  starts: readonly Float64Array[],
  longest = longestFollowed,
): readonly Equilibrium[] {
  const seen: Equilibrium[] = [];
  const reached = starts.flatMap((start) => reachedFrom(map, start, { longest, seen }) ?? []);
  return [...new Set(reached)].sort((a, b) => size(b.animals) - size(a.animals));
}

export interface StartThreshold {
  /** Multiples of the start from which the population dies out and from which it lasts. */
  readonly diesBelow: number;
  readonly lastsAbove: number;
}

/**
 * Along one make-up of the population, the size below which it dies out and above which it lasts (an Allee threshold), by
 * halving. Null where it has the same fate from every size between `low` and `high` multiples of the start.
 */
export function startThreshold(
  map: YearMap,
  start: Float64Array,
  [low, high]: readonly [number, number],
): StartThreshold | null {
  const lasts = (times: number): boolean =>
    outlives(
      map,
      start.map((value) => value * times),
    );
  let [diesBelow, lastsAbove] = [low, high];
  if (lasts(low) || !lasts(high)) return null;
  while (lastsAbove - diesBelow > 1e-10 * lastsAbove) {
    const middle = diesBelow + (lastsAbove - diesBelow) / 2;
    if (lasts(middle)) lastsAbove = middle;
    else diesBelow = middle;
    if (middle === diesBelow && middle === lastsAbove) break;
  }
  return { diesBelow, lastsAbove };
}

function outlives(map: YearMap, start: Float64Array): boolean {
  let animals = start;
  const first = size(start);
  for (let year = 0; year < 5000; year++) {
    const next = map.apply(animals);
    if (size(next) < 1e-6 * first || size(next) === 0) return false;
    const change = distance(next, animals);
    animals = next;
    if (change <= 1e-10 * size(animals)) return true;
  }
  return true;
}

function minusIdentity({ rows, columns, values }: DenseMatrix): DenseMatrix {
  return { rows, columns, values: values.map((value, k) => (k % (columns + 1) === 0 ? value - 1 : value)) };
}

function size(x: Float64Array): number {
  return x.reduce((sum, value) => sum + Math.abs(value), 0);
}

function distance(a: Float64Array, b: Float64Array): number {
  return a.reduce((sum, value, i) => sum + Math.abs(value - (b[i] ?? 0)), 0);
}
