// What the growth rate loses when a patch or a link is taken away.
import { irreducibleGrowth } from '../numeric/irreducible-pair.ts';
import { leading } from '../numeric/leading.ts';
import { principalPart } from '../numeric/principal-part.ts';
import { multiply, multiplyTransposed } from '../numeric/sparse-product.ts';
import { entryAt, forEachEntry, type SparseMatrix } from '../numeric/sparse.ts';
import { statesByPatch, type PatchState } from './patches.ts';
import type { Vectors } from './sensitivity.ts';
import {
  firstOrderLoss,
  movedInsteadOfStaying,
  phaseEntrySensitivity,
  type PhaseSensitivity,
} from './phase-sensitivity.ts';

/** Work that exact removals may take, in about a nanosecond each: seconds. */
const workLimit = { patches: 9e9, links: 2.5e9 } as const;

function workOf(matrix: SparseMatrix): number {
  const n = matrix.columns;
  return n <= 160 ? 3 * n * n * n + 1e4 : 300 * matrix.values.length + 4e6;
}

/** Growth of what is left, from the vectors of the whole where it still hangs together. */
function growthOf(rest: SparseMatrix, vectors: Vectors, states: ArrayLike<number>): number {
  const right = Float64Array.from(states, (state) => vectors.right[state] ?? 0);
  const quick = right.every((share) => share > 0)
    ? irreducibleGrowth(rest, { growthRate: vectors.growthRate, right })
    : null;
  return quick ?? leading(rest).growthRate;
}

/**
 * λ − λ without each patch, all animals of which are lost; recomputed whole. Where that would take longer than seconds, only
 * for the patches with the largest share of `importance`; the others are null.
 */
export function patchRemovalLosses(
  matrix: SparseMatrix,
  states: readonly PatchState[],
  vectors: Vectors,
  importance: Float64Array,
): (number | null)[] {
  const groups = statesByPatch(states, importance.length);
  const affordable = Math.max(10, Math.floor(workLimit.patches / workOf(matrix)));
  const order = groups.map((_, p) => p).sort((a, b) => (importance[b] ?? 0) - (importance[a] ?? 0) || a - b);
  const chosen = new Set(order.slice(0, affordable));
  return groups.map((_, patch) => {
    if (!chosen.has(patch)) return null;
    const rest = states.flatMap((state, s) => (state.patch === patch ? [] : [s]));
    const without = rest.length > 0 ? growthOf(principalPart(matrix, rest), vectors, rest) : 0;
    return Math.max(0, vectors.growthRate - without);
  });
}

/** One way from a patch to another for one class in one phase. */
export interface LinkValue {
  readonly phase: string;
  readonly from: number;
  readonly to: number;
  readonly class: number;
  /** Share of the animals present that arrives over the link. */
  readonly share: number;
  /** ∂λ/∂share, nothing else changed: one more share arrives and nobody stays less. */
  readonly sensitivity: number;
  /** ∂λ/∂share where those who go would otherwise have stayed. */
  readonly sensitivityInsteadOfStaying: number;
  /** λ lost when those who would have arrived over the link are lost. */
  readonly removalLoss: number;
  /** Whether the loss was recomputed whole, or is share × sensitivity, which holds for small shares. */
  readonly exact: boolean;
}

export interface LinkInput {
  readonly matrix: SparseMatrix;
  readonly vectors: Vectors;
  readonly phases: readonly PhaseSensitivity[];
  /** Place of state s of the matrix among all states of the phase maps. */
  readonly places: readonly number[];
  readonly classCount: number;
}

/**
 * The links are the entries of phases that lead to another patch. Taking link m_ij out of M changes A by the rank-one matrix
 * m_ij (M_after e_i)(M_beforeᵀ e_j)ᵀ; the growth of what is left is recomputed for as many links as seconds allow,
 * the largest first-order losses first.
 */
export function linkValues(input: LinkInput): LinkValue[] {
  const links = input.phases.flatMap((phase, index) => linksOf(phase, input.classCount, index));
  const affordable = Math.floor(workLimit.links / workOf(input.matrix));
  const order = links
    .map((_, k) => k)
    .sort((a, b) => (links[b]?.firstOrder ?? 0) - (links[a]?.firstOrder ?? 0) || a - b);
  const chosen = new Set(order.slice(0, affordable));
  return links.map(({ link, firstOrder, row, column, index }, k) => {
    const exact = chosen.has(k);
    const removalLoss = exact ? exactLoss(input, index, { row, column }) : firstOrder;
    return { ...link, removalLoss: Math.max(0, removalLoss), exact };
  });
}

interface FoundLink {
  readonly link: Omit<LinkValue, 'removalLoss' | 'exact'>;
  readonly firstOrder: number;
  readonly row: number;
  readonly column: number;
  readonly index: number;
}

function linksOf(phase: PhaseSensitivity, classCount: number, index: number): FoundLink[] {
  const found: FoundLink[] = [];
  forEachEntry(phase.map, (row, column, share) => {
    const [to, from] = [Math.floor(row / classCount), Math.floor(column / classCount)];
    if (to === from) return;
    const link = {
      phase: phase.phase,
      from,
      to,
      class: column % classCount,
      share,
      sensitivity: phaseEntrySensitivity(phase, row, column),
      sensitivityInsteadOfStaying: movedInsteadOfStaying(phase, row, column),
    };
    found.push({ link, firstOrder: firstOrderLoss(phase, row, column), row, column, index });
  });
  return found;
}

function exactLoss({ matrix, vectors, phases, places }: LinkInput, index: number, link: Place): number {
  const share = entryAt(phases[index]?.map ?? matrix, link.row, link.column);
  const after = phases.slice(index + 1).reduce((x, { map }) => multiply(map, x), unit(matrixSize(phases), link.row));
  const earlier = phases.slice(0, index).reverse();
  const before = earlier.reduce((x, { map }) => multiplyTransposed(map, x), unit(matrixSize(phases), link.column));
  const left = withoutFlow(matrix, (i, j) => share * (after[places[i] ?? 0] ?? 0) * (before[places[j] ?? 0] ?? 0));
  return (
    vectors.growthRate -
    growthOf(
      left,
      vectors,
      places.map((_, s) => s),
    )
  );
}

interface Place {
  readonly row: number;
  readonly column: number;
}

function matrixSize(phases: readonly PhaseSensitivity[]): number {
  return phases[0]?.map.rows ?? 0;
}

/** The matrix less `flow`, without the differences that rounding leaves where there should be nothing. */
function withoutFlow(matrix: SparseMatrix, flow: (row: number, column: number) => number): SparseMatrix {
  const { rows, columns } = matrix;
  const columnStart = new Int32Array(columns + 1);
  const rowIndex = new Int32Array(matrix.values.length);
  const values = new Float64Array(matrix.values.length);
  let filled = 0;
  forEachEntry(matrix, (row, column, value) => {
    const rest = value - flow(row, column);
    if (rest > 1e-13 * value) {
      rowIndex[filled] = row;
      values[filled++] = rest;
    }
    columnStart[column + 1] = filled;
  });
  for (let j = 0; j < columns; j++) columnStart[j + 1] = Math.max(columnStart[j + 1] ?? 0, columnStart[j] ?? 0);
  return { rows, columns, columnStart, rowIndex: rowIndex.slice(0, filled), values: values.slice(0, filled) };
}

function unit(size: number, place: number): Float64Array {
  const x = new Float64Array(size);
  x[place] = 1;
  return x;
}
