// Opens an image in a fresh instance of the kernel module.
import type { Machine } from '../machine/instance.ts';
import { loadMachine } from '../machine/machine.ts';
import { openIn, type ImageFault } from './open-in.ts';

export type Opened =
  { readonly ok: true; readonly machine: Machine } | { readonly ok: false; readonly fault: ImageFault };

export function openImage(image: ArrayBuffer): Opened {
  const machine = loadMachine();
  const fault = openIn(machine, image);
  return fault === null ? { ok: true, machine } : { ok: false, fault };
}

/** An instance with the image open; a fault here is a bug of the tool, since its own compiler made the image. */
export function openOwnImage(image: ArrayBuffer): Machine {
  const opened = openImage(image);
  if (!opened.ok) throw new Error(opened.fault.message);
  return opened.machine;
}
