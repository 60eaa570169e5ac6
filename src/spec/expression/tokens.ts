// Cuts the text of an expression into numbers, names and signs.
import type { Span } from './ast.ts';
import { failure, type ExpressionError } from './failure.ts';

export type Token =
  | { readonly kind: 'number'; readonly value: number; readonly text: string; readonly span: Span }
  | { readonly kind: 'name' | 'sign' | 'end'; readonly text: string; readonly span: Span };

export type Tokens =
  { readonly ok: true; readonly tokens: readonly Token[] } | { readonly ok: false; readonly error: ExpressionError };

/** Longer expressions are refused, which bounds the depth of every tree made from them. */
const mostTokens = 2000;
const mostCharacters = 20_000;

const space = /\s+/uy;
const number = /(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/uy;
const name = /[\p{L}_][\p{L}\p{M}\p{N}_]*/uy;
const sign = /<=|>=|==|!=|[-+*/^(),<>=−×·÷≤≥≠]/uy;

/** Signs as word processors write them. */
const sameSign: Readonly<Record<string, string>> = {
  '==': '=',
  '−': '-',
  '×': '*',
  '·': '*',
  '÷': '/',
  '≤': '<=',
  '≥': '>=',
  '≠': '!=',
};

export function readTokens(text: string): Tokens {
  if (text.length > mostCharacters) return tooLong();
  const tokens: Token[] = [];
  let offset = 0;
  while (offset < text.length) {
    offset += match(space, text, offset).length;
    if (offset >= text.length) break;
    const next = tokenAt(text, offset);
    if ('code' in next) return { ok: false, error: next };
    tokens.push(next);
    offset += next.span.length;
    if (tokens.length > mostTokens) return tooLong();
  }
  tokens.push({ kind: 'end', text: '', span: { offset: text.trimEnd().length, length: 0 } });
  return { ok: true, tokens };
}

function tooLong(): Tokens {
  return {
    ok: false,
    error: failure('expression-size', { offset: 0, length: 1 }, 'The expression is too long', {
      expected: `at most ${String(mostTokens)} numbers, names and signs`,
      fix: 'Give its parts names under `parameters` and use those.',
    }),
  };
}

function match(pattern: RegExp, text: string, offset: number): string {
  pattern.lastIndex = offset;
  return pattern.exec(text)?.[0] ?? '';
}

function tokenAt(text: string, offset: number): Token | ExpressionError {
  const digits = match(number, text, offset);
  if (digits !== '') return numberAt(text, offset, digits);
  const word = match(name, text, offset);
  if (word !== '') return { kind: 'name', text: word, span: { offset, length: word.length } };
  const mark = match(sign, text, offset);
  if (mark !== '') return { kind: 'sign', text: sameSign[mark] ?? mark, span: { offset, length: mark.length } };
  return strangeCharacter(text, offset);
}

function numberAt(text: string, offset: number, digits: string): Token | ExpressionError {
  const after = match(/[\p{L}\p{N}_.]+/uy, text, offset + digits.length);
  if (after !== '') return strangeNumber(digits + after, offset);
  const value = Number(digits);
  const span = { offset, length: digits.length };
  if (Number.isFinite(value)) return { kind: 'number', value, text: digits, span };
  return failure('expression-character', span, 'The number is too large', { found: digits });
}

function strangeNumber(found: string, offset: number): ExpressionError {
  const plain = found.replaceAll('_', '');
  const fix = /^[\d.]+$/u.test(plain) && Number.isFinite(Number(plain)) ? `Write ${plain}.` : undefined;
  return failure('expression-character', { offset, length: found.length }, 'This is neither a number nor a name', {
    found,
    expected: 'a number such as 0.74 or 1000, or a sign between a number and a name: 2 * litter',
    ...(fix === undefined ? {} : { fix }),
  });
}

const advice: Readonly<Record<string, string>> = {
  '%': 'Write a share: 0.74 for 74 %.',
  '&': 'Write `and`.',
  '|': 'Write `or`.',
  '!': 'Write `not`.',
  '?': 'Write `if … then … else …`.',
  '[': 'Use round brackets.',
  '{': 'Use round brackets.',
};

function strangeCharacter(text: string, offset: number): ExpressionError {
  const found = String.fromCodePoint(text.codePointAt(offset) ?? 0);
  const fix = advice[found];
  return failure('expression-character', { offset, length: found.length }, 'This character has no meaning here', {
    found,
    expected: 'numbers, names, + - * / ^, comparisons, and, or, not, min, max, exp, log, sqrt, if … then … else',
    ...(fix === undefined ? {} : { fix }),
  });
}
