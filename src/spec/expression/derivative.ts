// The exact derivative of an expression by one of its names, the others held fixed.
import type { Arithmetic, Ast, Call, Extreme, Span } from './ast.ts';
import * as make from './build.ts';
import { namesIn } from './names.ts';

/** min and max have the derivative of the part they pick (the first of equals), a choice that of the branch taken. */
export function derivative(ast: Ast, name: string): Ast {
  switch (ast.kind) {
    case 'number':
      return make.number(0, ast.span);
    case 'name':
      return make.number(ast.name === name ? 1 : 0, ast.span);
    case 'negate':
      return make.negate(derivative(ast.of, name), ast.span);
    case 'arithmetic':
      return ofArithmetic(ast, name);
    case 'call':
      return ofCall(ast, name);
    case 'extreme':
      return ofExtreme(ast, name);
    case 'if':
      return choice(ast, derivative(ast.then, name), derivative(ast.otherwise, name));
  }
}

function choice(of: Pick<Extract<Ast, { kind: 'if' }>, 'condition' | 'span'>, then: Ast, otherwise: Ast): Ast {
  if (make.isZero(then) && make.isZero(otherwise)) return then;
  return { kind: 'if', condition: of.condition, then, otherwise, span: of.span };
}

function ofArithmetic({ sign, left, right, span }: Arithmetic, name: string): Ast {
  if (sign === '^') return ofPower(left, right, { name, span });
  const [dLeft, dRight] = [derivative(left, name), derivative(right, name)];
  switch (sign) {
    case '+':
      return make.add(dLeft, dRight, span);
    case '-':
      return make.subtract(dLeft, dRight, span);
    case '*':
      return make.add(make.multiply(dLeft, right, span), make.multiply(left, dRight, span), span);
    case '/': {
      // (f / g)' = f' / g − f g' / g²
      const two = make.number(2, span);
      const second = make.divide(make.multiply(left, dRight, span), make.raise(right, two, span), span);
      return make.subtract(make.divide(dLeft, right, span), second, span);
    }
  }
}

/** (f^g)' = g f^(g − 1) f' + f^g log(f) g'; the terms that are zero for every f are left out. */
function ofPower(base: Ast, exponent: Ast, { name, span }: { readonly name: string; readonly span: Span }): Ast {
  const [dBase, dExponent] = [derivative(base, name), derivative(exponent, name)];
  const reduced = lessOne(exponent, span);
  const first = make.multiply(make.multiply(exponent, make.raise(base, reduced, span), span), dBase, span);
  if (!namesIn(exponent).includes(name)) return first;
  const log: Ast = { kind: 'call', function: 'log', of: base, span };
  const second = make.multiply(make.multiply(make.raise(base, exponent, span), log, span), dExponent, span);
  return make.add(first, whereNotZero(base, second, span), span);
}

function lessOne(exponent: Ast, span: Span): Ast {
  if (exponent.kind === 'number') return make.number(exponent.value - 1, span);
  return make.subtract(exponent, make.number(1, span), span);
}

/** 0^g is 0 for every positive g, where log(0) has no value. */
function whereNotZero(base: Ast, term: Ast, span: Span): Ast {
  const zero = make.number(0, span);
  if (make.isZero(term) || (base.kind === 'number' && base.value > 0)) return term;
  return choice({ condition: make.compare('=', base, zero, span), span }, zero, term);
}

function ofCall({ function: called, of, span }: Call, name: string): Ast {
  const inner = derivative(of, name);
  if (make.isZero(inner)) return inner;
  switch (called) {
    case 'exp':
      return make.multiply({ kind: 'call', function: called, of, span }, inner, span);
    case 'log':
      return make.divide(inner, of, span);
    case 'sqrt': {
      const root: Ast = { kind: 'call', function: called, of, span };
      return make.divide(inner, make.multiply(make.number(2, span), root, span), span);
    }
  }
}

/** Folded from the right: max(a, b, c) is a where a ≥ max(b, c), and so on. */
function ofExtreme({ pick, of, span }: Extreme, name: string): Ast {
  const [first, second, ...others] = of;
  if (first === undefined) return make.number(0, span);
  if (second === undefined) return derivative(first, name);
  const rest: Ast = others.length === 0 ? second : { kind: 'extreme', pick, of: [second, ...others], span };
  const condition = make.compare(pick === 'min' ? '<=' : '>=', first, rest, span);
  return choice({ condition, span }, derivative(first, name), derivative(rest, name));
}
