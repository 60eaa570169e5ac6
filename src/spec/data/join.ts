// Puts what the named files hold into the tree of a spec, in the place of their names. Each value keeps its place in its file.
import { CoreSchema, namedSchemas } from '../schema/spec.ts';
import { checkShape } from '../shape/check.ts';
import { trial, type Report } from '../shape/report.ts';
import { knownKeys, type Shape } from '../shape/shape.ts';
import type { SourceEntry, SourceMap, SourceNode, SourceScalar } from '../text/source.ts';
import type { DataFiles } from './files.ts';
import { entryOf, patchesOf } from './geojson.ts';
import { readJsonFile } from './json-file.ts';
import { mergeSections } from './merge.ts';
import { FileReader } from './reader.ts';
import { readTable, type Table } from './table.ts';
import { classesSection, driversSection, longSection, matrixRows, pointsList, ratesSection } from './tables.ts';

export interface Joined {
  readonly root: SourceMap;
  /** Names of files, as they stand in the spec. */
  readonly wants: readonly string[];
}

const core: Shape = CoreSchema;

export function joinFiles(root: SourceMap, files: DataFiles, report: Report): Joined {
  const reader = new FileReader(files, report);
  const classes = textsOf(entryOf(root, 'classes')?.value);
  const table = (build: (table: Table) => SourceNode | undefined) => tableAt(reader, build);
  const rows = table((one) => matrixRows(one, classes));
  const changes: Readonly<Record<string, Change>> = {
    patches: (node) => joinPatches(node, root, reader),
    start: (node) => {
      const counted = changed(
        node,
        'counted',
        table((one) => longSection(one, ['patch', 'animals'])),
      );
      return changed(counted, 'table', table(classesSection));
    },
    demography: (node) => changed(changed(node, 'fates', rows), 'births', rows),
    observed: (node) =>
      changed(
        node,
        'counts',
        table((one) => longSection(one, ['patch', 'year', 'animals'])),
      ),
    sweep: (node) => changed(node, 'list', table(pointsList)),
    drivers: (node) => changed(node, 'values', table(driversSection)),
  };
  const shares = table((one) => longSection(one, ['from', 'to', 'share']));
  const entries = root.entries.map((entry): SourceEntry => {
    const change = changes[entry.key];
    const kind = textOf(entryOf(entry.value, 'kind')?.value) ?? '';
    if (change !== undefined) return judged(entry, change(entry.value), { shape: knownKeys(core)[entry.key], report });
    if (kind !== 'dispersal' || Object.hasOwn(knownKeys(core), entry.key)) return entry;
    return judged(entry, changed(entry.value, 'shares', shares), { shape: namedSchemas.dispersal, report });
  });
  return { root: joinRates({ ...root, entries }, reader), wants: reader.wants };
}

type Change = (node: SourceNode) => SourceNode;

interface Judging {
  readonly shape: Shape | undefined;
  readonly report: Report;
}

/** What comes from a file is new; whatever is wrong with the rest of the section was told before. */
function judged(entry: SourceEntry, value: SourceNode, { shape, report }: Judging): SourceEntry {
  if (value === entry.value || shape === undefined) return entry;
  const own = trial(report);
  checkShape(value, shape, { label: entry.key, span: entry.keySpan }, own);
  report.found.add(...own.found.all.filter((one) => one.place?.file !== report.source.file));
  return { ...entry, value };
}

/** A section with the value of one key changed, where it has that key and the change makes something new of it. */
function changed(node: SourceNode, key: string, change: Change): SourceNode {
  const entry = entryOf(node, key);
  if (node.kind !== 'map' || entry === undefined) return node;
  const value = change(entry.value);
  if (value === entry.value) return node;
  return { ...node, entries: node.entries.map((one) => (one === entry ? { ...entry, value } : one)) };
}

function tableAt(reader: FileReader, build: (table: Table) => SourceNode | undefined): Change {
  return (node) => {
    if (node.kind !== 'scalar') return node;
    const table = readTable(node, reader);
    return (table === undefined ? undefined : build(table)) ?? hole(node);
  };
}

/** Rates by patch and class go into the section `in`, beside what stands there. */
function joinRates(root: SourceMap, reader: FileReader): SourceMap {
  const entry = entryOf(root, 'rates');
  if (entry?.value.kind !== 'scalar') return root;
  const table = readTable(entry.value, reader);
  const section = table === undefined ? undefined : ratesSection(table);
  const others = root.entries.filter((one) => one !== entry && one.key !== 'in');
  const before = entryOf(root, 'in');
  if (table === undefined || section === undefined) return { ...root, entries: others };
  const shape = knownKeys(core)['in'];
  if (shape !== undefined) checkShape(section, shape, { label: 'rates', span: section.span }, table.report);
  const value = mergeSections(before?.value, section, table.report);
  const own = { key: 'in', keySpan: before?.keySpan ?? entry.keySpan, plain: true, value };
  return { ...root, entries: [...others, own] };
}

function joinPatches(node: SourceNode, root: SourceMap, reader: FileReader): SourceNode {
  const name = fileName(node);
  if (name === undefined) return node;
  const file = readJsonFile(name, reader);
  if (file === undefined) return hole(node);
  const value = patchesOf({
    root: file.root,
    nameKey: textOf(entryOf(node, 'name')?.value) ?? 'name',
    position: textOf(entryOf(root, 'position')?.value),
    report: file.report,
  });
  return value ?? hole(node);
}

/** What could not be read is not judged again. */
function hole(node: SourceNode): SourceNode {
  return { kind: 'hole', span: node.span };
}

/** `FILE` or `{ file: FILE }`. */
function fileName(node: SourceNode): SourceScalar | undefined {
  const value = node.kind === 'map' ? entryOf(node, 'file')?.value : node;
  return value?.kind === 'scalar' ? value : undefined;
}

function textOf(node: SourceNode | undefined): string | undefined {
  return node?.kind === 'scalar' ? node.source : undefined;
}

function textsOf(node: SourceNode | undefined): readonly string[] {
  return node?.kind === 'list' ? node.items.flatMap((item) => textOf(item) ?? []) : [];
}
