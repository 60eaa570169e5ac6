// Reads an image back: its header, directory and programs as data, for printers, messages and tests.
import * as layout from '../../../assembly/layout.ts';
import type { ImageNames } from './build.ts';

export interface PackedSection {
  readonly row: number;
  readonly kind: number;
  readonly data: Int32Array | Float64Array | Uint8Array;
  readonly offset: number;
  readonly columns: number;
  readonly epochOf: number;
}

export function headerOf(image: ArrayBuffer): Int32Array {
  return new Int32Array(image, 0, layout.headerBytes / 4);
}

export function readSections(image: ArrayBuffer): readonly PackedSection[] {
  const count = headerOf(image)[layout.headerSections] ?? 0;
  return Array.from({ length: count }, (_, row) => readSection(image, row));
}

function readSection(image: ArrayBuffer, row: number): PackedSection {
  const entry = new Int32Array(image, layout.headerBytes + row * layout.rowBytes, layout.rowWords);
  const word = (i: number) => entry[i] ?? 0;
  const offset = word(layout.rowOffset);
  return {
    row,
    kind: word(layout.rowKind),
    data: dataOf(image, word(layout.rowType), offset, word(layout.rowCount)),
    offset,
    columns: word(layout.rowColumns),
    epochOf: word(layout.rowEpochOf),
  };
}

function dataOf(image: ArrayBuffer, type: number, offset: number, count: number): PackedSection['data'] {
  if (type === layout.typeF64) return new Float64Array(image, offset, count);
  return type === layout.typeI32 ? new Int32Array(image, offset, count) : new Uint8Array(image, offset, count);
}

export function readNames(image: ArrayBuffer): ImageNames {
  const section = readSections(image).find(({ kind }) => kind === layout.kindNames);
  const parsed: unknown = JSON.parse(new TextDecoder().decode(section?.data ?? new Uint8Array()));
  return {
    patches: namesAt(parsed, 'patches'),
    classes: namesAt(parsed, 'classes'),
    phases: namesAt(parsed, 'phases'),
    conditions: namesAt(parsed, 'conditions'),
    outcomes: namesAt(parsed, 'outcomes'),
  };
}

function namesAt(parsed: unknown, key: keyof ImageNames): readonly string[] {
  const list: unknown =
    typeof parsed === 'object' && parsed !== null ? Object.entries(parsed).find(([k]) => k === key)?.[1] : [];
  return Array.isArray(list) ? list.map(String) : [];
}
