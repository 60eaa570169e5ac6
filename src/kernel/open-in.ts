// Opens an image in an instance of the kernel module, and tells in words what stands against it.
import * as layout from '../../assembly/layout.ts';
import type { Machine } from '../machine/instance.ts';

/** Why an image cannot be run here. */
export interface ImageFault {
  readonly code: 'not-an-image' | 'other-version' | 'damaged' | 'unknown-kind' | 'unknown-opcode' | 'too-large';
  readonly message: string;
}

/** Null where the image is open. */
export function openIn(machine: Machine, image: ArrayBuffer): ImageFault | null {
  const address = machine.reserve(image.byteLength);
  if (address === 0) return faultOf(layout.faultMemory, 0);
  new Uint8Array(machine.memory.buffer, address, image.byteLength).set(new Uint8Array(image));
  const code = machine.open(address, image.byteLength);
  return code === layout.faultNone ? null : faultOf(code, machine.faultSubject());
}

function faultOf(code: number, subject: number): ImageFault {
  switch (code) {
    case layout.faultMagic:
      return { code: 'not-an-image', message: 'These bytes are not a compiled model.' };
    case layout.faultMajor:
      return {
        code: 'other-version',
        message: `The compiled model has version ${String(subject)}; this kernel runs version ${String(layout.imageMajor)}.`,
      };
    case layout.faultSize:
      return { code: 'damaged', message: `The compiled model is cut short or damaged (${String(subject)} bytes).` };
    case layout.faultKind:
      return { code: 'unknown-kind', message: `The compiled model has a section of unknown kind ${String(subject)}.` };
    case layout.faultOpcode:
      return {
        code: 'unknown-opcode',
        message: `The compiled model has a record with unknown opcode ${String(subject)}.`,
      };
    default:
      return { code: 'too-large', message: 'The model needs more memory than the kernel can have.' };
  }
}
