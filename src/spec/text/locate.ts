// The way back from a path in the spec to its place in the text.
import type { Place } from '../../diagnostic/diagnostic.ts';
import type { SpecPath } from '../document.ts';
import type { Span } from '../expression/ast.ts';
import { placeAt, spanWithin, type SourceEntry, type SourceNode, type SourceText } from './source.ts';

export function locateIn(root: SourceNode, path: SpecPath, { source, part, span }: Sought): Place {
  let node = root;
  let key: Span = { offset: node.span.offset, length: 1 };
  for (const step of path) {
    const next = follow(node, step);
    if (next === undefined) return placeAt(source, shown(node, key, undefined));
    node = next.value;
    if (next.keySpan !== undefined) key = next.keySpan;
    else key = { offset: node.span.offset, length: Math.max(1, node.span.length) };
  }
  if (span !== undefined && node.kind === 'scalar' && span.offset + span.length <= node.source.length) {
    return placeAt(source, spanWithin(node, span, source));
  }
  return placeAt(source, shown(node, key, part));
}

interface Sought {
  readonly source: SourceText;
  readonly part: 'key' | 'value' | undefined;
  readonly span: Span | undefined;
}

type Step = Pick<SourceEntry, 'value'> & Partial<Pick<SourceEntry, 'keySpan'>>;

function follow(node: SourceNode, step: string | number): Step | undefined {
  if (node.kind === 'map') return node.entries.find((entry) => entry.key === String(step));
  const item = node.kind === 'list' && typeof step === 'number' ? node.items[step] : undefined;
  return item === undefined ? undefined : { value: item };
}

function shown(node: SourceNode, key: Span, part: 'key' | 'value' | undefined): Span {
  const preferred = part ?? (node.kind === 'scalar' ? 'value' : 'key');
  return preferred === 'value' && node.span.length > 0 ? node.span : key;
}
