// The models that come with the tool.
import { readFileSync, readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { readDataFiles } from '../../src/cli/data-files.ts';
import type { CompiledModel } from '../../src/pipeline.ts';
import type { DataFiles } from '../../src/spec/data/files.ts';
import { readSpec } from '../../src/spec/read.ts';
import type { Settings } from '../../src/spec/settings.ts';
import { compileText } from '../pipeline/compile-text.ts';

const folder = new URL('../../models/', import.meta.url);

export const modelNames: readonly string[] = readdirSync(folder)
  .filter((file) => file.endsWith('.yaml'))
  .map((file) => file.slice(0, -'.yaml'.length))
  .sort();

export function modelText(name: string): string {
  return readFileSync(new URL(`${name}.yaml`, folder), 'utf8');
}

/** The data files that a model names. */
export function modelFiles(name: string): DataFiles {
  const { wants } = readSpec(modelText(name), name);
  return readDataFiles(wants, { spec: fileURLToPath(new URL(`${name}.yaml`, folder)), allow: [] });
}

export function compileModel(name: string, settings: Settings = {}): CompiledModel {
  return compileText(modelText(name), settings, modelFiles(name));
}
