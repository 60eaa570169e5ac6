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

/** By Node's own reader, or else letter by letter: made from an iterator, it would take a good part of the start. */
function bytesOf(base64: string): Uint8Array<ArrayBuffer> {
  const { Buffer: buffers } = globalThis as { Buffer?: typeof Buffer };
  if (buffers !== undefined) {
    const { buffer, byteOffset, length } = buffers.from(base64, 'base64');
    return new Uint8Array(buffer, byteOffset, length);
  }
  const letters = atob(base64);
  const bytes = new Uint8Array(letters.length);
  for (let i = 0; i < bytes.length; i++) bytes[i] = letters.charCodeAt(i);
  return bytes;
}
