// Reads the text of an expression: precedence as in mathematics, so -2^2 is -4 and 2^3^2 is 2^9.
import type { ArithmeticSign, Ast, ComparisonSign, Span, Truth } from './ast.ts';
import {
  chained,
  deepest,
  functions,
  leftOver,
  missing,
  notFinite,
  tooDeep,
  unexpected,
  unknownFunction,
  withoutArguments,
} from './complaints.ts';
import { failure, type ExpressionError } from './failure.ts';
import { readTokens, type Token } from './tokens.ts';

export type Parsed = { readonly ok: true; readonly ast: Ast } | { readonly ok: false; readonly error: ExpressionError };

type Node = Ast | Truth;
type Step = Node | ExpressionError;

/** Where reading stands: the only thing that changes. */
interface Reader {
  readonly tokens: readonly Token[];
  next: number;
  depth: number;
}

/** How strongly each sign binds; a minus in front stands between * and ^. */
const strength: Readonly<Record<string, number>> = {
  ...{ or: 1, and: 2 },
  ...{ '<': 4, '<=': 4, '>': 4, '>=': 4, '=': 4, '!=': 4 },
  ...{ '+': 5, '-': 5, '*': 6, '/': 6, '^': 8 },
};
const strengthOfNot = 3;
const strengthOfMinus = 7;

/** An expression that gives a number; YAML hands plain numbers over as numbers. */
export function parseExpression(text: string | number): Parsed {
  if (typeof text === 'number' && !Number.isFinite(text)) return wrong(notFinite(text));
  const cut = readTokens(String(text));
  if (!cut.ok) return cut;
  if (cut.tokens.length === 1) return wrong(failure('expression-empty', at(0, 0), 'The expression is empty'));
  const reader: Reader = { tokens: cut.tokens, next: 0, depth: 0 };
  const whole = readNode(reader, 0);
  if (isError(whole)) return wrong(whole);
  const rest = peek(reader);
  if (rest.kind !== 'end') return wrong(leftOver(rest));
  const ast = needNumber(whole);
  return isError(ast) ? wrong(ast) : { ok: true, ast };
}

function wrong(error: ExpressionError): Parsed {
  return { ok: false, error };
}

function at(offset: number, length: number): Span {
  return { offset, length };
}

function isError(step: Step): step is ExpressionError {
  return 'code' in step;
}

function peek(reader: Reader): Token {
  return reader.tokens[Math.min(reader.next, reader.tokens.length - 1)] ?? { kind: 'end', text: '', span: at(0, 0) };
}

function accept(reader: Reader, text: string): boolean {
  const token = peek(reader);
  const here = token.kind !== 'end' && token.kind !== 'number' && token.text === text;
  if (here) reader.next++;
  return here;
}

function between(from: Span, to: Span): Span {
  return at(from.offset, to.offset + to.length - from.offset);
}

/** An operand and all that follows it and binds more strongly than `floor`. */
function readNode(reader: Reader, floor: number): Step {
  if (reader.depth >= deepest) return tooDeep(peek(reader).span);
  reader.depth++;
  let left = readOperand(reader);
  while (!isError(left)) {
    const sign = peek(reader);
    const binds = sign.kind === 'end' || sign.kind === 'number' ? undefined : strength[sign.text];
    if (binds === undefined || binds <= floor) break;
    reader.next++;
    // A power binds to the right: what follows may be as strong as itself, and may carry a minus.
    const right = readNode(reader, sign.text === '^' ? binds - 2 : binds);
    left = isError(right) ? right : join(sign, left, right);
  }
  reader.depth--;
  return left;
}

function join(sign: Token, left: Node, right: Node): Step {
  const span = between(left.span, right.span);
  if (sign.text === 'and' || sign.text === 'or') {
    const [one, other] = [needTruth(left), needTruth(right)];
    if (isError(one)) return one;
    return isError(other) ? other : { kind: sign.text, left: one, right: other, span };
  }
  if (isComparison(sign.text) && left.kind === 'compare') return chained(span);
  const [one, other] = [needNumber(left), needNumber(right)];
  if (isError(one)) return one;
  if (isError(other)) return other;
  if (isComparison(sign.text)) return { kind: 'compare', sign: sign.text, left: one, right: other, span };
  if (isArithmetic(sign.text)) return { kind: 'arithmetic', sign: sign.text, left: one, right: other, span };
  return unexpected(sign);
}

function isComparison(text: string): text is ComparisonSign {
  return strength[text] === 4;
}

function isArithmetic(text: string): text is ArithmeticSign {
  return (strength[text] ?? 0) > 4;
}

function isTruth(node: Node): node is Truth {
  return node.kind === 'compare' || node.kind === 'and' || node.kind === 'or' || node.kind === 'not';
}

function needNumber(node: Node): Ast | ExpressionError {
  if (!isTruth(node)) return node;
  return failure('expression-truth', node.span, 'This is true or false where a number is needed', {
    fix: 'Write `if … then … else …` to make a number of it.',
  });
}

function needTruth(node: Node): Truth | ExpressionError {
  if (isTruth(node)) return node;
  return failure('expression-truth', node.span, 'This is a number where a condition is needed', {
    expected: 'a comparison such as `year >= 2030`',
  });
}

function readOperand(reader: Reader): Step {
  const token = peek(reader);
  reader.next++;
  if (token.kind === 'number') return { kind: 'number', value: token.value, span: token.span };
  if (token.kind === 'name') return readWord(reader, token);
  if (token.text === '(') return readBrackets(reader, token);
  if (token.text === '-') {
    const step = readNode(reader, strengthOfMinus);
    const of = isError(step) ? step : needNumber(step);
    return isError(of) ? of : { kind: 'negate', of, span: between(token.span, of.span) };
  }
  return unexpected(token);
}

function readWord(reader: Reader, token: Token): Step {
  if (token.text === 'not') {
    const step = readNode(reader, strengthOfNot);
    const of = isError(step) ? step : needTruth(step);
    return isError(of) ? of : { kind: 'not', of, span: between(token.span, of.span) };
  }
  if (token.text === 'if') return readChoice(reader, token);
  if (['and', 'or', 'then', 'else'].includes(token.text)) return unexpected(token);
  if (peek(reader).text === '(') return readCall(reader, token);
  if (functions.includes(token.text)) return withoutArguments(token);
  return { kind: 'name', name: token.text, span: token.span };
}

function readBrackets(reader: Reader, open: Token): Step {
  const inside = readNode(reader, 0);
  if (isError(inside)) return inside;
  const close = peek(reader);
  if (!accept(reader, ')')) return missing(close, ')', 'A bracket is not closed');
  // The span grows to the brackets, so that an error points at the whole of it.
  return { ...inside, span: between(open.span, close.span) };
}

function readChoice(reader: Reader, start: Token): Step {
  const step = readNode(reader, 0);
  const condition = isError(step) ? step : needTruth(step);
  if (isError(condition)) return condition;
  if (!accept(reader, 'then')) return missing(peek(reader), 'then', '`if` goes on with `then`');
  const first = readNode(reader, 0);
  const then = isError(first) ? first : needNumber(first);
  if (isError(then)) return then;
  if (!accept(reader, 'else')) return missing(peek(reader), 'else', '`if … then …` goes on with `else`');
  const second = readNode(reader, 0);
  const otherwise = isError(second) ? second : needNumber(second);
  if (isError(otherwise)) return otherwise;
  return { kind: 'if', condition, then, otherwise, span: between(start.span, otherwise.span) };
}

function readCall(reader: Reader, name: Token): Step {
  reader.next++;
  const values: Ast[] = [];
  do {
    const step = readNode(reader, 0);
    const value = isError(step) ? step : needNumber(step);
    if (isError(value)) return value;
    values.push(value);
  } while (accept(reader, ','));
  const close = peek(reader);
  if (!accept(reader, ')')) return missing(close, ')', 'A bracket is not closed');
  return callOf(name, values, between(name.span, close.span));
}

function callOf(name: Token, values: readonly Ast[], span: Span): Step {
  const called = name.text;
  const [first] = values;
  if ((called === 'min' || called === 'max') && values.length > 1) {
    return { kind: 'extreme', pick: called, of: values, span };
  }
  if ((called === 'exp' || called === 'log' || called === 'sqrt') && first !== undefined && values.length === 1) {
    return { kind: 'call', function: called, of: first, span };
  }
  if (functions.includes(called)) {
    const expected = called === 'min' || called === 'max' ? 'two numbers or more, with commas between' : 'one number';
    return failure('expression-function', span, `\`${called}\` has the wrong number of arguments`, {
      found: String(values.length),
      expected,
    });
  }
  return unknownFunction(name);
}
