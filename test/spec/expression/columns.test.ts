// An expression over columns has in every row the number that it has there by itself, to the last bit, and none where that has a fault.
import { expect, test } from 'vitest';
import { pinned } from '../../../src/machine/pinned.ts';
import { evaluate } from '../../../src/spec/expression/evaluate.ts';
import { evaluateColumns } from '../../../src/spec/expression/evaluate-columns.ts';
import { read } from './reading.ts';

const values = [-2, -1, -0.5, -0, 0, 0.3, 1, 2.5, 700, 1e200];
const pairs = values.flatMap((a) => values.map((b) => [a, b] as const));
const a = Float64Array.from(pairs, ([x]) => x);
const b = Float64Array.from(pairs, ([, y]) => y);

test.each([
  'a + b * 2 - 7',
  'a / b',
  '1 / (1 / a)',
  'a ^ b',
  'a ^ -1',
  '-a * fixed',
  'exp(a) + log(b)',
  'sqrt(a) * sqrt(b)',
  'min(a, b, 0.4) - max(a, 2)',
  'if a < b and not b = 0 then a / b else 7',
  'if a > 0 then log(a) else exp(b)',
  'min(1 / a, 3)',
  'a * unknown',
  '3 * 4',
  '1 / 0 + a',
])('%s', (text) => {
  const ast = read(text);
  const scope = (row: number) => (name: string) => ({ a: a[row], b: b[row], fixed: 0.7 })[name];
  const expected = Float64Array.from(pairs, (_, row) => {
    const found = evaluate(ast, scope(row), pinned);
    return found.ok ? found.value : NaN;
  });
  const found = evaluateColumns(ast, (name) => ({ a, b, fixed: 0.7 })[name], pinned, pairs.length);
  expect([...found].map((x) => (Object.is(x, -0) ? '-0' : x))).toEqual(
    [...expected].map((x) => (Object.is(x, -0) ? '-0' : x)),
  );
});
