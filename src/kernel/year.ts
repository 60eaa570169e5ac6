// The first year of a model as a function of its animals, without chance, as the kernel follows it: for models of any size.
import * as layout from '../../assembly/layout.ts';
import { headerOf } from '../compile/image/read.ts';
import { openOwnImage } from './open.ts';

/** P·C animals at a count, at p * C + c, to those a year later. */
export function openYear(image: ArrayBuffer): (animals: Float64Array) => Float64Array {
  const machine = openOwnImage(image);
  const header = headerOf(image);
  const cells = (header[layout.headerPatches] ?? 0) * (header[layout.headerClasses] ?? 0);
  return (animals) => {
    machine.startPath();
    new Float64Array(machine.memory.buffer, machine.pathAnimals(), cells).set(animals);
    machine.stepPath();
    return new Float64Array(machine.memory.buffer, machine.pathAnimals(), cells).slice();
  };
}
