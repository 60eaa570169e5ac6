// An expression as text with no bracket more than it needs; reading that text gives the same tree.
import type { Ast, Truth } from './ast.ts';

/** How strongly the outermost sign of a node binds, as in the reader; a choice binds least of all. */
function strengthOf(node: Ast | Truth): number {
  switch (node.kind) {
    case 'if':
      return 0;
    case 'or':
      return 1;
    case 'and':
      return 2;
    case 'not':
      return 3;
    case 'compare':
      return 4;
    case 'arithmetic':
      if (node.sign === '^') return 8;
      return node.sign === '*' || node.sign === '/' ? 6 : 5;
    case 'negate':
      return 7;
    default:
      return 9;
  }
}

export function printExpression(node: Ast | Truth): string {
  switch (node.kind) {
    case 'number':
      return String(node.value);
    case 'name':
      return node.name;
    case 'negate':
      return `-${within(node.of, 8)}`;
    case 'arithmetic':
      if (node.sign === '^') return `${within(node.left, 9)}^${within(node.right, 7)}`;
      return `${within(node.left, strengthOf(node))} ${node.sign} ${within(node.right, strengthOf(node) + 1)}`;
    case 'call':
      return `${node.function}(${printExpression(node.of)})`;
    case 'extreme':
      return `${node.pick}(${node.of.map(printExpression).join(', ')})`;
    case 'if':
      return `if ${printExpression(node.condition)} then ${printExpression(node.then)} else ${printExpression(node.otherwise)}`;
    case 'compare':
      return `${within(node.left, 5)} ${node.sign} ${within(node.right, 5)}`;
    case 'not':
      return `not ${within(node.of, 4)}`;
    case 'and':
    case 'or':
      return `${within(node.left, strengthOf(node))} ${node.kind} ${within(node.right, strengthOf(node) + 1)}`;
  }
}

/** In brackets where the node binds more weakly than its neighbours ask. */
function within(node: Ast | Truth, least: number): string {
  const text = printExpression(node);
  return strengthOf(node) < least ? `(${text})` : text;
}
