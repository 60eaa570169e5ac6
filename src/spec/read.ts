// Reads a spec: text in, a document with the way back to every place out, or all that is wrong with it.
import type { Diagnostic } from '../diagnostic/diagnostic.ts';
import { Bug } from '../diagnostic/bug.ts';
import { Collector } from '../diagnostic/collector.ts';
import type { DataFiles } from './data/files.ts';
import { joinFiles } from './data/join.ts';
import type { SpecDocument } from './document.ts';
import { CoreSchema, namedSchemas, type Spec } from './schema/spec.ts';
import { nameUnsureNumbers } from './unsure.ts';
import { soundPart } from './shape/sound.ts';
import { checkTop } from './shape/top.ts';
import type { Report } from './shape/report.ts';
import { knownKeys, type Shape } from './shape/shape.ts';
import { locateIn } from './text/locate.ts';
import { sourceText, type SourceMap, type SourceNode, type SourceText } from './text/source.ts';
import { readTree } from './text/tree.ts';
import { sectionOf } from './text/value.ts';
import { shapedValueOf } from './value.ts';

export interface ReadSpec {
  /** Missing where there is any error. */
  readonly document?: SpecDocument;
  /** Where there is an error, what can be read all the same, as far as it is enough to know which names there are. */
  readonly readable?: Readable;
  /** Files that the spec names, as it names them. */
  readonly wants: readonly string[];
  /** Errors and warnings in the order of the file. */
  readonly diagnostics: readonly Diagnostic[];
}

/** A document without the parts that have mistakes. */
export interface Readable {
  readonly document: SpecDocument;
  /** Every word of the parts that were left out. */
  readonly lost: ReadonlySet<string>;
}

/**
 * `file` is the name that places carry. Nothing is read but `text`, which may be YAML or JSON, and the texts of the files that
 * it names; without them the spec is read as far as it goes, and says which it wants.
 */
export function readSpec(text: string, file: string, files: DataFiles = new Map()): ReadSpec {
  const source = sourceText(file, text.startsWith('\uFEFF') ? text.slice(1) : text);
  const tree = readTree(source);
  const found = new Collector();
  found.add(...tree.diagnostics);
  const report: Report = { source, found };
  const top = tree.root === undefined ? undefined : checkTop(tree.root, report);
  if (top === undefined) return { diagnostics: found.told(), wants: [] };
  if (found.errors > 0) return { ...readablePart(top, files, report), diagnostics: found.told() };
  const { root: joined, wants } = joinFiles(top, files, report);
  const root = nameUnsureNumbers(joined, report);
  const diagnostics = found.told();
  if (found.errors > 0) return { diagnostics, wants };
  return { document: documentOf(root, source, found), diagnostics, wants };
}

/** Names can stand in data files, too, so that those are wanted. */
function readablePart(top: SourceMap, files: DataFiles, { source }: Report): Omit<ReadSpec, 'diagnostics'> {
  const report: Report = { source, found: new Collector() };
  const sound = soundPart(top, source, report);
  if (sound === null) return { wants: [] };
  const { root: joined, wants } = joinFiles(sound.root, files, report);
  const root = nameUnsureNumbers(joined, report);
  if (report.found.errors > 0) return { wants };
  return { readable: { document: documentOf(root, source, report.found), lost: sound.lost }, wants };
}

function documentOf(root: SourceMap, source: SourceText, found: Collector): SpecDocument {
  const value = specOf(root);
  if (!isSpec(value, found)) throw new Bug('A spec with errors was taken for one without.');
  return {
    file: source.file,
    text: source.text,
    spec: value,
    locate: (path, part, span) => locateIn(root, path[0] === 'named' ? path.slice(1) : path, { source, part, span }),
  };
}

/** The keys of the language as they are, the sections that the author named together under `named`. */
function specOf(root: SourceMap): unknown {
  const core: Shape = CoreSchema;
  const kinds: Readonly<Record<string, Shape>> = namedSchemas;
  const known = knownKeys(core);
  const own = root.entries.filter((entry) => !Object.hasOwn(known, entry.key));
  const named = own.map(({ key, value }) => [key, shapedValueOf(value, kinds[kindOf(value)])] as const);
  const written = root.entries.filter((entry) => Object.hasOwn(known, entry.key));
  return sectionOf([
    ...written.map(({ key, value }) => [key, shapedValueOf(value, known[key])] as const),
    ['named', sectionOf(named)],
  ]);
}

function kindOf(section: SourceNode): string {
  const kind = section.kind === 'map' ? section.entries.find((entry) => entry.key === 'kind')?.value : undefined;
  return kind?.kind === 'scalar' ? kind.source : '';
}

/** The checks of shape have the same source as the type: what they find nothing wrong with is a spec. */
function isSpec(value: unknown, found: Collector): value is Spec {
  return typeof value === 'object' && value !== null && found.errors === 0;
}
