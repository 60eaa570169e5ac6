// The kernel module, compiled once and instantiated on demand: in Node and in a browser, without imports of either.
import { kernelBase64 } from '../../build/kernel.ts';
import { instantiate, type Machine } from './instance.ts';

export const kernelBytes: Uint8Array<ArrayBuffer> = bytesOf(kernelBase64);

/** Compiled once; other threads take it as it is. */
export const kernelModule = new WebAssembly.Module(kernelBytes);

/** A fresh instance of the kernel module. */
export function loadMachine(): Machine {
  return instantiate(kernelModule);
}

/** Letter by letter: made from an iterator, it would take a good part of the start of a command. */
function bytesOf(base64: string): Uint8Array<ArrayBuffer> {
  const letters = atob(base64);
  const bytes = new Uint8Array(letters.length);
  for (let i = 0; i < bytes.length; i++) bytes[i] = letters.charCodeAt(i);
  return bytes;
}
