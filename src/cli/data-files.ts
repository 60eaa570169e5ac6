// Reads the files that a spec names: only inside its folder, or a folder that the user names, and only plain files.
import { readFileSync, realpathSync, statSync } from 'node:fs';
import { dirname, isAbsolute, relative, resolve, sep } from 'node:path';
import { mostDataCharacters, type DataFile, type DataFiles } from '../spec/data/files.ts';
import { reasonOf } from './output.ts';

export interface DataRequest {
  /** The spec, or `-`, whose folder is the current one. */
  readonly spec: string;
  /** Further folders that may be read. */
  readonly allow: readonly string[];
}

export function readDataFiles(names: readonly string[], request: DataRequest): DataFiles {
  return new Map(names.map((name) => [name, readDataFile(name, request)]));
}

function readDataFile(name: string, { spec, allow }: DataRequest): DataFile {
  const folder = spec === '-' ? process.cwd() : dirname(resolve(spec));
  const path = resolve(folder, name);
  const allowed = [folder, ...allow].map((one) => realOf(resolve(one)));
  // What lies outside is refused before anything is asked of it, and again where a link leads outside.
  if (![folder, ...allow].some((one) => isInside(path, resolve(one)))) return outside;
  try {
    const real = realpathSync(path);
    if (!allowed.some((one) => isInside(real, one))) return outside;
    return readPlain(real);
  } catch (error) {
    return { ok: false, why: reasonOf(error) };
  }
}

function readPlain(path: string): DataFile {
  const found = statSync(path);
  if (found.isDirectory()) return { ok: false, why: 'it is a folder' };
  if (!found.isFile()) return { ok: false, why: 'it is not a plain file' };
  if (found.size > mostDataCharacters) {
    const [size, most] = [found.size, mostDataCharacters].map((bytes) => Math.ceil(bytes / 1e6));
    return { ok: false, why: `it is too large (${String(size)} MB, at most ${String(most)} MB)` };
  }
  try {
    return { ok: true, text: new TextDecoder('utf-8', { fatal: true }).decode(readFileSync(path)) };
  } catch (error) {
    if (error instanceof TypeError) return { ok: false, why: 'it is not text in UTF-8', fix: 'Save it as UTF-8.' };
    throw error;
  }
}

const outside: DataFile = {
  ok: false,
  why: 'it lies outside the folder of the spec',
  fix: 'Move it there, or name its folder: --allow FOLDER.',
};

function isInside(path: string, folder: string): boolean {
  const way = relative(folder, path);
  return way !== '' && way !== '..' && !way.startsWith(`..${sep}`) && !isAbsolute(way);
}

function realOf(path: string): string {
  try {
    return realpathSync(path);
  } catch {
    return path;
  }
}
