// skein new: a small working model to start from.
import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { readSpec } from '../../spec/read.ts';
import { Ending, exitCodes } from '../exit.ts';
import { makeFolder, pendingFile } from '../files.ts';
import { writeError, writeOut } from '../output.ts';

const starter = 'two-ponds';

export function newModel(folder: string, { example }: { readonly example?: string }): void {
  if (example === 'list') {
    writeOut(`${exampleNames().join('\n')}\n`);
    return;
  }
  const name = example ?? starter;
  if (!exampleNames().includes(name)) {
    throw new Ending(exitCodes.usage, `There is no example \`${name}\`. There are: ${exampleNames().join(', ')}.`);
  }
  const target = join(folder, 'model.yaml');
  if (existsSync(target)) throw new Ending(exitCodes.work, `${target} exists already; nothing was written.`);
  const text = readFileSync(join(examplesFolder(), `${name}.yaml`), 'utf8');
  makeFolder(folder);
  for (const file of readSpec(text, name).wants) copyData(file, folder);
  pendingFile(target).finish(text);
  writeError(`Wrote ${target}\nNext: skein check ${target}\n`);
}

/** The files that an example names keep their places beside it. */
function copyData(file: string, folder: string): void {
  const target = join(folder, file);
  if (existsSync(target)) throw new Ending(exitCodes.work, `${target} exists already; the model was not written.`);
  makeFolder(dirname(target));
  pendingFile(target).finish(readFileSync(join(examplesFolder(), file), 'utf8'));
}

function exampleNames(): readonly string[] {
  return readdirSync(examplesFolder())
    .filter((file) => file.endsWith('.yaml'))
    .map((file) => file.slice(0, -'.yaml'.length))
    .sort();
}

/** Beside the built command as well as beside the sources. */
function examplesFolder(): string {
  const places = ['../../models/', '../../../models/'].map((path) => join(import.meta.dirname, path));
  return places.find((place) => existsSync(place)) ?? '';
}
