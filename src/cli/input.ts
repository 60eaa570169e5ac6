// The bytes of a model file or of standard input, never more than a model can have.
import { closeSync, openSync, readSync, statSync } from 'node:fs';
import { Ending, exitCodes } from './exit.ts';
import { codeOf, reasonOf } from './output.ts';

/** Larger files are not specs; data belong into files of their own. */
const mostBytes = 8 * 1024 * 1024;
const chunkBytes = 64 * 1024;
const waitMs = 5;

/** `-` is standard input. */
export function readText(path: string): string {
  const bytes = path === '-' ? readAll(0, 'standard input') : readFile(path);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw cannotRead(path, 'it is not text in UTF-8');
  }
}

function readFile(path: string): Uint8Array {
  const found = attempt(path, () => statSync(path));
  if (found.isDirectory()) throw cannotRead(path, 'it is a folder; name the model file in it');
  if (found.size > mostBytes) throw tooLarge(path);
  const descriptor = attempt(path, () => openSync(path, 'r'));
  try {
    return readAll(descriptor, path);
  } finally {
    closeSync(descriptor);
  }
}

/** A pipe or a device does not say how long it is: it is read until it ends or is too long. */
function readAll(descriptor: number, path: string): Uint8Array {
  const chunks: Uint8Array[] = [];
  let total = 0;
  for (;;) {
    const chunk = new Uint8Array(chunkBytes);
    const read = attempt(path, () => readSome(descriptor, chunk));
    if (read === 0) return Buffer.concat(chunks);
    chunks.push(chunk.subarray(0, read));
    total += read;
    if (total > mostBytes) throw tooLarge(path);
  }
}

/** Standard input may have nothing yet; then it is asked again. */
function readSome(descriptor: number, into: Uint8Array): number {
  for (;;) {
    try {
      return readSync(descriptor, into);
    } catch (error) {
      if (codeOf(error) === 'EOF') return 0;
      if (codeOf(error) !== 'EAGAIN') throw error;
      Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, waitMs);
    }
  }
}

function attempt<T>(path: string, action: () => T): T {
  try {
    return action();
  } catch (error) {
    throw cannotRead(path, reasonOf(error));
  }
}

function tooLarge(path: string): Ending {
  return cannotRead(path, `it is larger than a model can be (${mostBytes / 1024 / 1024} MB)`);
}

function cannotRead(path: string, why: string): Ending {
  return new Ending(exitCodes.model, `Cannot read ${path === '-' ? 'standard input' : path}: ${why}.`);
}
