// The parts of the analysis about patches, links, the network and the spread.
import { forEachEntry, type SparseMatrix } from '../numeric/sparse.ts';
import { because, type Answer } from './answer.ts';
import { growthDifference } from './difference.ts';
import type { AnalysisInput } from './input.ts';
import { placesOf, stateName } from './label.ts';
import { metapopulationCapacity } from './metapopulation-capacity.ts';
import { patchRoles } from './patches.ts';
import { phaseSensitivities } from './phase-sensitivity.ts';
import { linkValues, patchRemovalLosses, sharedInverse } from './removal.ts';
import type { Analysis } from './schema.ts';
import type { Vectors } from './sensitivity.ts';
import type { Around } from './without.ts';

/** For all patches and links together; null where they are few. */
export function removalsOf({ block }: AnalysisInput, vectors: Vectors): Around | null {
  const ways = block.phaseMaps.reduce((sum, { map }) => sum + waysBetween(map, block.classes.length), 0);
  return sharedInverse(block.matrix, vectors, block.patches.length + ways);
}

function waysBetween(map: SparseMatrix, classes: number): number {
  let ways = 0;
  forEachEntry(map, (row, column) => (ways += Math.floor(row / classes) === Math.floor(column / classes) ? 0 : 1));
  return ways;
}

export interface WithAround {
  readonly vectors: Vectors;
  readonly around: Around | null;
}

export function patchesAnswer(
  { block, start }: AnalysisInput,
  { vectors, around }: WithAround,
): NonNullable<Analysis['patches']> {
  const { matrix, states, patches } = block;
  const [share, importance] = [new Float64Array(patches.length), new Float64Array(patches.length)];
  states.forEach(({ patch }, s) => {
    const here = vectors.right[s] ?? 0;
    share[patch] = (share[patch] ?? 0) + here;
    importance[patch] = (importance[patch] ?? 0) + here * (vectors.left[s] ?? 0);
  });
  const roles = patchRoles(matrix, states, vectors.right, patches.length);
  const now = start && patchRoles(matrix, states, start, patches.length);
  const losses = patchRemovalLosses({ matrix, states, vectors, importance, around });
  return roles.map((role, p) => ({
    patch: patches[p] ?? '?',
    share: share[p] ?? 0,
    ...role,
    contributionNow: now?.[p]?.contribution ?? null,
    removalLoss: losses[p] ?? null,
  }));
}

export function linksAnswer({ block }: AnalysisInput, { vectors, around }: WithAround): NonNullable<Analysis['links']> {
  const places = placesOf(block);
  const phases = phaseSensitivities(block.phaseMaps, places, vectors);
  const links = linkValues({
    matrix: block.matrix,
    vectors,
    phases,
    places,
    classCount: block.classes.length,
    around,
  });
  return links.map((link) => ({
    ...link,
    from: block.patches[link.from] ?? '?',
    to: block.patches[link.to] ?? '?',
    class: block.classes[link.class] ?? '?',
  }));
}

export function capacityAnswer(input: AnalysisInput): Answer<NonNullable<Analysis['metapopulationCapacity']>> {
  const { network } = input;
  if (!network) return because('The matrix was given without the areas of its patches and the distances between them.');
  if (network.value === null) return network;
  const { capacity, patchValues } = metapopulationCapacity(network.value);
  const named = patchValues && Array.from(patchValues, (value, p) => ({ patch: input.block.patches[p] ?? '?', value }));
  return { value: { capacity, patchValues: named } };
}

export function spreadAnswer({ spread }: AnalysisInput): Answer<NonNullable<Analysis['spread']>> {
  if (!spread) return because('The matrix was given without kernels of movement.');
  if (spread.value === null) return spread;
  return { value: spread.value.map(({ parameters, ...land }) => ({ ...land, parameters: [...parameters] })) };
}

export function differenceAnswer({ block, against }: AnalysisInput): Answer<NonNullable<Analysis['ltre']>> {
  if (!against) return because('Nothing was given to compare with.');
  if (against.value === null) return against;
  const { name, matrix: reference, parameters } = against.value;
  const found = growthDifference(block.matrix, reference);
  if (!found) return because('The matrix half-way between the two has no single stable distribution.');
  const contributions = found.contributions.map(({ row, column, difference, contribution }) => ({
    from: stateName(block, column),
    to: stateName(block, row),
    difference,
    contribution,
  }));
  const explained = (parameters.value ?? []).reduce((sum, { contribution }) => sum + contribution, 0);
  const byParameter =
    parameters.value === null
      ? { parameters: null, unexplainedByParameters: null, whyNoParameters: parameters.reason }
      : {
          parameters: parameters.value.map((one) => ({ ...one })),
          unexplainedByParameters: found.difference - explained,
          whyNoParameters: null,
        };
  const { difference, unexplained } = found;
  return { value: { against: name, difference, unexplained, contributions, ...byParameter } };
}
