// The way back from a path in the spec to its place in the text.
import type { Place } from '../../diagnostic/diagnostic.ts';
import type { SpecPath } from '../document.ts';
import type { Span } from '../expression/ast.ts';
import { placeAt, spanWithin, type SourceEntry, type SourceNode, type SourceText } from './source.ts';

/** Without `part`, a single value is shown itself, and a section or list by its key. */
export function locateIn(root: SourceNode, path: SpecPath, { source, part, span }: Sought): Place {
  let node: Shown = { node: root, source, span: root.span };
  let key: Stretch = { source, span: { offset: root.span.offset, length: 1 } };
  for (const step of path) {
    const next = follow(node.node, step);
    if (next === undefined) return show(node, key, undefined);
    const own = next.file ?? node.source;
    if (next.keySpan !== undefined) key = { source: own, span: next.keySpan };
    else key = { source: node.source, span: { ...node.span, length: Math.max(1, node.span.length) } };
    node = { node: next.value, source: next.value.file ?? own, span: next.value.span };
  }
  const { node: last, source: own } = node;
  if (span !== undefined && last.kind === 'scalar' && span.offset + span.length <= last.source.length) {
    return placeAt(own, spanWithin(last, span, own));
  }
  return show(node, key, part);
}

interface Sought {
  readonly source: SourceText;
  readonly part: 'key' | 'value' | undefined;
  readonly span: Span | undefined;
}

/** A stretch of one of the texts that a spec is made of. */
interface Stretch {
  readonly source: SourceText;
  readonly span: Span;
}

interface Shown extends Stretch {
  readonly node: SourceNode;
}

type Step = Pick<SourceEntry, 'value'> & Partial<Pick<SourceEntry, 'keySpan' | 'file'>>;

function follow(node: SourceNode, step: string | number): Step | undefined {
  if (node.kind === 'map') return node.entries.find((entry) => entry.key === String(step));
  const item = node.kind === 'list' && typeof step === 'number' ? node.items[step] : undefined;
  return item === undefined ? undefined : { value: item };
}

function show(value: Shown, key: Stretch, part: 'key' | 'value' | undefined): Place {
  const preferred = part ?? (value.node.kind === 'scalar' ? 'value' : 'key');
  const shown = preferred === 'value' && value.span.length > 0 ? value : key;
  return placeAt(shown.source, shown.span);
}
