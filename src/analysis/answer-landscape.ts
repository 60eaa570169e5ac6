// The parts of the analysis about patches, links, the network and the spread.
import { because, type Answer } from './answer.ts';
import { growthDifference } from './difference.ts';
import type { AnalysisInput } from './input.ts';
import { placesOf, stateName } from './label.ts';
import { metapopulationCapacity } from './metapopulation-capacity.ts';
import { patchRoles } from './patches.ts';
import { phaseSensitivities } from './phase-sensitivity.ts';
import { linkValues, patchRemovalLosses } from './removal.ts';
import type { Analysis } from './schema.ts';
import type { Vectors } from './sensitivity.ts';
import { spreadSpeed } from './spread.ts';

export function patchesAnswer({ block, start }: AnalysisInput, vectors: Vectors): NonNullable<Analysis['patches']> {
  const { matrix, states, patches } = block;
  const [share, importance] = [new Float64Array(patches.length), new Float64Array(patches.length)];
  states.forEach(({ patch }, s) => {
    const here = vectors.right[s] ?? 0;
    share[patch] = (share[patch] ?? 0) + here;
    importance[patch] = (importance[patch] ?? 0) + here * (vectors.left[s] ?? 0);
  });
  const roles = patchRoles(matrix, states, vectors.right, patches.length);
  const now = start && patchRoles(matrix, states, start, patches.length);
  const losses = patchRemovalLosses(matrix, states, vectors, importance);
  return roles.map((role, p) => ({
    patch: patches[p] ?? '?',
    share: share[p] ?? 0,
    ...role,
    contributionNow: now?.[p]?.contribution ?? null,
    removalLoss: losses[p] ?? null,
  }));
}

export function linksAnswer({ block }: AnalysisInput, vectors: Vectors): NonNullable<Analysis['links']> {
  const places = placesOf(block);
  const phases = phaseSensitivities(block.phaseMaps, places, vectors);
  const links = linkValues({
    matrix: block.matrix,
    vectors,
    phases,
    places,
    classCount: block.classes.length,
  });
  return links.map((link) => ({
    ...link,
    from: block.patches[link.from] ?? '?',
    to: block.patches[link.to] ?? '?',
    class: block.classes[link.class] ?? '?',
  }));
}

export function capacityAnswer(input: AnalysisInput): Answer<NonNullable<Analysis['metapopulationCapacity']>> {
  if (!input.network) return because('Was not asked for: it needs areas, distances and a mean distance of movement.');
  const { capacity, patchValues } = metapopulationCapacity(input.network);
  const named = patchValues && Array.from(patchValues, (value, p) => ({ patch: input.block.patches[p] ?? '?', value }));
  return { value: { capacity, patchValues: named } };
}

export function spreadAnswer({ block, lineKernels }: AnalysisInput): Answer<NonNullable<Analysis['spread']>> {
  if (!lineKernels)
    return because('Was not asked for: it holds on land of one quality, not over a network of patches.');
  const found = spreadSpeed({ matrix: block.matrix, kernelOf: lineKernels });
  if (!found) return because('The population does not grow, so it has no front that advances.');
  return { value: { speedKm: found.speedKm, theta: found.theta } };
}

export function differenceAnswer({ block, reference }: AnalysisInput): Answer<NonNullable<Analysis['ltre']>> {
  if (!reference) return because('Nothing was given to compare with.');
  const found = growthDifference(block.matrix, reference);
  if (!found) return because('The matrix half-way between the two has no single stable distribution.');
  const contributions = found.contributions.map(({ row, column, difference, contribution }) => ({
    from: stateName(block, column),
    to: stateName(block, row),
    difference,
    contribution,
  }));
  return { value: { difference: found.difference, unexplained: found.unexplained, contributions } };
}
