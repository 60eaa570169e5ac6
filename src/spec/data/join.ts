// Puts what the named files hold into the tree of a spec, in the place of their names. Each value keeps its place in its file.
import { inlinePatches } from '../schema/spec.ts';
import { checkShape } from '../shape/check.ts';
import type { Report } from '../shape/report.ts';
import type { SourceEntry, SourceMap, SourceNode, SourceScalar } from '../text/source.ts';
import type { DataFiles } from './files.ts';
import { entryOf, patchesOf } from './geojson.ts';
import { readJsonFile } from './json-file.ts';
import { FileReader } from './reader.ts';

export interface Joined {
  readonly root: SourceMap;
  /** Names of files, as they stand in the spec. */
  readonly wants: readonly string[];
}

export function joinFiles(root: SourceMap, files: DataFiles, report: Report): Joined {
  const reader = new FileReader(files, report);
  const entries = root.entries.map((entry) => (entry.key === 'patches' ? joinPatches(entry, root, reader) : entry));
  return { root: { ...root, entries }, wants: reader.wants };
}

function joinPatches(entry: SourceEntry, root: SourceMap, reader: FileReader): SourceEntry {
  const name = fileName(entry.value);
  if (name === undefined) return entry;
  const file = readJsonFile(name, reader);
  if (file === undefined) return hole(entry);
  const value = patchesOf({
    root: file.root,
    nameKey: textOf(entryOf(entry.value, 'name')?.value) ?? 'name',
    position: textOf(entryOf(root, 'position')?.value),
    report: file.report,
  });
  if (value === undefined) return hole(entry);
  checkShape(value, inlinePatches, { label: 'patches', span: value.span }, file.report);
  return { ...entry, value };
}

/** What could not be read is not judged again. */
function hole(entry: SourceEntry): SourceEntry {
  return { ...entry, value: { kind: 'hole', span: entry.value.span } };
}

/** `FILE` or `{ file: FILE }`. */
function fileName(node: SourceNode): SourceScalar | undefined {
  const value = node.kind === 'map' ? entryOf(node, 'file')?.value : node;
  return value?.kind === 'scalar' ? value : undefined;
}

function textOf(node: SourceNode | undefined): string | undefined {
  return node?.kind === 'scalar' ? node.source : undefined;
}
