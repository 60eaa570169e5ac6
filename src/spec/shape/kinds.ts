// Sections that say their kind: which shape is meant, and what to tell where there is no such kind.
import { nearestName } from '../../diagnostic/nearest.ts';
import type { SourceEntry, SourceMap } from '../text/source.ts';
import { put, type Report, type Subject } from './report.ts';
import { knownKeys, type Shape } from './shape.ts';
import { either } from './words.ts';

export type Kinds = Readonly<Record<string, Shape>>;

/** The branches of a union by their kinds; null where they are not told apart so. */
export function kindsOf(branches: readonly Shape[]): Kinds | null {
  const kinds = branches.map((branch) => [knownKeys(branch)['kind']?.const, branch] as const);
  if (kinds.length < 2 || kinds.some(([kind]) => typeof kind !== 'string')) return null;
  return Object.fromEntries(kinds.map(([kind, branch]) => [String(kind), branch]));
}

export function kindEntry(section: SourceMap): SourceEntry | undefined {
  return section.entries.find((one) => one.key === 'kind');
}

/** The shape of the kind that a section says; undefined after telling that it says none, or one that there is not. */
export function shapeOfKind(section: SourceMap, kinds: Kinds, subject: Subject, report: Report): Shape | undefined {
  const entry = kindEntry(section);
  if (entry === undefined) {
    const message = `\`${subject.label}\` does not say its kind`;
    const fix = `Add a line such as \`kind: ${Object.keys(kinds)[0] ?? ''}\`.`;
    put(report, { code: 'missing-kind', message, span: subject.span }, { expected: kindWords(kinds), fix });
    return undefined;
  }
  const word = entry.value.kind === 'scalar' ? entry.value : undefined;
  const shape = word !== undefined && Object.hasOwn(kinds, word.source) ? kinds[word.source] : undefined;
  if (shape === undefined) {
    put(
      report,
      { code: 'unknown-kind', message: 'There is no such kind', span: word?.span ?? entry.keySpan },
      {
        found: word?.source === '' ? undefined : word?.source,
        expected: kindWords(kinds),
        nearest: word === undefined ? undefined : nearestName(word.source, Object.keys(kinds)),
      },
    );
  }
  return shape;
}

export function kindWords(kinds: Kinds): string {
  return either(Object.keys(kinds).map((kind) => `\`${kind}\``));
}
