// The value of an expression. What has no finite value is told as a fault with its place, never as NaN or infinity.
import type { Arithmetic, Ast, Call, Comparison, Extreme, Span, Truth } from './ast.ts';

/** Functions with the same bits on every machine. */
export interface ExpressionMath {
  exp(x: number): number;
  log(x: number): number;
  pow(base: number, exponent: number): number;
}

/** The value of a name, or undefined where the name is not known. */
export type Scope = (name: string) => number | undefined;

export type FaultCode = 'unknown-name' | 'division-by-zero' | 'not-a-number' | 'infinite-number';

export interface Fault {
  readonly code: FaultCode;
  readonly message: string;
  readonly span: Span;
  readonly name?: string;
}

export type Evaluated = { readonly ok: true; readonly value: number } | { readonly ok: false; readonly fault: Fault };

interface Context {
  readonly scope: Scope;
  readonly math: ExpressionMath;
  fault: Fault | undefined;
}

/** Branches that are not taken, and the second half of a decided `and` or `or`, are not evaluated. */
export function evaluate(ast: Ast, scope: Scope, math: ExpressionMath): Evaluated {
  const context: Context = { scope, math, fault: undefined };
  const value = numberOf(ast, context);
  return context.fault === undefined ? { ok: true, value } : { ok: false, fault: context.fault };
}

/** Keeps the first fault. The NaN that stands for it spreads upwards and can come from nowhere else. */
function fail(context: Context, code: FaultCode, span: Span, message: string): number {
  context.fault ??= { code, message, span };
  return NaN;
}

function numberOf(node: Ast, context: Context): number {
  switch (node.kind) {
    case 'number':
      return node.value;
    case 'name':
      return valueOf(node.name, node.span, context);
    case 'negate':
      return -numberOf(node.of, context);
    case 'arithmetic':
      return combine(node, context);
    case 'call':
      return call(node, context);
    case 'extreme':
      return extreme(node, context);
    case 'if': {
      const condition = truthOf(node.condition, context);
      if (context.fault !== undefined) return NaN;
      return numberOf(condition ? node.then : node.otherwise, context);
    }
  }
}

function valueOf(name: string, span: Span, context: Context): number {
  const value = context.scope(name);
  if (value === undefined) {
    context.fault ??= { code: 'unknown-name', message: `There is no \`${name}\` here`, span, name };
    return NaN;
  }
  return finite(value, span, context);
}

function finite(value: number, span: Span, context: Context): number {
  if (Number.isFinite(value) || context.fault !== undefined) return value;
  if (Number.isNaN(value)) return fail(context, 'not-a-number', span, 'This has no value');
  return fail(context, 'infinite-number', span, 'This is too large to be a number');
}

function combine(node: Arithmetic, context: Context): number {
  const left = numberOf(node.left, context);
  const right = numberOf(node.right, context);
  if (context.fault !== undefined) return NaN;
  switch (node.sign) {
    case '+':
      return finite(left + right, node.span, context);
    case '-':
      return finite(left - right, node.span, context);
    case '*':
      return finite(left * right, node.span, context);
    case '/':
      if (right === 0) return fail(context, 'division-by-zero', node.right.span, 'This is zero and divides a number');
      return finite(left / right, node.span, context);
    case '^':
      return power(node, [left, right], context);
  }
}

function power(node: Arithmetic, [base, exponent]: readonly [number, number], context: Context): number {
  if (base === 0 && exponent < 0) {
    return fail(context, 'division-by-zero', node.left.span, 'This is zero and has a negative power');
  }
  if (base < 0 && !Number.isInteger(exponent)) {
    return fail(context, 'not-a-number', node.span, 'A negative number has no power that is not whole');
  }
  return finite(context.math.pow(base, exponent), node.span, context);
}

function call(node: Call, context: Context): number {
  const x = numberOf(node.of, context);
  if (context.fault !== undefined) return NaN;
  switch (node.function) {
    case 'exp':
      return finite(context.math.exp(x), node.span, context);
    case 'log':
      if (x <= 0) return fail(context, 'not-a-number', node.span, 'Only a number above zero has a logarithm');
      return finite(context.math.log(x), node.span, context);
    case 'sqrt':
      if (x < 0) return fail(context, 'not-a-number', node.span, 'A negative number has no square root');
      return Math.sqrt(x);
  }
}

function extreme(node: Extreme, context: Context): number {
  const values = node.of.map((part) => numberOf(part, context));
  return node.pick === 'min' ? Math.min(...values) : Math.max(...values);
}

function truthOf(node: Truth, context: Context): boolean {
  switch (node.kind) {
    case 'not':
      return !truthOf(node.of, context);
    case 'and':
      return truthOf(node.left, context) && truthOf(node.right, context);
    case 'or':
      return truthOf(node.left, context) || truthOf(node.right, context);
    case 'compare':
      return compare(node, context);
  }
}

function compare(node: Comparison, context: Context): boolean {
  const left = numberOf(node.left, context);
  const right = numberOf(node.right, context);
  switch (node.sign) {
    case '<':
      return left < right;
    case '<=':
      return left <= right;
    case '>':
      return left > right;
    case '>=':
      return left >= right;
    case '=':
      return left === right;
    case '!=':
      return left !== right;
  }
}
