// The first years: how far numbers can leave the path of steady growth, and for good.
import { dot } from '../numeric/dot.ts';
import { solveBelow } from '../numeric/downstream.ts';
import { leading } from '../numeric/leading.ts';
import { multiply, multiplyTransposed, product, transpose } from '../numeric/sparse-product.ts';
import type { SparseMatrix } from '../numeric/sparse.ts';
import type { Vectors } from './sensitivity.ts';

/** All against a population of the same size that grows steadily by λ from the start (1 = no difference). */
export interface TransientBounds {
  /** Largest that any start can be after one step. */
  readonly reactivity: number;
  /** Smallest that any start can be after one step. */
  readonly firstStepAttenuation: number;
  /** Steps over which `highest` and `lowest` were looked for. */
  readonly stepsFollowed: number;
  /** Largest that any start can be within them, and when. */
  readonly highest: { readonly times: number; readonly step: number };
  /** Smallest that any start can be within them, and when. */
  readonly lowest: { readonly times: number; readonly step: number };
  /** Largest and smallest size that any start can keep for good; null where numbers never settle (period above 1). */
  readonly lasting: { readonly gain: number; readonly loss: number } | null;
  /** `highest.times` is at least this, and `lowest.times` at most that, whatever the step (Kreiss bounds). */
  readonly kreiss: { readonly atLeast: number; readonly atMost: number } | null;
}

/** Steps followed: 1000, fewer where the matrix is large. */
function stepsFollowed(matrix: SparseMatrix): number {
  return Math.round(Math.min(1000, Math.max(100, 3e8 / (matrix.values.length + 1))));
}
const kreissLimit = 300;

/**
 * Column sums of (A/λ)^t: the size after t steps of a population that starts as one animal in each state (after
 * Townley & Hodgson 2008 and Stott, Townley & Hodgson 2011). `primitive` says whether numbers settle.
 */
export function transientBounds(matrix: SparseMatrix, vectors: Vectors, primitive: boolean): TransientBounds {
  let sizes: Float64Array = new Float64Array(matrix.columns).fill(1);
  let first = { high: 1, low: 1 };
  let highest = { times: 1, step: 0 };
  let lowest = { times: 1, step: 0 };
  const longest = stepsFollowed(matrix);
  for (let step = 1; step <= longest; step++) {
    const next = multiplyTransposed(matrix, sizes).map((size) => size / vectors.growthRate);
    const [high, low] = [maximum(next), minimum(next)];
    if (step === 1) first = { high, low };
    if (high > highest.times * (1 + 1e-9)) highest = { times: high, step };
    if (low < lowest.times * (1 - 1e-9)) lowest = { times: low, step };
    const change = next.reduce((most, size, i) => Math.max(most, Math.abs(size - (sizes[i] ?? 0))), 0);
    sizes = next;
    if (change < 1e-12 * high) break;
  }
  const worth = vectors.left.map((value) => value / dot(vectors.left, vectors.right));
  return {
    stepsFollowed: longest,
    reactivity: first.high,
    firstStepAttenuation: first.low,
    highest,
    lowest,
    lasting: primitive ? { gain: maximum(worth), loss: minimum(worth) } : null,
    kreiss: matrix.columns <= kreissLimit ? kreissBounds(matrix, vectors.growthRate) : null,
  };
}

/**
 * sup and inf over r > 1 of (r − 1) times the largest and smallest column sum of (rI − A/λ)⁻¹, on a grid of r that is dense
 * near 1. Every r gives a valid bound, so a coarse grid only makes them less sharp.
 */
function kreissBounds(matrix: SparseMatrix, growthRate: number): { readonly atLeast: number; readonly atMost: number } {
  const turned = transpose(matrix);
  const ones = new Float64Array(matrix.columns).fill(1);
  let [atLeast, atMost] = [1, 1];
  for (let excess = 1 / 1024; excess <= 64; excess *= Math.SQRT2) {
    const shift = growthRate * (1 + excess);
    const sums = solveBelow(turned, shift, ones).map((sum) => sum * growthRate * excess);
    atLeast = Math.max(atLeast, maximum(sums));
    atMost = Math.min(atMost, minimum(sums));
  }
  return { atLeast, atMost };
}

export interface StartPath {
  /** Size at count t over its size at the start and over λ^t. */
  readonly times: Float64Array;
  /** What `times` comes to in the long run; null where numbers never settle. */
  readonly lasting: number | null;
  /** First count from which `times` stays within 5 % of its long-run level; null where it does not within the steps followed. */
  readonly stepsToSettle: number | null;
}

/** The first `steps` years of the actual start against steady growth. */
export function pathFromStart(
  matrix: SparseMatrix,
  vectors: Vectors,
  options: { readonly start: Float64Array; readonly steps: number; readonly primitive: boolean },
): StartPath | null {
  const total = sum(options.start);
  if (!(total > 0)) return null;
  const lasting = dot(vectors.left, options.start) / dot(vectors.left, vectors.right) / total;
  const times = [1];
  let settledSince: number | null = null;
  let animals = options.start;
  const longest = Math.max(options.steps, stepsFollowed(matrix));
  for (let step = 0; step <= longest; step++) {
    const now = sum(animals) / total;
    if (step > 0 && step <= options.steps) times.push(now);
    const near = Math.abs(now - lasting) <= 0.05 * lasting;
    settledSince = near ? (settledSince ?? step) : null;
    if (step >= options.steps && options.primitive && Math.abs(now - lasting) <= 1e-9 * lasting) break;
    animals = multiply(matrix, animals).map((value) => value / vectors.growthRate);
  }
  const settles = options.primitive || settledSince === 0;
  return {
    times: Float64Array.from(times),
    lasting: options.primitive ? lasting : null,
    stepsToSettle: settles ? settledSince : null,
  };
}

/** The largest factor by which the Euclidean length of a state can grow in one step: the largest singular value of A. */
export function euclideanRise(matrix: SparseMatrix): number {
  return Math.sqrt(leading(product(transpose(matrix), matrix)).growthRate);
}

function sum(x: Float64Array): number {
  return x.reduce((total, value) => total + value, 0);
}

function maximum(x: Float64Array): number {
  return x.reduce((most, value) => Math.max(most, value), -Infinity);
}

function minimum(x: Float64Array): number {
  return x.reduce((least, value) => Math.min(least, value), Infinity);
}
