// Runs the path without chance: the means of the phases, one after the other.
import * as layout from '../../assembly/layout.ts';
import { headerOf } from '../compile/image/read.ts';
import { eachStep } from './moved.ts';
import { openOwnImage } from './open.ts';
import type { RawPath } from './output.ts';

export function runPath(image: ArrayBuffer, { steps }: { readonly steps: number }): RawPath {
  const machine = openOwnImage(image);
  const header = headerOf(image);
  const cells = (header[layout.headerPatches] ?? 0) * (header[layout.headerClasses] ?? 0);
  const animals = new Float64Array((steps + 1) * cells);
  const ways = header[layout.headerWays] ?? 0;
  const movedSoFar = new Float64Array((steps + 1) * ways);
  machine.startPath();
  for (let step = 0; step <= steps; step++) {
    if (step > 0) machine.stepPath();
    animals.set(new Float64Array(machine.memory.buffer, machine.pathAnimals(), cells), step * cells);
    movedSoFar.set(new Float64Array(machine.memory.buffer, machine.pathMoved(), ways), step * ways);
  }
  return { steps, animals, moved: eachStep(movedSoFar, ways) };
}
