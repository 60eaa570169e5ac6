// What the growth rate loses when a patch or a link is taken away.
import { irreducibleGrowth } from '../numeric/irreducible-pair.ts';
import { growthRateOf } from '../numeric/leading.ts';
import { principalPart } from '../numeric/principal-part.ts';
import { multiply, multiplyTransposed } from '../numeric/sparse-product.ts';
import { entryAt, forEachEntry, type SparseMatrix } from '../numeric/sparse.ts';
import { statesByPatch, type PatchState } from './patches.ts';
import type { Vectors } from './sensitivity.ts';
import { aroundGrowth, lossWithout, lossWithoutStates, responseTo, type Around, type FewEntries } from './without.ts';
import {
  firstOrderLoss,
  movedInsteadOfStaying,
  phaseEntrySensitivity,
  type PhaseSensitivity,
} from './phase-sensitivity.ts';

/** Work that removals one by one may take, in about a nanosecond each: seconds. */
const workLimit = { patches: 4e9, links: 2.5e9 } as const;
/** Below this all are quickest one by one. */
const quickWork = 2e8;

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
  return quick ?? growthRateOf(rest);
}

/** One inverse for all losses, where there are too many to take them one by one. */
export function sharedInverse(matrix: SparseMatrix, vectors: Vectors, removals: number): Around | null {
  return removals * workOf(matrix) <= quickWork ? null : aroundGrowth(matrix, vectors);
}

export interface PatchRemovals {
  readonly matrix: SparseMatrix;
  readonly states: readonly PatchState[];
  readonly vectors: Vectors;
  /** By patch. */
  readonly importance: Float64Array;
  readonly around: Around | null;
}

/**
 * λ − λ without each patch, all animals of which are lost. What the shared inverse cannot tell is recomputed whole; where that would
 * take longer than seconds, only for the patches with the largest share of `importance`; the others are null.
 */
export function patchRemovalLosses({ matrix, states, vectors, importance, around }: PatchRemovals): (number | null)[] {
  const groups = statesByPatch(states, importance.length);
  const quick = around === null ? groups.map(() => null) : quickLosses(around, groups, states);
  const affordable = Math.max(10, Math.floor(workLimit.patches / workOf(matrix)));
  const order = groups
    .flatMap((_, p) => (quick[p] === null ? [p] : []))
    .sort((a, b) => (importance[b] ?? 0) - (importance[a] ?? 0) || a - b);
  const chosen = new Set(order.slice(0, affordable));
  return groups.map((_, patch) => {
    const known = quick[patch] ?? null;
    if (known !== null || !chosen.has(patch)) return known;
    const rest = states.flatMap((state, s) => (state.patch === patch ? [] : [s]));
    const without = rest.length > 0 ? growthOf(principalPart(matrix, rest), vectors, rest) : 0;
    return Math.max(0, vectors.growthRate - without);
  });
}

/** Where the states that the inverse folds away are entered from their own patch alone, and so go with it. */
function quickLosses(
  around: Around,
  groups: readonly (readonly number[])[],
  states: readonly PatchState[],
): (number | null)[] {
  const { folding, matrix } = around.resolvent;
  const folded = new Uint8Array(states.length);
  for (const state of folding.folded) folded[state] = 1;
  const open = new Uint8Array(groups.length);
  forEachEntry(matrix, (row, column) => {
    const [to, from] = [states[row]?.patch ?? 0, states[column]?.patch ?? 0];
    if (folded[row] === 1 && to !== from) open[to] = 1;
  });
  const kept: number[][] = groups.map(() => []);
  for (const state of folding.kept) kept[states[state]?.patch ?? 0]?.push(state);
  return kept.map((own, patch) => (open[patch] === 1 ? null : lossWithoutStates(around, own)));
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
  readonly around: Around | null;
}

/**
 * The links are the entries of phases that lead to another patch. Taking link m_ij out of M changes A by the rank-one matrix
 * m_ij (M_after e_i)(M_beforeᵀ e_j)ᵀ; the growth of what is left is recomputed for as many links as seconds allow,
 * the largest first-order losses first.
 */
export function linkValues(input: LinkInput): LinkValue[] {
  const links = input.phases.flatMap((phase, index) => linksOf(phase, input.classCount, index));
  const quick = quickLinks(input, links);
  const affordable = Math.floor(workLimit.links / workOf(input.matrix));
  const order = links
    .flatMap((_, k) => (quick[k] === null ? [k] : []))
    .sort((a, b) => (links[b]?.firstOrder ?? 0) - (links[a]?.firstOrder ?? 0) || a - b);
  const chosen = new Set(order.slice(0, affordable));
  return links.map(({ link, firstOrder, row, column, index }, k) => {
    const known = quick[k] ?? null;
    const exact = known !== null || chosen.has(k);
    const removalLoss = known ?? (exact ? exactLoss(input, index, { row, column }) : firstOrder);
    return { ...link, removalLoss: Math.max(0, removalLoss), exact };
  });
}

/** Work that the shared inverse may take for links. */
const mostQuick = 6e9;

/** Those that arrive in one place together: what an animal there becomes is asked for once. */
function quickLinks({ matrix, phases, places, around }: LinkInput, links: readonly FoundLink[]): (number | null)[] {
  const losses: (number | null)[] = links.map(() => null);
  const byArrival = new Map<string, number[]>();
  links.forEach(({ index, row }, k) => {
    const key = `${index} ${row}`;
    const same = byArrival.get(key);
    if (same === undefined) byArrival.set(key, [k]);
    else same.push(k);
  });
  if (around === null || byArrival.size * 8 * matrix.values.length > mostQuick) return losses;
  const size = matrixSize(phases);
  const departures = new Map<string, FewEntries>();
  const departing = ({ index, column }: FoundLink): FewEntries => {
    const key = `${index} ${column}`;
    const earlier = phases.slice(0, index).reverse();
    const made =
      departures.get(key) ??
      fewOf(
        earlier.reduce((x, { map }) => multiplyTransposed(map, x), unit(size, column)),
        places,
      );
    departures.set(key, made);
    return made;
  };
  for (const same of byArrival.values()) {
    const first = links[same[0] ?? 0];
    if (first === undefined) continue;
    const after = phases.slice(first.index + 1).reduce((x, { map }) => multiply(map, x), unit(size, first.row));
    const arrived = Float64Array.from(places, (place) => after[place] ?? 0);
    const from = responseTo(around, arrived);
    for (const k of same) {
      const link = links[k];
      if (link !== undefined) losses[k] = lossWithout(around, from, departing(link), link.link.share);
    }
  }
  return losses;
}

function fewOf(x: Float64Array, places: readonly number[]): FewEntries {
  const found: { places: number[]; values: number[] } = { places: [], values: [] };
  places.forEach((place, s) => {
    const value = x[place] ?? 0;
    if (value === 0) return;
    found.places.push(s);
    found.values.push(value);
  });
  return found;
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
