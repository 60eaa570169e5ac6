// Opens an image for the path without chance.
import * as layout from '../../assembly/layout.ts';
import { headerOf } from '../compile/image/read.ts';
import type { Machine } from '../machine/instance.ts';
import { openOwnImage } from './open.ts';

/** Errors: throws where the model needs more memory than the kernel can have. */
export function openOwnPath(image: ArrayBuffer): Machine {
  const machine = openOwnImage(image);
  if (machine.openPath() === 0) throw new Error(tooLarge);
  return machine;
}

/** The same, and room for sixteen courses. */
export function openOwnCourses(image: ArrayBuffer): Machine {
  const machine = openOwnImage(image);
  if (machine.openCourses() === 0) throw new Error(tooLarge);
  return machine;
}

const tooLarge = 'The model needs more memory than the kernel can have.';

/** Where the animals of the path are read and written, at p * C + c. */
export function pathOf(machine: Machine, image: ArrayBuffer): Float64Array {
  return new Float64Array(machine.memory.buffer, machine.pathAnimals(), cellsOf(image));
}

/** Patches times classes. */
export function cellsOf(image: ArrayBuffer): number {
  const header = headerOf(image);
  return (header[layout.headerPatches] ?? 0) * (header[layout.headerClasses] ?? 0);
}
