// Numbers of states turned into the names that their author gave.
import type { BlockMatrix } from '../compile/block-matrix.ts';

export interface StateName {
  readonly patch: string;
  readonly class: string;
}

export function stateName(block: BlockMatrix, state: number): StateName {
  const here = block.states[state];
  return { patch: block.patches[here?.patch ?? -1] ?? '?', class: block.classes[here?.class ?? -1] ?? '?' };
}

/** Place of each state of the matrix among all patches and classes of the phase maps. */
export function placesOf(block: BlockMatrix): number[] {
  return block.states.map((state) => state.patch * block.classes.length + state.class);
}
