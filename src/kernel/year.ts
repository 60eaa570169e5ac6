// The first year of a model as a function of its animals, without chance, as the kernel follows it: for models of any size.
import { openOwnPath, pathOf } from './open-path.ts';

/** P·C animals at a count, at p * C + c, to those a year later. */
export function openYear(image: ArrayBuffer): (animals: Float64Array) => Float64Array {
  const machine = openOwnPath(image);
  const here = pathOf(machine, image);
  machine.startPath();
  return (animals) => {
    here.set(animals);
    machine.writePath();
    machine.rewindPath();
    machine.stepPath();
    machine.readPath();
    return here.slice();
  };
}
