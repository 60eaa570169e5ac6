// Runs the path without chance: the means of the phases, one after the other.
import { openOwnPath, pathOf } from './open-path.ts';
import type { RawPath } from './output.ts';

export function runPath(image: ArrayBuffer, { steps }: { readonly steps: number }): RawPath {
  const machine = openOwnPath(image);
  const here = pathOf(machine, image);
  const animals = new Float64Array((steps + 1) * here.length);
  machine.startPath();
  for (let step = 0; step <= steps; step++) {
    if (step > 0) machine.stepPath();
    machine.readPath();
    animals.set(here, step * here.length);
  }
  return { steps, animals };
}
