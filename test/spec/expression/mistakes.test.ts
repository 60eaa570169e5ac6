// Every mistake in an expression is told at its place.
import { describe, expect, test } from 'vitest';
import { parseExpression } from '../../../src/spec/expression/parse.ts';
import type { ExpressionError } from '../../../src/spec/expression/failure.ts';
import { evaluated, read } from './reading.ts';

function mistake(text: string | number): ExpressionError {
  const parsed = parseExpression(text);
  if (parsed.ok) throw new Error(`${String(text)} was read`);
  return parsed.error;
}

const mistakes: readonly (readonly [string, string, number])[] = [
  ['', 'expression-empty', 0],
  ['   ', 'expression-empty', 0],
  ['1 +', 'expression-syntax', 3],
  ['+80', 'expression-syntax', 0],
  ['2 x', 'expression-syntax', 2],
  ['1,5', 'expression-syntax', 1],
  ['(1 + 2', 'expression-syntax', 6],
  ['1 + 2)', 'expression-syntax', 5],
  ['min(1, 2', 'expression-syntax', 8],
  ['1 < 2 < 3', 'expression-syntax', 0],
  ['if 1 < 2 then 3', 'expression-syntax', 15],
  ['if 1 < 2 else 3', 'expression-syntax', 9],
  ['a and', 'expression-syntax', 5],
  ['a and b', 'expression-truth', 0],
  ['not a', 'expression-truth', 4],
  ['a < b', 'expression-truth', 0],
  ['1 + (a < b)', 'expression-truth', 4],
  ['if a then 1 else 2', 'expression-truth', 3],
  ['min(1)', 'expression-function', 0],
  ['exp(1, 2)', 'expression-function', 0],
  ['exp', 'expression-function', 0],
  ['a * sin(1)', 'expression-function', 4],
  ['74 %', 'expression-character', 3],
  ['1_000', 'expression-character', 0],
  ['1.2.3', 'expression-character', 0],
  ['2x', 'expression-character', 0],
  ['1e999', 'expression-character', 0],
  ['a & b', 'expression-character', 2],
  ['a + 🐇', 'expression-character', 4],
];

test.each(mistakes)('%j is refused as %s at %d', (text, code, offset) => {
  const error = mistake(text);
  expect([error.code, error.span.offset]).toEqual([code, offset]);
});

test('numbers that are none are refused', () => {
  expect(mistake(NaN).code).toBe('expression-character');
  expect(mistake(-Infinity).code).toBe('expression-character');
});

test('a fix or a near name is offered where it is plain', () => {
  expect(mistake('1_000').fix).toBe('Write 1000.');
  expect(mistake('ln(2)').nearest).toBe('log');
  expect(mistake('mxa(1, 2)').nearest).toBe('max');
});

describe('size', () => {
  test('deep brackets, signs, choices and powers are refused, not followed', () => {
    const deep = 5_000;
    const texts = ['('.repeat(deep), '-'.repeat(deep), '1^'.repeat(deep), 'exp('.repeat(deep), 'not '.repeat(deep)];
    texts.push('if '.repeat(deep), '1+'.repeat(deep), '1^'.repeat(500) + '1');
    for (const text of texts) expect(mistake(text).code).toBe('expression-size');
  });

  test('the longest sum that is allowed has a value', () => {
    const result = evaluated(read(`${'1+'.repeat(999)}1`));
    expect(result).toEqual({ ok: true, value: 1000 });
  });
});

const faults: readonly (readonly [string, string, number])[] = [
  ['1 / (a - 2)', 'division-by-zero', 4],
  ['0 ^ -1', 'division-by-zero', 0],
  ['1 + log(0)', 'not-a-number', 4],
  ['log(-1)', 'not-a-number', 0],
  ['sqrt(-a)', 'not-a-number', 0],
  ['(-2) ^ 0.5', 'not-a-number', 0],
  ['exp(1000)', 'infinite-number', 0],
  ['10 ^ 400', 'infinite-number', 0],
  ['1e308 * 10', 'infinite-number', 0],
  ['-1e308 - 1e308', 'infinite-number', 0],
  ['2 * q', 'unknown-name', 4],
  ['max(1, q)', 'unknown-name', 7],
  ['if q > 1 then 1 else 2', 'unknown-name', 3],
  ['if not q > 1 or 1 = 1 then 1 else 2', 'unknown-name', 7],
];

test.each(faults)('%j has no value: %s at %d', (text, code, offset) => {
  const result = evaluated(read(text), { a: 2 });
  expect(result.ok ? result : [result.fault.code, result.fault.span.offset]).toEqual([code, offset]);
});
