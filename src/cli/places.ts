// What the user wants to be told of places: as they are, moved with a secret, or not at all.
import { chmodSync, readFileSync, writeFileSync } from 'node:fs';
import { basename, dirname, extname, join } from 'node:path';
import type { CompiledModel } from '../pipeline.ts';
import { hidePlaces, tellsPlaces, type Hidden } from '../report/hiding/hide.ts';
import { Ending, exitCodes } from './exit.ts';
import { codeOf, reasonOf, writeError } from './output.ts';
import type { PlacesChoice } from './places-choice.ts';

export interface PlacesRequest {
  /** The model, or `-`. */
  readonly path: string;
  readonly places?: PlacesChoice | undefined;
  readonly quiet?: boolean | undefined;
  /** Whether anything is written that tells places where they are not hidden. */
  readonly written: boolean;
}

/** Null where places are told as they are; then a warning says so. */
export function askedHiding(compiled: CompiledModel, request: PlacesRequest): Hidden | null {
  const { path, places = 'exact', quiet, written } = request;
  if (places === 'schematic') return hidePlaces(compiled, { places });
  if (places === 'shifted') return hidePlaces(compiled, { places, key: secretKey(path, quiet === true) });
  if (written && quiet !== true && tellsPlaces(compiled.model)) writeError(`${exactWarning}\n`);
  return null;
}

const exactWarning =
  'What is written tells exactly where the patches are. Where that could harm nests, dens or roosts, hide it:\n' +
  '--places shifted or --places schematic.';

const keyBytes = 32;
const ending = '.places-key';

/**
 * The key stands beside the model, which tells the places anyway. It is kept, since places that are moved anew each time can be
 * averaged.
 */
function secretKey(path: string, quiet: boolean): Uint8Array {
  const file = path === '-' ? `model${ending}` : join(dirname(path), `${basename(path, extname(path))}${ending}`);
  const known = readKey(file);
  if (known !== null) return known;
  const key = Buffer.from(crypto.getRandomValues(new Uint8Array(keyBytes)));
  try {
    writeFileSync(file, `${key.toString('hex')}\n`, { flag: 'wx', mode: 0o600 });
    chmodSync(file, 0o600);
  } catch (error) {
    throw new Ending(exitCodes.work, `Cannot write ${file}, the secret that moves places: ${reasonOf(error)}.`);
  }
  if (!quiet)
    writeError(`Made ${file}, the secret by which places are moved. Keep it with the model, and give it to nobody.\n`);
  return key;
}

function readKey(file: string): Uint8Array | null {
  try {
    const text = readFileSync(file, 'utf8').trim();
    if (/^[0-9a-f]{64}$/.test(text)) return Uint8Array.from(Buffer.from(text, 'hex'));
  } catch (error) {
    if (codeOf(error) === 'ENOENT') return null;
    throw new Ending(exitCodes.model, `Cannot read ${file}, the secret that moves places: ${reasonOf(error)}.`);
  }
  const why = 'it does not hold 64 hexadecimal digits. Delete it, and a new one is made (places then move elsewhere)';
  throw new Ending(exitCodes.model, `Cannot read ${file}, the secret that moves places: ${why}.`);
}
