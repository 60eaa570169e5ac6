// The folder of a sweep: a manifest of what it is, and its parts. A part gets its name once all of it is on the disk, and is
// never written again, so that a sweep that was killed at any moment goes on with what is there.
import {
  closeSync,
  fsyncSync,
  openSync,
  readdirSync,
  readFileSync,
  readSync,
  renameSync,
  rmSync,
  statSync,
} from 'node:fs';
import { join } from 'node:path';
import type { Manifest } from '../../sweep/manifest.ts';
import { Ending, exitCodes } from '../exit.ts';
import { makeFolder, pendingFile } from '../files.ts';
import { codeOf, reasonOf, writeAll } from '../output.ts';
import { differenceOf } from './difference.ts';
import { lockFolder } from './lock.ts';

const manifestName = 'manifest.json';
const partsName = 'parts';
const lockName = '.lock';
const temporary = /^\.skein-.*\.tmp$/u;

export interface Store {
  readonly folder: string;
  /** Parts that are there whole. */
  finished(): ReadonlySet<number>;
  write(part: number, pieces: readonly Uint8Array[]): void;
  /** Lets go of the folder. */
  close(): void;
}

/** Makes the folder, or opens one of the same sweep; an ending where it holds anything else or another process is at it. */
export function openStore(folder: string, manifest: Manifest): Store {
  makeFolder(folder);
  refuseOthers(folder);
  makeFolder(join(folder, partsName));
  const close = lockFolder(join(folder, lockName), folder);
  try {
    const text = manifestText(manifest);
    const before = readManifestText(folder);
    if (before === null) pendingFile(join(folder, manifestName)).finish(text);
    else if (before !== text) throw refused(folder, before, manifest);
    removeTemporary(folder);
    removeTemporary(join(folder, partsName));
  } catch (error) {
    close();
    throw error;
  }
  return {
    folder,
    finished: () => finishedParts(folder),
    write: (part, pieces) => {
      writePart(folder, part, pieces);
    },
    close,
  };
}

export function manifestText(manifest: Manifest): string {
  return `${JSON.stringify(manifest, null, 2)}\n`;
}

/** Null where there is none. */
export function readManifestText(folder: string): string | null {
  try {
    return readFileSync(join(folder, manifestName), 'utf8');
  } catch (error) {
    if (codeOf(error) === 'ENOENT' || codeOf(error) === 'ENOTDIR') return null;
    throw new Ending(exitCodes.work, `Cannot read ${join(folder, manifestName)}: ${reasonOf(error)}.`);
  }
}

/** A folder with other things in it is left as it is. */
function refuseOthers(folder: string): void {
  const names = readdirSync(folder);
  const own = names.every((name) => name === partsName || name === lockName || temporary.test(name));
  if (names.includes(manifestName) || own) return;
  throw new Ending(exitCodes.work, `${folder} holds other things than a sweep; take an empty folder, or a new one.`);
}

function refused(folder: string, before: string, manifest: Manifest): Ending {
  const what = differenceOf(before, manifest);
  return new Ending(exitCodes.work, `${folder} holds another sweep: ${what}. Take another folder, or remove this one.`);
}

function removeTemporary(folder: string): void {
  for (const name of readdirSync(folder)) if (temporary.test(name)) rmSync(join(folder, name), { force: true });
}

export function partPath(folder: string, part: number): string {
  return join(folder, partsName, `part-${String(part + 1).padStart(6, '0')}.parquet`);
}

/** By number from 0; a file that does not end as it must is as good as none. */
export function finishedParts(folder: string): ReadonlySet<number> {
  const found = new Set<number>();
  for (const name of readdirSync(join(folder, partsName))) {
    const number = /^part-(\d{6,})\.parquet$/u.exec(name)?.[1];
    if (number !== undefined && isWhole(join(folder, partsName, name))) found.add(Number(number) - 1);
  }
  return found;
}

/** Parquet files end with these four letters. */
function isWhole(path: string): boolean {
  const { size } = statSync(path);
  if (size < 12) return false;
  const descriptor = openSync(path, 'r');
  try {
    const end = Buffer.alloc(4);
    readSync(descriptor, end, 0, 4, size - 4);
    return end.toString('latin1') === 'PAR1';
  } finally {
    closeSync(descriptor);
  }
}

/** On the disk before it has its name: a machine that loses its power keeps whole parts or none. */
function writePart(folder: string, part: number, pieces: readonly Uint8Array[]): void {
  const path = partPath(folder, part);
  const unfinished = join(folder, partsName, `.skein-${process.pid}-${part}.tmp`);
  try {
    const descriptor = openSync(unfinished, 'w');
    try {
      for (const piece of pieces) writeAll(descriptor, piece, path);
      fsyncSync(descriptor);
    } finally {
      closeSync(descriptor);
    }
    renameSync(unfinished, path);
  } catch (error) {
    rmSync(unfinished, { force: true });
    if (error instanceof Ending) throw error;
    throw new Ending(exitCodes.work, `Cannot write ${path}: ${reasonOf(error)}.`);
  }
}
