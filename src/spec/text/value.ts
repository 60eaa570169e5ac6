// A tree as plain data, once nothing is wrong with it.
import type { SourceNode } from './source.ts';

/** Sections become objects without a prototype, so that no name of a user's is mistaken for a method. */
export function valueOf(node: SourceNode): unknown {
  switch (node.kind) {
    case 'scalar':
      return node.value;
    case 'hole':
      return null;
    case 'list':
      return node.items.map(valueOf);
    case 'map':
      return sectionOf(node.entries.map((entry) => [entry.key, valueOf(entry.value)]));
  }
}

export function sectionOf(entries: readonly (readonly [string, unknown])[]): Readonly<Record<string, unknown>> {
  const section: Record<string, unknown> = Object.create(null) as Record<string, unknown>;
  for (const [key, value] of entries) section[key] = value;
  return section;
}
