// The values of an expression over columns: each number is that of `evaluate` with the numbers of its row, to the last bit.
import type { Ast } from './ast.ts';
import { evaluate, type ExpressionMath } from './evaluate.ts';

/** A column, a number that is the same in all rows, or undefined where the name is not known. */
export type ColumnScope = (name: string) => Float64Array | number | undefined;

interface Context {
  readonly scope: ColumnScope;
  readonly math: ExpressionMath;
  readonly rows: number;
  /** 1 where something on the way has no value. */
  readonly faults: Uint8Array;
}

type Operand = Float64Array | number;

/** So many rows; not a number where `evaluate` has a fault. */
export function evaluateColumns(ast: Ast, scope: ColumnScope, math: ExpressionMath, rows: number): Float64Array {
  const context: Context = { scope, math, rows, faults: new Uint8Array(rows) };
  const found = columnOf(ast, context);
  const column = typeof found === 'number' ? new Float64Array(rows).fill(found) : found.slice(0, rows);
  for (let i = 0; i < rows; i++) if (context.faults[i] === 1) column[i] = NaN;
  return column;
}

function columnOf(node: Ast, context: Context): Operand {
  const { math } = context;
  switch (node.kind) {
    case 'number':
      return node.value;
    case 'name':
      return checked(context.scope(node.name) ?? NaN, context);
    case 'negate':
      return each(columnOf(node.of, context), context, (x) => -x);
    case 'arithmetic': {
      const [a, b] = [columnOf(node.left, context), columnOf(node.right, context)];
      return checked(both(a, b, context, arithmetic(node.sign, math)), context);
    }
    case 'call': {
      const of = { exp: math.exp, log: (x: number) => (x > 0 ? math.log(x) : NaN), sqrt: Math.sqrt }[node.function];
      return checked(each(columnOf(node.of, context), context, of), context);
    }
    case 'extreme': {
      const pick = node.pick === 'min' ? Math.min : Math.max;
      return node.of.map((part) => columnOf(part, context)).reduce((a, b) => both(a, b, context, (x, y) => pick(x, y)));
    }
    case 'if':
      return rowByRow(node, context);
  }
}

/** What has no value is not finite in any of them. */
function arithmetic(sign: '+' | '-' | '*' | '/' | '^', math: ExpressionMath): (x: number, y: number) => number {
  switch (sign) {
    case '+':
      return (x, y) => x + y;
    case '-':
      return (x, y) => x - y;
    case '*':
      return (x, y) => x * y;
    case '/':
      return (x, y) => x / y;
    case '^':
      return (x, y) => (x < 0 && !Number.isInteger(y) ? NaN : x === 0 && y < 0 ? Infinity : math.pow(x, y));
  }
}

function each(x: Operand, { rows }: Context, of: (x: number) => number): Operand {
  if (typeof x === 'number') return of(x);
  const out = new Float64Array(rows);
  for (let i = 0; i < rows; i++) out[i] = of(x[i] ?? NaN);
  return out;
}

function both(a: Operand, b: Operand, context: Context, of: (x: number, y: number) => number): Operand {
  if (typeof a === 'number') return each(b, context, (y) => of(a, y));
  if (typeof b === 'number') return each(a, context, (x) => of(x, b));
  const out = new Float64Array(context.rows);
  for (let i = 0; i < out.length; i++) out[i] = of(a[i] ?? NaN, b[i] ?? NaN);
  return out;
}

/** Notes where there is no value. */
function checked(x: Operand, { rows, faults }: Context): Operand {
  if (typeof x === 'number') {
    if (!Number.isFinite(x)) faults.fill(1);
    return x;
  }
  for (let i = 0; i < rows; i++) if (!Number.isFinite(x[i])) faults[i] = 1;
  return x;
}

/** Only the branch that is taken may lack a value. */
function rowByRow(node: Ast, { scope, math, rows, faults }: Context): Float64Array {
  const out = new Float64Array(rows);
  for (let i = 0; i < rows; i++) {
    const at = (name: string): number | undefined => {
      const column = scope(name);
      return column instanceof Float64Array ? column[i] : column;
    };
    const found = evaluate(node, at, math);
    if (found.ok) out[i] = found.value;
    else faults[i] = 1;
  }
  return out;
}
