// A workload: a model of workloads/ compiled to its image, and the same numbers as plain text for the baselines.
import { readFileSync, writeFileSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import * as layout from '../../assembly/layout.ts';
import { headerOf, readSections } from '../../src/compile/image/read.ts';
import { compileSpec, type CompiledModel } from '../../src/pipeline.ts';
import type { DataFiles } from '../../src/spec/data/files.ts';
import { readSpec } from '../../src/spec/read.ts';
import { applySettings, type Settings } from '../../src/spec/settings.ts';
import { work } from './tools.ts';

export interface Workload {
  readonly name: string;
  readonly image: ArrayBuffer;
  readonly patches: number;
  readonly classes: number;
  readonly years: number;
  readonly replicates: number;
  /** The image as a file, and its numbers as text. */
  readonly imageFile: string;
  readonly numbersFile: string;
}

export function openWorkload(name: string): Workload {
  const file = `test/bench/workloads/${name}.yaml`;
  return workloadOf(name, readFileSync(file, 'utf8'));
}

interface Around {
  readonly settings?: Settings;
  readonly files?: DataFiles;
}

/** Errors: throws where the model has a mistake. */
export function compileText(text: string, { settings = {}, files }: Around = {}): CompiledModel {
  const { document, diagnostics } = readSpec(text, 'model.yaml', files);
  if (document === undefined) throw new Error(diagnostics.map(({ message }) => message).join('\n'));
  const applied = applySettings(document.spec, settings);
  if (!applied.ok) throw new Error(`The model has no ${applied.unknown.name}.`);
  const { compiled, findings } = compileSpec(applied.spec);
  if (compiled === null) throw new Error(findings.map(({ code }) => code).join(', '));
  return compiled;
}

/** From the text of a model. */
export function workloadOf(name: string, text: string, around: Around = {}): Workload {
  const compiled = compileText(text, around);
  const header = headerOf(compiled.image);
  mkdirSync(work, { recursive: true });
  const [imageFile, numbersFile] = [join(work, `${name}.image`), join(work, `${name}.txt`)];
  writeFileSync(imageFile, new Uint8Array(compiled.image));
  writeFileSync(numbersFile, numbersOf(compiled.image));
  return {
    name,
    image: compiled.image,
    patches: header[layout.headerPatches] ?? 0,
    classes: header[layout.headerClasses] ?? 0,
    years: header[layout.headerSteps] ?? 0,
    replicates: compiled.model.replicates,
    imageFile,
    numbersFile,
  };
}

/** Records of both programs, by opcode. */
export function recordsOf(image: ArrayBuffer): ReadonlyMap<number, Int32Array> {
  const header = headerOf(image);
  const sections = readSections(image);
  const records = new Map<number, Int32Array>();
  for (const row of [header[layout.headerYearProgram] ?? 0, header[layout.headerPhaseProgram] ?? 0]) {
    const { data } = sections[row] ?? {};
    if (!(data instanceof Int32Array)) continue;
    for (let at = 0; at < data.length; at += layout.recordWords) {
      records.set(data[at] ?? 0, data.subarray(at, at + layout.recordWords));
    }
  }
  return records;
}

/** Lines `name count`, each followed by a line of that many numbers. */
function numbersOf(image: ArrayBuffer): string {
  const header = headerOf(image);
  const sections = readSections(image);
  const records = recordsOf(image);
  const lines: string[] = [];
  const put = (name: string, values: ArrayLike<number>): void => {
    lines.push(`${name} ${values.length}`, Array.from(values).join(' '));
  };
  const at = (opcode: number, word: number): ArrayLike<number> =>
    sections[records.get(opcode)?.[word] ?? -1]?.data ?? [];
  put(
    'shape',
    [layout.headerPatches, layout.headerClasses, layout.headerSteps].map((word) => header[word] ?? 0),
  );
  put('start', sections[header[layout.headerStart] ?? 0]?.data ?? []);
  put('survival', at(layout.opSurvival, layout.survivalRates));
  put('births', at(layout.opBreeding, layout.breedingBirths));
  put('crowding', at(layout.opCrowding, layout.crowdingCoefficients));
  put('leaving', at(layout.opDispersal, layout.dispersalLeaving));
  put('moves', at(layout.opDispersal, layout.dispersalMoves));
  const movement = at(layout.opDispersal, layout.dispersalMovement);
  const moving = (word: number): ArrayLike<number> => sections[movement[word] ?? -1]?.data ?? [];
  put('ways', moving(layout.movementStart));
  put('ends', moving(layout.movementTo));
  put('chances', moving(layout.movementChance));
  const variation = records.get(layout.opVariation);
  if (variation) {
    const factor = variation[layout.variationPatchFactor] ?? 0;
    ['factor-start', 'factor-column', 'factor-weight'].forEach((name, k) => {
      put(name, sections[factor + k]?.data ?? []);
    });
    const quantities = at(layout.opVariation, layout.variationQuantities);
    const tables = Array.from(
      { length: quantities.length / 2 },
      (_, k) => sections[quantities[2 * k + 1] ?? 0]?.data ?? [],
    );
    put(
      'distributions',
      tables.flatMap((table) => Array.from(table)),
    );
  }
  return `${lines.join('\n')}\n`;
}
