// What each patch is to the whole with almost nobody there, without the rest of the analysis: quick for large landscapes.
import { buildBlock } from '../compile/block.ts';
import type { Compiled } from '../compile/year-map.ts';
import { leading } from '../numeric/leading.ts';
import { because, type Answer } from './answer.ts';
import { patchRoles, type PatchRole } from './patches.ts';

export interface PatchValues {
  readonly growthRate: number;
  /** In the order of the model. */
  readonly patches: readonly PatchRole[];
}

/** Cost: milliseconds for ten patches, under a second for a thousand. */
export function patchValues(compiled: Compiled): Answer<PatchValues> {
  const { matrix, states, patches } = buildBlock(compiled, 'zero');
  const { growthRate, right, reason } = leading(matrix);
  if (right === null) return because(reason ?? 'There is no single stable distribution.');
  return { value: { growthRate, patches: patchRoles(matrix, states, right, patches.length) } };
}
