// A tree with names replaced by other trees.
import type { Ast, Truth } from './ast.ts';

/** `replacement` gives null for names that stay. */
export function replaceNames(node: Ast, replacement: (name: string) => Ast | null): Ast {
  const inside = (part: Ast): Ast => replaceNames(part, replacement);
  switch (node.kind) {
    case 'number':
      return node;
    case 'name':
      return replacement(node.name) ?? node;
    case 'negate':
    case 'call':
      return { ...node, of: inside(node.of) };
    case 'arithmetic':
      return { ...node, left: inside(node.left), right: inside(node.right) };
    case 'extreme':
      return { ...node, of: node.of.map(inside) };
    case 'if': {
      const condition = replaceInTruth(node.condition, inside);
      return { ...node, condition, then: inside(node.then), otherwise: inside(node.otherwise) };
    }
  }
}

function replaceInTruth(node: Truth, inside: (part: Ast) => Ast): Truth {
  switch (node.kind) {
    case 'not':
      return { ...node, of: replaceInTruth(node.of, inside) };
    case 'and':
    case 'or':
      return { ...node, left: replaceInTruth(node.left, inside), right: replaceInTruth(node.right, inside) };
    case 'compare':
      return { ...node, left: inside(node.left), right: inside(node.right) };
  }
}
