// What the growth rate loses when a patch or a link is taken away.
import { leading } from '../numeric/leading.ts';
import { principalPart } from '../numeric/sparse-product.ts';
import { multiply, multiplyTransposed, weightedSum } from '../numeric/sparse-product.ts';
import { entryAt, forEachEntry, sparseFromTriplets, type SparseMatrix } from '../numeric/sparse.ts';
import { statesByPatch, type PatchState } from './patches.ts';
import {
  firstOrderLoss,
  movedInsteadOfStaying,
  phaseEntrySensitivity,
  type PhaseSensitivity,
} from './phase-sensitivity.ts';

/** Work that exact removals may take, in states³ or entries: some seconds. */
const workLimit = 4e9;

function workOf(matrix: SparseMatrix): number {
  const n = matrix.columns;
  return n <= 160 ? 10 * n * n * n + 1e4 : 2e3 * matrix.values.length + 4e6;
}

/**
 * λ − λ without each patch, all animals of which are lost; recomputed whole. Where that would take longer than seconds, only
 * for the patches with the largest share of `importance`; the others are null.
 */
export function patchRemovalLosses(
  matrix: SparseMatrix,
  states: readonly PatchState[],
  growthRate: number,
  importance: Float64Array,
): (number | null)[] {
  const groups = statesByPatch(states, importance.length);
  const affordable = Math.max(10, Math.floor(workLimit / workOf(matrix)));
  const order = groups.map((_, p) => p).sort((a, b) => (importance[b] ?? 0) - (importance[a] ?? 0) || a - b);
  const chosen = new Set(order.slice(0, affordable));
  return groups.map((_, patch) => {
    if (!chosen.has(patch)) return null;
    const rest = states.flatMap((state, s) => (state.patch === patch ? [] : [s]));
    const without = rest.length > 0 ? leading(principalPart(matrix, rest)).growthRate : 0;
    return Math.max(0, growthRate - without);
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
  readonly growthRate: number;
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
  const affordable = Math.floor(workLimit / workOf(input.matrix));
  const order = links
    .map((_, k) => k)
    .sort((a, b) => (links[b]?.firstOrder ?? 0) - (links[a]?.firstOrder ?? 0) || a - b);
  const chosen = new Set(order.slice(0, affordable));
  return links.map(({ link, firstOrder, row, column, index }, k) => {
    const exact = chosen.has(k);
    const removalLoss = exact ? exactLoss(input, index, [row, column]) : firstOrder;
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

function exactLoss(input: LinkInput, index: number, [row, column]: readonly [number, number]): number {
  const share = entryAt(input.phases[index]?.map ?? input.matrix, row, column);
  const removed = rankOne(input, index, [row, column]);
  const without = dropRounding(weightedSum([1, input.matrix], [-share, removed]));
  return input.growthRate - leading(without).growthRate;
}

/** (M_after e_row)(M_beforeᵀ e_column)ᵀ, over the states of the matrix. */
function rankOne(input: LinkInput, index: number, [row, column]: readonly [number, number]): SparseMatrix {
  const size = input.phases[index]?.map.rows ?? 0;
  const after = input.phases.slice(index + 1).reduce((x, { map }) => multiply(map, x), unit(size, row));
  const earlier = input.phases.slice(0, index).reverse();
  const before = earlier.reduce((x, { map }) => multiplyTransposed(map, x), unit(size, column));
  const entries = input.places.flatMap((place, s) => ((before[place] ?? 0) > 0 ? [s] : []));
  const targets = input.places.flatMap((place, s) => ((after[place] ?? 0) > 0 ? [s] : []));
  const pairs = entries.flatMap((j) => targets.map((i) => [i, j] as const));
  return sparseFromTriplets({
    rows: input.matrix.rows,
    columns: input.matrix.columns,
    rowIndex: pairs.map(([i]) => i),
    columnIndex: pairs.map(([, j]) => j),
    values: pairs.map(([i, j]) => (after[input.places[i] ?? 0] ?? 0) * (before[input.places[j] ?? 0] ?? 0)),
  });
}

/** Differences that rounding left where there should be nothing. */
function dropRounding(matrix: SparseMatrix): SparseMatrix {
  const columnIndex = new Int32Array(matrix.values.length);
  forEachEntry(matrix, (_row, column, _value, k) => (columnIndex[k] = column));
  const values = matrix.values.map((value) => (value < 1e-16 ? 0 : value));
  return sparseFromTriplets({ ...matrix, columnIndex, values });
}

function unit(size: number, place: number): Float64Array {
  const x = new Float64Array(size);
  x[place] = 1;
  return x;
}
