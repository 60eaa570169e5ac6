// Makes trees for derivatives, leaving out what changes nothing: 0 + a, 1 * a, a^1 and the like.
import type { ArithmeticSign, Ast, Comparison, ComparisonSign, Span } from './ast.ts';

export function number(value: number, span: Span): Ast {
  if (value < 0) return { kind: 'negate', of: { kind: 'number', value: -value, span }, span };
  return { kind: 'number', value: value + 0, span };
}

function is(node: Ast, value: number): boolean {
  return node.kind === 'number' && node.value === value;
}

export function isZero(node: Ast): boolean {
  return is(node, 0);
}

function arithmetic(sign: ArithmeticSign, left: Ast, right: Ast, span: Span): Ast {
  return { kind: 'arithmetic', sign, left, right, span };
}

export function negate(of: Ast, span: Span): Ast {
  if (isZero(of)) return of;
  return of.kind === 'negate' ? of.of : { kind: 'negate', of, span };
}

export function add(left: Ast, right: Ast, span: Span): Ast {
  if (isZero(left)) return right;
  return isZero(right) ? left : arithmetic('+', left, right, span);
}

export function subtract(left: Ast, right: Ast, span: Span): Ast {
  if (isZero(right)) return left;
  return isZero(left) ? negate(right, span) : arithmetic('-', left, right, span);
}

export function multiply(left: Ast, right: Ast, span: Span): Ast {
  if (isZero(left) || isZero(right)) return number(0, span);
  if (is(left, 1)) return right;
  return is(right, 1) ? left : arithmetic('*', left, right, span);
}

export function divide(left: Ast, right: Ast, span: Span): Ast {
  return isZero(left) || is(right, 1) ? left : arithmetic('/', left, right, span);
}

export function raise(base: Ast, exponent: Ast, span: Span): Ast {
  if (isZero(exponent)) return number(1, span);
  return is(exponent, 1) ? base : arithmetic('^', base, exponent, span);
}

export function compare(sign: ComparisonSign, left: Ast, right: Ast, span: Span): Comparison {
  return { kind: 'compare', sign, left, right, span };
}
