// Growth and positive vector of a large sparse nonnegative matrix, from a small space that is improved step by step.
import { dot } from './dot.ts';
import { eigenPairs } from './eigenvalues.ts';

export interface LargeProblem {
  readonly size: number;
  /** A x, a new vector. */
  readonly multiply: (x: Float64Array) => Float64Array;
  /** Something near r → (σI − A)⁻¹ r for a given σ; asked for anew as the growth becomes known. */
  readonly preconditioner: (shift: number) => (r: Float64Array) => Float64Array;
  /** Not negative, not all 0. */
  readonly start: Float64Array;
  /** Of |Ax − θx| against θ|x|. */
  readonly tolerance?: number;
  readonly maxSteps?: number;
}

export interface LargePair {
  readonly growthRate: number;
  readonly vector: Float64Array;
  /** |Ax − θx| / (θ|x|) at the end. */
  readonly residual: number;
  readonly steps: number;
}

const largestSpace = 24;
const keptAtRestart = 8;

/**
 * Davidson's method (Davidson 1975, in the general form of Morgan & Scott 1986, with Olsen's correction) for the eigenvalue of
 * largest real part, which for a nonnegative matrix is its growth. Cost a step: one multiplication, two preconditionings
 * and some hundred operations a state. The caller judges `residual`.
 */
export function davidson(problem: LargeProblem): LargePair {
  const { tolerance = 1e-13, maxSteps = 2000 } = problem;
  const space = openSpace(problem, problem.start);
  let near: Near | null = null;
  let best: LargePair | null = null;
  for (let step = 1; step <= maxSteps; step++) {
    const found = ritz(space);
    const pair = combine(space, found.lead);
    const size = norm(pair.vector);
    const residual = norm(pair.residual) / (Math.abs(found.value) * size);
    if (!best || residual < best.residual)
      best = { growthRate: found.value, vector: pair.vector, residual, steps: step };
    if (residual <= tolerance || step - best.steps > 150) break;
    if (near === null || space.basis.length >= largestSpace) near = nearer(problem, near, found.value, residual);
    const next = correction(near.apply, pair);
    if (space.basis.length >= largestSpace) restart(space, found.kept);
    if (!extend(problem, space, next) && !extend(problem, space, problem.multiply(pair.vector))) break;
  }
  if (!best) throw new Error('Davidson iteration without a step.');
  return best;
}

interface Near {
  readonly shift: number;
  readonly distance: number;
  readonly apply: (r: Float64Array) => Float64Array;
}

/** A preconditioner for a shift just above the growth, made anew where the old one has become far off or too low. */
function nearer(problem: LargeProblem, old: Near | null, value: number, residual: number): Near {
  const distance = value * Math.min(0.05, Math.max(1e-4, residual));
  const still = old !== null && old.shift > value && old.shift - value < 4 * distance;
  if (still || (old !== null && old.shift > value && old.distance <= 2 * distance)) return old;
  const shift = value + distance;
  return { shift, distance, apply: problem.preconditioner(shift) };
}

interface Space {
  readonly basis: Float64Array[];
  readonly images: Float64Array[];
  /** Projected matrix: entry (i, j) is basis[i] · images[j]. */
  projected: number[][];
}

function openSpace(problem: LargeProblem, start: Float64Array): Space {
  const space: Space = { basis: [], images: [], projected: [] };
  extend(problem, space, start);
  return space;
}

/** Adds the part of x that is new; false where there is none. */
function extend(problem: LargeProblem, space: Space, x: Float64Array): boolean {
  const before = norm(x);
  for (let pass = 0; pass < 3; pass++) {
    const size = norm(x);
    for (const base of space.basis) addTimes(x, -dot(base, x), base);
    if (norm(x) > 0.5 * size) break;
  }
  const after = norm(x);
  if (!(after > 1e-14 * before) || !Number.isFinite(after)) return false;
  const added = x.map((value) => value / after);
  const image = problem.multiply(added);
  space.projected.forEach((row, i) => row.push(dot(space.basis[i] ?? added, image)));
  space.basis.push(added);
  space.images.push(image);
  space.projected.push(space.images.map((other) => dot(added, other)));
  return true;
}

interface Ritz {
  readonly value: number;
  readonly lead: readonly number[];
  /** Orthonormal columns to keep at a restart. */
  readonly kept: readonly (readonly number[])[];
}

function ritz(space: Space): Ritz {
  const m = space.basis.length;
  const { values, vectors } = eigenPairs({ rows: m, columns: m, values: Float64Array.from(space.projected.flat()) });
  const order = values.map((_, k) => k).sort((a, b) => (values[b]?.re ?? 0) - (values[a]?.re ?? 0) || a - b);
  const columnOf = (k: number): number[] => Array.from({ length: m }, (_, i) => vectors[i * m + k] ?? 0);
  const first = order[0] ?? 0;
  return {
    value: values[first]?.re ?? 0,
    lead: columnOf(first),
    kept: orthonormal(order.slice(0, keptAtRestart).map(columnOf)),
  };
}

function orthonormal(columns: readonly number[][]): number[][] {
  const kept: number[][] = [];
  for (const column of columns) {
    const x = Float64Array.from(column);
    const before = norm(x);
    for (let pass = 0; pass < 2; pass++) for (const base of kept) addTimes(x, -dot(Float64Array.from(base), x), base);
    const size = norm(x);
    if (size > 1e-10 * before) kept.push(Array.from(x, (value) => value / size));
  }
  return kept;
}

interface Combined {
  readonly vector: Float64Array;
  readonly residual: Float64Array;
}

function combine(space: Space, weights: readonly number[]): Combined {
  const vector = weighted(space.basis, weights);
  const residual = weighted(space.images, weights);
  const value = dot(vector, residual) / dot(vector, vector);
  addTimes(residual, -value, vector);
  return { vector, residual };
}

/** Olsen's correction: the preconditioned residual, with as much of the preconditioned vector as makes it new. */
function correction(precondition: Near['apply'], { vector, residual }: Combined): Float64Array {
  const fromResidual = precondition(residual);
  const fromVector = precondition(vector);
  const share = dot(vector, fromVector);
  if (share !== 0) addTimes(fromResidual, -dot(vector, fromResidual) / share, fromVector);
  return fromResidual;
}

function restart(space: Space, kept: readonly (readonly number[])[]): void {
  const basis = kept.map((weights) => weighted(space.basis, weights));
  const images = kept.map((weights) => weighted(space.images, weights));
  space.basis.splice(0, Infinity, ...basis);
  space.images.splice(0, Infinity, ...images);
  space.projected = basis.map((base) => images.map((image) => dot(base, image)));
}

function weighted(vectors: readonly Float64Array[], weights: readonly number[]): Float64Array {
  const sum = new Float64Array(vectors[0]?.length ?? 0);
  vectors.forEach((vector, k) => addTimes(sum, weights[k] ?? 0, vector));
  return sum;
}

function addTimes(into: Float64Array, factor: number, x: ArrayLike<number>): void {
  for (let i = 0; i < into.length; i++) into[i] = (into[i] ?? 0) + factor * (x[i] ?? 0);
}

function norm(x: Float64Array): number {
  return Math.sqrt(dot(x, x));
}
