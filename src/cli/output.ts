// Standard output and error, and files that are written whole or not at all.
import { closeSync, mkdirSync, openSync, renameSync, rmSync, statSync, writeSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { Ending, exitCodes } from './exit.ts';

export function writeOut(text: string): void {
  writeAll(1, text, 'standard output');
}

export function writeError(text: string): void {
  try {
    writeAll(2, text, 'standard error');
  } catch {
    // Nobody is left to tell.
  }
}

/** A file that appears under its name only once all of it is written. */
export interface PendingFile {
  readonly path: string;
  finish(text: string | Uint8Array): void;
  abandon(): void;
}

/** Opens a file beside the wanted one, so that an unwritable place is told before the work and not after it. */
export function openPending(path: string): PendingFile {
  refuseDirectory(path);
  const temporary = join(dirname(path), `.${basename(path)}.${process.pid}.tmp`);
  const descriptor = attempt(path, () => openSync(temporary, 'wx'));
  const abandon = (): void => {
    rmSync(temporary, { force: true });
  };
  return {
    path,
    abandon,
    finish: (content) => {
      try {
        writeAll(descriptor, content, path);
        attempt(path, () => {
          closeSync(descriptor);
          renameSync(temporary, path);
        });
      } catch (error) {
        abandon();
        throw error;
      }
    },
  };
}

export function makeFolder(path: string): void {
  attempt(path, () => mkdirSync(path, { recursive: true }));
}

function refuseDirectory(path: string): void {
  const found = statSync(path, { throwIfNoEntry: false });
  if (found?.isDirectory() === true) throw new Ending(exitCodes.work, `Cannot write ${path}: it is a folder.`);
}

function attempt<T>(path: string, action: () => T): T {
  try {
    return action();
  } catch (error) {
    throw new Ending(exitCodes.work, `Cannot write ${path}: ${reasonOf(error)}.`);
  }
}

function writeAll(descriptor: number, content: string | Uint8Array, name: string): void {
  const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
  let done = 0;
  while (done < bytes.length) {
    try {
      done += writeSync(descriptor, bytes, done);
    } catch (error) {
      if (codeOf(error) === 'EAGAIN') continue;
      // Whoever read our output has enough of it.
      if (codeOf(error) === 'EPIPE') process.exit(exitCodes.done);
      throw new Ending(exitCodes.work, `Cannot write ${name}: ${reasonOf(error)}.`);
    }
  }
}

function codeOf(error: unknown): string {
  return error instanceof Error && 'code' in error ? String(error.code) : '';
}

const reasons: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file or folder',
  EACCES: 'permission denied',
  EPERM: 'permission denied',
  EROFS: 'the disk is read-only',
  ENOSPC: 'no space left on the disk',
  EISDIR: 'it is a folder',
  ENOTDIR: 'a part of its path is not a folder',
  ENAMETOOLONG: 'its name is too long',
};

/** Why a file cannot be read or written, in words. */
export function reasonOf(error: unknown): string {
  return reasons[codeOf(error)] ?? (error instanceof Error ? error.message : String(error));
}
