// What each patch is to the whole: growth alone, contribution, self-recruitment, source or sink.
import { growthRateOf } from '../numeric/leading.ts';
import { principalPart } from '../numeric/principal-part.ts';
import { forEachEntry, type SparseMatrix } from '../numeric/sparse.ts';

export interface PatchState {
  readonly patch: number;
  readonly class: number;
}

export interface PatchRole {
  /** Growth rate of the patch by itself: whoever leaves is lost, nobody comes. */
  readonly growthAlone: number;
  /** Animals next year, anywhere, for each animal of the patch now. Null where the structure has nobody in the patch. */
  readonly contribution: number | null;
  /** The same, counting only those in the patch itself. */
  readonly selfRecruitment: number | null;
  readonly role: 'source' | 'sink' | 'undecided' | null;
}

/**
 * Contribution C^r (Runge, Runge & Nichols 2006, formula from memory): the column sums of A, weighted by the make-up of the
 * patch in `structure` (any animals by state: the stable distribution or those there now). Source above 1, sink below.
 * Over the stable distribution the contributions, weighted by the shares of the patches, sum to the growth rate.
 */
export function patchRoles(
  matrix: SparseMatrix,
  states: readonly PatchState[],
  structure: Float64Array,
  patchCount: number,
): PatchRole[] {
  const [animals, anywhere, here] = [sums(patchCount), sums(patchCount), sums(patchCount)];
  structure.forEach((share, s) => add(animals, states[s]?.patch ?? 0, share));
  forEachEntry(matrix, (row, column, value) => {
    const from = states[column]?.patch ?? 0;
    const flow = value * (structure[column] ?? 0);
    add(anywhere, from, flow);
    if (states[row]?.patch === from) add(here, from, flow);
  });
  const groups = statesByPatch(states, patchCount);
  return groups.map((group, p) => {
    const present = animals[p] ?? 0;
    const contribution = present > 0 ? (anywhere[p] ?? 0) / present : null;
    return {
      growthAlone: group.length > 0 ? growthRateOf(principalPart(matrix, group)) : 0,
      contribution,
      selfRecruitment: present > 0 ? (here[p] ?? 0) / present : null,
      role: contribution === null ? null : roleOf(contribution, [contribution, contribution]),
    };
  });
}

/** Undecided where the interval of the contribution holds 1 (for a point estimate: where it is 1 within rounding). */
export function roleOf(
  contribution: number,
  [lower, upper]: readonly [number, number],
): 'source' | 'sink' | 'undecided' {
  if ((lower <= 1 && upper >= 1) || Math.abs(contribution - 1) < 1e-9) return 'undecided';
  return contribution > 1 ? 'source' : 'sink';
}

/** States of each patch, ascending. */
export function statesByPatch(states: readonly PatchState[], patchCount: number): number[][] {
  const groups: number[][] = Array.from({ length: patchCount }, () => []);
  states.forEach(({ patch }, s) => groups[patch]?.push(s));
  return groups;
}

/** Animals of a sink that a source feeds at steady state, n₁(λ₁ − 1)/(1 − λ₂) (Pulliam 1988). */
export function sinkSize(
  source: { readonly animals: number; readonly growth: number },
  sinkGrowth: number,
): number | null {
  if (!(source.growth >= 1 && sinkGrowth < 1)) return null;
  return (source.animals * (source.growth - 1)) / (1 - sinkGrowth);
}

function sums(size: number): Float64Array {
  return new Float64Array(size);
}

function add(into: Float64Array, place: number, value: number): void {
  into[place] = (into[place] ?? 0) + value;
}
