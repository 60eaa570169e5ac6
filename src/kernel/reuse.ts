// Opens one image after the other in the same instance, which saves making a new one for each.
import type { Machine } from '../machine/instance.ts';
import { openIn } from './open-in.ts';

/** Everything of the image before is gone, to the last byte: the same image gives the same results as in a fresh instance. */
export function openNext(machine: Machine, image: ArrayBuffer): void {
  machine.release();
  const start = machine.reserve(0);
  new Uint8Array(machine.memory.buffer, start).fill(0);
  machine.release();
  const fault = openIn(machine, image);
  if (fault !== null) throw new Error(fault.message);
}
