// The top of a spec: keys of the language, and beside them the sections that the author names, each with a kind.
import { nearestName } from '../../diagnostic/nearest.ts';
import { CoreSchema, namedSchemas } from '../schema/spec.ts';
import type { SourceEntry, SourceMap, SourceNode, SourceScalar } from '../text/source.ts';
import { checkMap, subjectOf, tellUnknownKey } from './check.ts';
import { checkName } from './format.ts';
import { put, type Report } from './report.ts';
import type { Shape } from './shape.ts';
import { either } from './words.ts';

const core: Shape = CoreSchema;
const kinds: Readonly<Record<string, Shape>> = namedSchemas;

/** The sections of the spec, or undefined where it has none. */
export function checkTop(root: SourceNode, report: Report): SourceMap | undefined {
  if (root.kind !== 'map') {
    put(
      report,
      {
        code: 'yaml-not-sections',
        message: 'A spec is made of keys with values',
        span: { ...root.span, length: 1 },
      },
      { expected: 'a line such as `skein: 1`', fix: 'Begin with `skein: 1`, then `study:`, `patches:` and so on.' },
    );
    return undefined;
  }
  const known = root.entries.filter((entry) => isCore(entry.key));
  checkMap({ ...root, entries: known }, core, { label: '', span: { ...root.span, length: 1 } }, report);
  const year = phasesOf(root);
  for (const entry of root.entries) {
    if (!isCore(entry.key) && !report.found.full) checkOwnSection(entry, year, report);
  }
  return root;
}

function isCore(key: string): boolean {
  return Object.hasOwn(CoreSchema.properties, key);
}

/** What the author's year names, as far as it can be read. */
function phasesOf(root: SourceMap): ReadonlySet<string> {
  const year = root.entries.find((entry) => entry.key === 'year')?.value;
  if (year?.kind !== 'list') return new Set();
  return new Set(year.items.flatMap((item) => (item.kind === 'scalar' ? [item.source] : [])));
}

function checkOwnSection(entry: SourceEntry, year: ReadonlySet<string>, report: Report): void {
  const { key, keySpan, plain, value } = entry;
  const kind = value.kind === 'map' ? value.entries.find((one) => one.key === 'kind') : undefined;
  if (value.kind !== 'map' || kind === undefined) {
    if (value.kind === 'map' && year.has(key)) tellMissingKind(entry, report);
    else tellUnknownKey(entry, Object.keys(CoreSchema.properties), report);
    return;
  }
  checkName({ kind: 'scalar', value: key, source: key, plain, span: keySpan }, report);
  const word = kind.value.kind === 'scalar' ? kind.value : undefined;
  const shape = word !== undefined && Object.hasOwn(kinds, word.source) ? kinds[word.source] : undefined;
  if (shape === undefined) tellUnknownKind(kind, word, report);
  else checkMap(value, shape, subjectOf(entry), report);
}

function kindWords(): string {
  return either(Object.keys(kinds).map((kind) => `\`${kind}\``));
}

function tellMissingKind(entry: SourceEntry, report: Report): void {
  put(
    report,
    {
      code: 'missing-kind',
      message: `\`${entry.key}\` stands in the year and does not say its kind`,
      span: entry.keySpan,
    },
    { expected: kindWords(), fix: 'Add a line such as `kind: dispersal`.' },
  );
}

function tellUnknownKind(kind: SourceEntry, word: SourceScalar | undefined, report: Report): void {
  put(
    report,
    { code: 'unknown-kind', message: 'There is no such kind', span: word?.span ?? kind.keySpan },
    {
      found: word?.source === '' ? undefined : word?.source,
      expected: kindWords(),
      nearest: word === undefined ? undefined : nearestName(word.source, Object.keys(kinds)),
    },
  );
}
