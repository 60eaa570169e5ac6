// The names that an expression reads.
import type { Ast, Truth } from './ast.ts';

/** In the order of their first use, each once. */
export function namesIn(ast: Ast | Truth): readonly string[] {
  const found = new Set<string>();
  collect(ast, found);
  return [...found];
}

function collect(node: Ast | Truth, found: Set<string>): void {
  if (node.kind === 'name') found.add(node.name);
  for (const part of partsOf(node)) collect(part, found);
}

/** The nodes directly below a node, from left to right. */
export function partsOf(node: Ast | Truth): readonly (Ast | Truth)[] {
  switch (node.kind) {
    case 'number':
    case 'name':
      return [];
    case 'negate':
    case 'call':
    case 'not':
      return [node.of];
    case 'arithmetic':
    case 'compare':
    case 'and':
    case 'or':
      return [node.left, node.right];
    case 'extreme':
      return node.of;
    case 'if':
      return [node.condition, node.then, node.otherwise];
  }
}
