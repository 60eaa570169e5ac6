// Prints an image readably: the same image gives the same text, line by line, so that two can be compared.
import * as layout from '../../../assembly/layout.ts';
import type { ImageNames } from './build.ts';
import { headerOf, type PackedSection, readNames, readSections } from './read.ts';
import { kindWord, opcodeWord, operandWords } from './words.ts';

/** An image as data. Rows of sections are what operands name. */
export interface ImageDescription {
  readonly format: 'skein-packed/1';
  readonly version: string;
  readonly bytes: number;
  readonly patches: number;
  readonly classes: number;
  readonly steps: number;
  readonly yearProgram: readonly RecordDescription[];
  readonly phaseProgram: readonly RecordDescription[];
  readonly sections: readonly SectionDescription[];
}

export interface RecordDescription {
  readonly opcode: string;
  /** Of the phase or condition. */
  readonly name: string;
  /** Eight hexadecimal digits. */
  readonly key: string;
  readonly operands: Readonly<Record<string, number>>;
}

export interface SectionDescription {
  readonly row: number;
  readonly kind: string;
  readonly offset: number;
  readonly columns: number;
  readonly epochOf: number | null;
  readonly values: readonly number[];
}

export function imageJson(image: ArrayBuffer): ImageDescription {
  const header = headerOf(image);
  const word = (index: number) => header[index] ?? 0;
  const sections = readSections(image);
  const names = readNames(image);
  return {
    format: 'skein-packed/1',
    version: `${String(word(layout.headerMajor))}.${String(word(layout.headerMinor))}`,
    bytes: image.byteLength,
    patches: word(layout.headerPatches),
    classes: word(layout.headerClasses),
    steps: word(layout.headerSteps),
    yearProgram: recordsOf(sections[word(layout.headerYearProgram)], names),
    phaseProgram: recordsOf(sections[word(layout.headerPhaseProgram)], names),
    sections: sections.filter(({ kind }) => kind !== layout.kindNames).map(describeSection),
  };
}

function recordsOf(section: PackedSection | undefined, names: ImageNames): readonly RecordDescription[] {
  const words = Array.from(section?.data ?? []);
  const count = words.length / layout.recordWords;
  return Array.from({ length: count }, (_, i) => {
    const record = words.slice(i * layout.recordWords, (i + 1) * layout.recordWords);
    return describeRecord(record, names);
  });
}

function describeRecord(record: readonly number[], names: ImageNames): RecordDescription {
  const [opcode = 0, key = 0, index = 0] = record;
  const listed = opcode === layout.opCrowding ? names.conditions : names.phases;
  const operands = operandWords(opcode).map((name, i): [string, number] => [
    name,
    record[layout.recordOperands + i] ?? layout.none,
  ]);
  return {
    opcode: opcodeWord(opcode),
    name: listed[index] ?? '',
    key: hexadecimal(key),
    operands: Object.fromEntries(operands),
  };
}

function describeSection(section: PackedSection): SectionDescription {
  return {
    row: section.row,
    kind: kindWord(section.kind),
    offset: section.offset,
    columns: section.columns,
    epochOf: section.epochOf === layout.none ? null : section.epochOf,
    values: Array.from(section.data),
  };
}

function hexadecimal(key: number): string {
  return (key >>> 0).toString(16).padStart(8, '0');
}

/** Values on one line; what does not fit is counted. */
const valuesShown = 12;

export function describeImage(image: ArrayBuffer): string {
  const packed = imageJson(image);
  const size = `${String(packed.patches)} patches, ${String(packed.classes)} classes, ${String(packed.steps)} steps`;
  return [
    `image version ${packed.version}, ${String(packed.bytes)} bytes`,
    size,
    '',
    'year program',
    ...packed.yearProgram.map(recordLine),
    'phase program',
    ...packed.phaseProgram.map(recordLine),
    '',
    'sections',
    ...packed.sections.map(sectionLine),
    '',
  ].join('\n');
}

function recordLine({ opcode, name, key, operands }: RecordDescription): string {
  const named = Object.entries(operands).map(
    ([word, value]) => `${word} ${value === layout.none ? '-' : String(value)}`,
  );
  return `  ${opcode} "${name}" key ${key}: ${named.join(', ')}`;
}

function sectionLine({ row, kind, offset, columns, epochOf, values }: SectionDescription): string {
  const shape = `${String(values.length)} in ${String(columns)}${epochOf === null ? '' : `, epochs by row ${String(epochOf)}`}`;
  const isKey = kind.endsWith(' keys');
  const shown = kind.endsWith(' program')
    ? []
    : values.slice(0, valuesShown).map((value) => (isKey ? hexadecimal(value) : String(value)));
  const rest =
    values.length > valuesShown && shown.length > 0 ? ` and ${String(values.length - valuesShown)} more` : '';
  return `  ${String(row)} ${kind} at ${String(offset)} (${shape})${shown.length > 0 ? ': ' : ''}${shown.join(' ')}${rest}`;
}
