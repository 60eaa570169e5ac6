// Standard output and error, and why something could not be written or read, in words.
import { writeSync } from 'node:fs';
import { Ending, exitCodes } from './exit.ts';

const standardOutput = 1;
const standardError = 2;

export function writeOut(text: string): void {
  writeAll(standardOutput, text, 'standard output');
}

export function writeError(text: string): void {
  try {
    writeAll(standardError, text, 'standard error');
  } catch {
    // Nobody is left to tell.
  }
}

/** All of it, however little the other end takes at a time. */
export function writeAll(descriptor: number, content: string | Uint8Array, name: string): void {
  const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
  let done = 0;
  while (done < bytes.length) {
    try {
      done += writeSync(descriptor, bytes, done);
    } catch (error) {
      if (codeOf(error) === 'EAGAIN') continue;
      // Whoever read our output has enough of it.
      if (codeOf(error) === 'EPIPE' && descriptor === standardOutput) process.exit(exitCodes.done);
      throw new Ending(exitCodes.work, `Cannot write ${name}: ${reasonOf(error)}.`);
    }
  }
}

export function codeOf(error: unknown): string {
  return error instanceof Error && 'code' in error ? String(error.code) : '';
}

const reasons: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file or folder',
  EEXIST: 'a file of this name is there already',
  EACCES: 'permission denied',
  EPERM: 'permission denied',
  EROFS: 'the disk is read-only',
  ENOSPC: 'no space left on the disk',
  EFBIG: 'a file may not be as large here',
  EDQUOT: 'you may not take more space on this disk',
  EISDIR: 'it is a folder',
  ENOTDIR: 'a part of its path is not a folder',
  ELOOP: 'its links lead in a circle',
  ENAMETOOLONG: 'its name is too long',
};

/** Why a file cannot be read or written, in words. */
export function reasonOf(error: unknown): string {
  return reasons[codeOf(error)] ?? (error instanceof Error ? error.message : String(error));
}
