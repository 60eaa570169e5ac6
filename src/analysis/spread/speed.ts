// How fast a growing population spreads over empty land of one quality.
import { dot } from '../../numeric/dot.ts';
import { exp, log, pow } from '../../machine/pinned.ts';
import { growthRateOf, leading } from '../../numeric/leading.ts';
import { forEachEntry, sparseFromTriplets, type SparseMatrix } from '../../numeric/sparse.ts';
import { vectorsOf } from '../sensitivity.ts';

/** How far a transition moves along one line, in km. The last two are what kernels in the plane look like from the side. */
export type LineKernel =
  | { readonly kind: 'stays' }
  | { readonly kind: 'normal'; readonly sdKm: number }
  | { readonly kind: 'two-sided exponential'; readonly meanKm: number }
  | { readonly kind: 'uniform'; readonly halfWidthKm: number }
  | { readonly kind: 'exponential in the plane'; readonly scaleKm: number }
  | { readonly kind: 'normal in the plane'; readonly scaleKm: number };

/** E e^(θx); infinite where the tail is too heavy for this θ (per km). */
export function momentOf(kernel: LineKernel, theta: number): number {
  switch (kernel.kind) {
    case 'stays':
      return 1;
    case 'normal':
      return exp((kernel.sdKm * kernel.sdKm * theta * theta) / 2);
    case 'two-sided exponential':
      return heavy(kernel.meanKm * theta, 1);
    case 'uniform': {
      const width = kernel.halfWidthKm * theta;
      return width < 1e-4 ? 1 + (width * width) / 6 : (exp(width) - exp(-width)) / (2 * width);
    }
    case 'exponential in the plane':
      return heavy(kernel.scaleKm * theta, 1.5);
    case 'normal in the plane':
      return exp((kernel.scaleKm * kernel.scaleKm * theta * theta) / 4);
  }
}

function heavy(x: number, power: number): number {
  return x < 1 ? pow(1 - x * x, -power) : Infinity;
}

/** Largest θ (per km, exclusive) at which the moment exists. */
function limitOf(kernel: LineKernel): number {
  if (kernel.kind === 'two-sided exponential') return 1 / kernel.meanKm;
  return kernel.kind === 'exponential in the plane' ? 1 / kernel.scaleKm : Infinity;
}

export interface Spread {
  /** Kilometres a step that the front settles to. */
  readonly speedKm: number;
  /** Steepness of the front, per km. */
  readonly theta: number;
  /** ∂c/∂a of stored entry k of the matrix, km a step. */
  readonly sensitivity: Float64Array | null;
}

export interface SpreadInput {
  readonly matrix: SparseMatrix;
  /** How stored entry k of the matrix moves its animals. */
  readonly kernelOf: (row: number, column: number) => LineKernel;
}

/**
 * c = min over θ > 0 of ln ρ(H(θ)) / θ with H(θ) = M(θ)∘A (Neubert & Caswell 2000, from memory), by golden section;
 * sensitivity m_ij v_i w_j / (θ ρ ⟨v, w⟩). Null where the population does not grow or nobody moves.
 * Kernels with tails heavier than exponential have no moments: their fronts keep accelerating, so they are not offered.
 */
export function spreadSpeed(input: SpreadInput): Spread | null {
  const range = thetaRange(input);
  if (!range || !(growthRateOf(input.matrix) > 1)) return null;
  const speedAt = (theta: number): number => log(growthRateOf(movedBy(input, theta))) / theta;
  const logTheta = goldenMinimum((x) => speedAt(exp(x)), [log(range.low), log(range.high)]);
  const theta = exp(logTheta);
  return { speedKm: speedAt(theta), theta, sensitivity: sensitivitiesAt(input, theta) };
}

/** From a front of thousands of kernel widths to the steepest at which all moments are finite. */
function thetaRange({ matrix, kernelOf }: SpreadInput): { readonly low: number; readonly high: number } | null {
  let limit = Infinity;
  let width = 0;
  forEachEntry(matrix, (row, column) => {
    const kernel = kernelOf(row, column);
    limit = Math.min(limit, limitOf(kernel));
    width = Math.max(width, widthOf(kernel));
  });
  if (width === 0) return null;
  return { low: 1e-4 / width, high: limit < Infinity ? limit * (1 - 1e-12) : 25 / width };
}

function widthOf(kernel: LineKernel): number {
  switch (kernel.kind) {
    case 'stays':
      return 0;
    case 'normal':
      return kernel.sdKm;
    case 'two-sided exponential':
      return kernel.meanKm;
    case 'uniform':
      return kernel.halfWidthKm;
    default:
      return kernel.scaleKm;
  }
}

function movedBy({ matrix, kernelOf }: SpreadInput, theta: number): SparseMatrix {
  const columnIndex = new Int32Array(matrix.values.length);
  const values = new Float64Array(matrix.values.length);
  forEachEntry(matrix, (row, column, value, k) => {
    columnIndex[k] = column;
    values[k] = value * momentOf(kernelOf(row, column), theta);
  });
  return sparseFromTriplets({ ...matrix, columnIndex, values });
}

function sensitivitiesAt(input: SpreadInput, theta: number): Float64Array | null {
  const vectors = vectorsOf(leading(movedBy(input, theta)));
  if (!vectors) return null;
  const { growthRate, right, left } = vectors;
  const scale = theta * growthRate * dot(left, right);
  const sensitivity = new Float64Array(input.matrix.values.length);
  forEachEntry(input.matrix, (row, column, _value, k) => {
    const moment = momentOf(input.kernelOf(row, column), theta);
    sensitivity[k] = (moment * (left[row] ?? 0) * (right[column] ?? 0)) / scale;
  });
  return sensitivity;
}

export function goldenMinimum(f: (x: number) => number, [from, to]: readonly [number, number]): number {
  const share = (Math.sqrt(5) - 1) / 2;
  let [low, high] = [from, to];
  let [left, right] = [high - share * (high - low), low + share * (high - low)];
  let [atLeft, atRight] = [f(left), f(right)];
  for (let round = 0; round < 80 && high - low > 1e-9; round++) {
    if (atLeft < atRight) {
      [high, right, atRight] = [right, left, atLeft];
      left = high - share * (high - low);
      atLeft = f(left);
    } else {
      [low, left, atLeft] = [left, right, atRight];
      right = low + share * (high - low);
      atRight = f(right);
    }
  }
  return (low + high) / 2;
}
