// What is wrong with the grammar of an expression, in words.
import { nearestName } from '../../diagnostic/nearest.ts';
import type { Span } from './ast.ts';
import { failure, type ExpressionError } from './failure.ts';
import type { Token } from './tokens.ts';

/** Brackets, choices and signs within each other. */
export const deepest = 100;

export const functions: readonly string[] = ['min', 'max', 'exp', 'log', 'sqrt'];

export function notFinite(value: number): ExpressionError {
  return failure('expression-character', { offset: 0, length: 0 }, 'This is not a number', { found: String(value) });
}

export function tooDeep(span: Span): ExpressionError {
  return failure('expression-size', span, 'The expression is nested too deeply', {
    expected: `at most ${String(deepest)} brackets within each other`,
    fix: 'Give its parts names under `parameters` and use those.',
  });
}

export function chained(span: Span): ExpressionError {
  return failure('expression-syntax', span, 'Two comparisons stand in a row', {
    fix: 'Write them apart: `a < b and b < c`.',
  });
}

export function unknownFunction(name: Token): ExpressionError {
  const nearest = name.text === 'ln' ? 'log' : nearestName(name.text, functions);
  return failure('expression-function', name.span, `There is no function \`${name.text}\``, {
    expected: 'min, max, exp, log (natural) or sqrt; a product needs its sign: a * (b + c)',
    ...(nearest === undefined ? {} : { nearest }),
  });
}

export function withoutArguments(name: Token): ExpressionError {
  return failure('expression-function', name.span, `\`${name.text}\` is a function and needs brackets`, {
    expected: name.text === 'min' || name.text === 'max' ? `${name.text}(a, b)` : `${name.text}(a)`,
  });
}

export function missing(token: Token, expected: string, message: string): ExpressionError {
  return failure('expression-syntax', token.span, message, { found: shown(token), expected: `\`${expected}\`` });
}

function shown(token: Token): string {
  return token.kind === 'end' ? 'the end of the expression' : token.text;
}

export function unexpected(token: Token): ExpressionError {
  const fix = token.text === '+' ? 'Leave out a plus in front of a number.' : undefined;
  return failure('expression-syntax', token.span, 'A number, a name or a bracket is missing here', {
    found: shown(token),
    ...(fix === undefined ? {} : { fix }),
  });
}

export function leftOver(token: Token): ExpressionError {
  const comma = 'A comma stands only between the arguments of min and max; decimals have a point: 0.5.';
  return failure('expression-syntax', token.span, 'The expression should have ended before this', {
    found: token.text,
    expected: 'a sign such as * or + before it, or nothing',
    ...(token.text === ',' ? { fix: comma } : {}),
  });
}
