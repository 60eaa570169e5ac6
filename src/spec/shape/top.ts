// The top of a spec: keys of the language, and beside them the sections that the author names, each with a kind.
import { CoreSchema, namedSchemas } from '../schema/spec.ts';
import type { SourceEntry, SourceMap, SourceNode } from '../text/source.ts';
import { checkMap, subjectOf, tellUnknownKey } from './check.ts';
import { checkName } from './format.ts';
import { kindEntry, kindWords, shapeOfKind } from './kinds.ts';
import { put, type Report } from './report.ts';
import type { Shape } from './shape.ts';

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
  const kind = value.kind === 'map' ? kindEntry(value) : undefined;
  if (value.kind !== 'map' || kind === undefined) {
    if (value.kind === 'map' && year.has(key)) tellMissingKind(entry, report);
    else tellUnknownKey(entry, Object.keys(CoreSchema.properties), report);
    return;
  }
  checkName({ kind: 'scalar', value: key, source: key, plain, span: keySpan }, report);
  const shape = shapeOfKind(value, kinds, subjectOf(entry), report);
  if (shape !== undefined) checkMap(value, shape, subjectOf(entry), report);
}

function tellMissingKind(entry: SourceEntry, report: Report): void {
  put(
    report,
    {
      code: 'missing-kind',
      message: `\`${entry.key}\` stands in the year and does not say its kind`,
      span: entry.keySpan,
    },
    { expected: kindWords(kinds), fix: 'Add a line such as `kind: dispersal`.' },
  );
}
