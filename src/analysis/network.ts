// What the metapopulation capacity needs of a model: areas, and how far its movement reaches.
import { neighboursWithin } from '../landscape/distance.ts';
import { weightRatio } from '../model/kernel-shape.ts';
import type { Model } from '../model/model.ts';
import { because, listNames, type Answer } from './answer.ts';
import type { Network } from './metapopulation-capacity.ts';

/** The table holds every pair of patches. */
const mostPatches = 2000;

/** By the kernel of the first dispersal that has one, over itself at no distance. */
export function networkOf({ patches, phases }: Model): Answer<Network> {
  if (patches.length < 2) return because('There is one patch only.');
  const rule = phases.flatMap((phase) =>
    phase.kind === 'dispersal' && phase.rule.by === 'kernel' ? [phase.rule] : [],
  )[0];
  if (rule === undefined) return because('No dispersal goes by a kernel of distance.');
  const missing = patches.filter(({ areaKm2 }) => areaKm2 === null).map(({ name }) => name);
  if (missing.length > 0)
    return because(
      `It needs the area of every patch; ${listNames(missing)} ${missing.length === 1 ? 'has' : 'have'} none.`,
    );
  if (patches.length > mostPatches) return because(`It is worked out for up to ${mostPatches} patches.`);
  const size = patches.length;
  const reach = new Float64Array(size * size);
  const { kernel, between } = rule;
  neighboursWithin({ patches, reachKm: kernel.reachKm, between }).forEach((others, p) => {
    for (const { patch, km } of others) reach[p * size + patch] = weightRatio(kernel, km, 0);
  });
  return { value: { areasKm2: patches.map(({ areaKm2 }) => areaKm2 ?? 0), reach } };
}
