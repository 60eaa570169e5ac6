// Files and folders that are written: whole or not at all, and tried before the work begins.
import { closeSync, mkdirSync, openSync, realpathSync, renameSync, rmSync, statSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { Ending, exitCodes } from './exit.ts';
import { reasonOf, writeAll } from './output.ts';

/** A file that appears under its name only once all of it is written. */
export interface PendingFile {
  finish(content: string | Uint8Array): void;
  /** All of it is written; only its name is still to come. */
  prepare(content: string | Uint8Array): PreparedFile;
}

export interface PreparedFile {
  publish(): void;
  /** Leaves nothing behind, unless it is published already. */
  discard(): void;
}

/** Tries the place first, so that one that cannot be written is told before the work and not after it. */
export function pendingFile(path: string): PendingFile {
  const kind = attempt(path, () => kindOf(path));
  if (kind === 'folder') throw new Ending(exitCodes.work, `Cannot write ${path}: it is a folder.`);
  if (kind === 'device') return device(path);
  // A link stays a link: what it points to is written.
  const target = attempt(path, () => (kind === 'file' ? realpathSync(path) : path));
  closeTemporary(openTemporary(path, target));
  const prepare = (content: string | Uint8Array): PreparedFile => prepareFile({ path, target, content });
  return { prepare, finish: (content) => finishNow(prepare(content)) };
}

type Kind = 'none' | 'file' | 'folder' | 'device';

function kindOf(path: string): Kind {
  const found = statSync(path, { throwIfNoEntry: false });
  if (found === undefined) return 'none';
  return found.isFile() ? 'file' : found.isDirectory() ? 'folder' : 'device';
}

/** A device or a pipe is written as it stands; another file in its place would take it away. */
function device(path: string): PendingFile {
  const descriptor = attempt(path, () => openSync(path, 'w'));
  const prepare = (content: string | Uint8Array): PreparedFile => ({
    publish: () => {
      writeAll(descriptor, content, path);
      attempt(path, () => {
        closeSync(descriptor);
      });
    },
    discard: () => undefined,
  });
  return { prepare, finish: (content) => finishNow(prepare(content)) };
}

function finishNow(prepared: PreparedFile): void {
  try {
    prepared.publish();
  } finally {
    prepared.discard();
  }
}

interface Temporary {
  readonly name: string;
  readonly descriptor: number;
}

function openTemporary(path: string, target: string): Temporary {
  const name = join(dirname(target), `.skein-${process.pid}-${process.hrtime.bigint()}.tmp`);
  return { name, descriptor: attempt(path, () => openSync(name, 'wx')) };
}

function closeTemporary({ name, descriptor }: Temporary): void {
  closeSync(descriptor);
  rmSync(name, { force: true });
}

interface Whole {
  readonly path: string;
  readonly target: string;
  readonly content: string | Uint8Array;
}

function prepareFile({ path, target, content }: Whole): PreparedFile {
  const temporary = openTemporary(path, target);
  try {
    writeAll(temporary.descriptor, content, path);
    closeSync(temporary.descriptor);
  } catch (error) {
    closeTemporary(temporary);
    throw error;
  }
  return {
    publish: () => {
      attempt(path, () => {
        renameSync(temporary.name, target);
      });
    },
    discard: () => {
      rmSync(temporary.name, { force: true });
    },
  };
}

/** With all folders above it. */
export function makeFolder(path: string): void {
  attempt(path, () => {
    makeFolders(resolve(path));
  });
}

/** One by one: where a file system takes no folders, such as /proc, the recursive way of Node never ends. */
function makeFolders(path: string): void {
  if (statSync(path, { throwIfNoEntry: false })?.isDirectory() === true) return;
  if (dirname(path) !== path) makeFolders(dirname(path));
  mkdirSync(path);
}

function attempt<T>(path: string, action: () => T): T {
  try {
    return action();
  } catch (error) {
    throw new Ending(exitCodes.work, `Cannot write ${path}: ${reasonOf(error)}.`);
  }
}
