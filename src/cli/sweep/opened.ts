// Opens the folder of a sweep that somebody made before.
import type { Manifest } from '../../sweep/manifest.ts';
import { toolVersion, kernelVersion } from '../../results/provenance.ts';
import { Ending, exitCodes } from '../exit.ts';
import { readManifestText } from './store.ts';

export interface OpenedSweep {
  readonly folder: string;
  readonly text: string;
  readonly manifest: Manifest;
}

/** Of the same version of this tool, since only that makes and reads the same bytes for sure. */
export function openSweep(folder: string): OpenedSweep {
  const text = readManifestText(folder);
  if (text === null) throw new Ending(exitCodes.work, `${folder} holds no sweep: there is no manifest.json in it.`);
  const manifest = parsed(text);
  if (!isManifest(manifest)) throw new Ending(exitCodes.work, `The manifest.json in ${folder} is not that of a sweep.`);
  const { version, kernel } = manifest.tool;
  if (version !== toolVersion || kernel !== kernelVersion) {
    const why = `was made by skein ${version} with kernel ${kernel}; this is skein ${toolVersion} with kernel ${kernelVersion}`;
    throw new Ending(exitCodes.work, `The sweep in ${folder} ${why}.`);
  }
  return { folder, text, manifest };
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}

/** What this tool wrote itself is not checked further than to tell it from other files. */
function isManifest(value: unknown): value is Manifest {
  return (
    typeof value === 'object' &&
    value !== null &&
    'format' in value &&
    value.format === 'skein-sweep/1' &&
    'tool' in value
  );
}
