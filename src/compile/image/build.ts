// Builds the image: one buffer that holds everything the kernel needs to run a model.
import * as layout from '../../../assembly/layout.ts';
import type { Landscape } from '../../landscape/landscape.ts';
import type { Model } from '../../model/model.ts';
import type { CrowdingCoefficients } from '../coefficients.ts';
import { readingPhase } from '../multipliers.ts';
import { catastropheRecords } from './catastrophes.ts';
import { crowdingRecord } from './crowding.ts';
import { firstHandledColumn } from './count.ts';
import { handledColumns } from './handling.ts';
import { keysOfNames } from './keys.ts';
import { phaseRecord } from './phases.ts';
import { responseRecords } from './responses.ts';
import { planSlots } from '../weather/slots.ts';
import { variationRecords } from './variation.ts';
import { plain, type Section, SectionList } from './section.ts';

export interface ImageInput {
  readonly model: Model;
  readonly landscape: Landscape;
  /** One for each crowding of the model. */
  readonly coefficients: readonly CrowdingCoefficients[];
  /** Whole animals at count 0, P × C. */
  readonly startAnimals: Float64Array;
}

/** Names that messages and printers need; the kernel does not read them. */
export interface ImageNames {
  readonly patches: readonly string[];
  readonly classes: readonly string[];
  readonly phases: readonly string[];
  readonly conditions: readonly string[];
  readonly outcomes: readonly string[];
}

export function buildImage(input: ImageInput): ArrayBuffer {
  const { model } = input;
  const list = new SectionList();
  const slots = planSlots(model);
  const header = new Map<number, number>([
    [layout.headerMagic, layout.imageMagic],
    [layout.headerMajor, layout.imageMajor],
    [layout.headerMinor, layout.imageMinor],
    [layout.headerPatches, model.patches.length],
    [layout.headerClasses, model.classes.length],
    [layout.headerSteps, model.steps],
    [layout.headerSlots, slots.count],
    [layout.headerColumns, firstHandledColumn(model) + handledColumns(model)],
    [layout.headerWays, waysBefore(input.landscape, model.phases.length)],
  ]);
  const names = namesOf(model);
  header.set(layout.headerPatchKeys, list.add(keySection(layout.kindPatchKeys, 'patch', names.patches)));
  header.set(layout.headerClassKeys, list.add(keySection(layout.kindClassKeys, 'class', names.classes)));
  const start = Int32Array.from(input.startAnimals);
  header.set(layout.headerStart, list.add(plain(layout.kindStartAnimals, start, 'start')));
  const weather = variationRecords({ list, model, landscape: input.landscape, slots, weather: 0 });
  const responses = responseRecords({ list, model, landscape: input.landscape, slots, weather: 0 });
  const strikes = catastropheRecords({
    list,
    model,
    landscape: input.landscape,
    slots,
    weather: weather.weather,
  });
  header.set(layout.headerWeather, weather.weather + strikes.weather);
  header.set(layout.headerWork, Math.max(weather.work, responses.work, strikes.work));
  header.set(
    layout.headerYearProgram,
    list.add(programSection(layout.kindYearProgram, [...weather.records, ...responses.records, ...strikes.records])),
  );
  header.set(layout.headerPhaseProgram, list.add(programSection(layout.kindPhaseProgram, phaseProgram(list, input))));
  list.add(plain(layout.kindNames, new TextEncoder().encode(JSON.stringify(names)), 'names'));
  return pack(header, list.sections);
}

function namesOf(model: Model): ImageNames {
  return {
    patches: model.patches.map((patch) => patch.name),
    classes: model.classes,
    phases: model.phases.map((phase) => phase.name),
    conditions: model.crowding.map((crowding) => crowding.name),
    outcomes: model.outcomes.map((outcome) => outcome.name),
  };
}

function keySection(kind: number, what: string, names: readonly string[]): Section {
  return plain(kind, keysOfNames(what, names), 'names');
}

function programSection(kind: number, records: readonly Int32Array[]): Section {
  const data = new Int32Array(records.length * layout.recordWords);
  records.forEach((record, i) => data.set(record, i * layout.recordWords));
  return { ...plain(kind, data, 'year'), columns: layout.recordWords };
}

/** The phases in their order, and before each the crowdings that are read there. */
function phaseProgram(list: SectionList, { model, landscape, coefficients }: ImageInput): Int32Array[] {
  const phaseKeys = keysOfNames(
    'phase',
    model.phases.map((phase) => phase.name),
  );
  const conditionKeys = keysOfNames(
    'condition',
    model.crowding.map((crowding) => crowding.name),
  );
  return model.phases.flatMap((phase, index) => {
    const readHere = model.crowding.flatMap((crowding, slot) => {
      const solved = coefficients[slot];
      if (readingPhase(model, slot) !== index || solved === undefined) return [];
      return [crowdingRecord(list, { model, crowding, coefficients: solved, slot, key: conditionKeys[slot] ?? 0 })];
    });
    const key = phaseKeys[index] ?? 0;
    const movement = landscape.movements[index] ?? null;
    const ways = waysBefore(landscape, index);
    return [...readHere, phaseRecord(phase, { list, model, index, key, movement, waysBefore: ways })];
  });
}

function waysBefore(landscape: Landscape, phase: number): number {
  return landscape.movements.slice(0, phase).reduce((sum, movement) => sum + (movement?.destinations.length ?? 0), 0);
}

function typeOf(data: Section['data']): number {
  if (data instanceof Float64Array) return layout.typeF64;
  return data instanceof Int32Array ? layout.typeI32 : layout.typeU8;
}

function aligned(bytes: number): number {
  return Math.ceil(bytes / layout.sectionAlignment) * layout.sectionAlignment;
}

/** Header, directory, then the sections. Bytes between them are zero. */
function pack(header: ReadonlyMap<number, number>, sections: readonly Section[]): ArrayBuffer {
  const offsets: number[] = [];
  let size = aligned(layout.headerBytes + sections.length * layout.rowBytes);
  for (const section of sections) {
    offsets.push(size);
    size = aligned(size + section.data.byteLength);
  }
  const image = new ArrayBuffer(size);
  const words = new Int32Array(image, 0, layout.headerBytes / 4);
  for (const [word, value] of header) words[word] = value;
  words[layout.headerSize] = size;
  words[layout.headerSections] = sections.length;
  sections.forEach((section, row) => {
    const offset = offsets[row] ?? 0;
    const entry = new Int32Array(image, layout.headerBytes + row * layout.rowBytes, layout.rowWords);
    entry.set([
      section.kind,
      row,
      typeOf(section.data),
      section.data.length,
      offset,
      section.columns,
      0,
      section.epochOf,
    ]);
    new Uint8Array(image, offset, section.data.byteLength).set(bytesOf(section.data));
  });
  return image;
}

function bytesOf(data: Section['data']): Uint8Array {
  return new Uint8Array(data.buffer, data.byteOffset, data.byteLength);
}
