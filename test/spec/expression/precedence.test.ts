// Expressions mean what the same signs mean in mathematics.
import { expect, test } from 'vitest';
import { parseExpression } from '../../../src/spec/expression/parse.ts';
import { namesIn } from '../../../src/spec/expression/names.ts';
import { read, valueOf } from './reading.ts';

// Worked by hand from the usual conventions of algebra.
const values: readonly (readonly [string, number])[] = [
  ['-2^2', -4],
  ['(-2)^2', 4],
  ['2^3^2', 512],
  ['2^-1', 0.5],
  ['2^-1*4', 2],
  ['2^-2^2', 0.0625],
  ['-2^-2', -0.25],
  ['8 - 3 - 2', 3],
  ['8 / 4 / 2', 1],
  ['8 / 4 * 2', 4],
  ['2 + 3 * 4^2', 50],
  ['-3 * -2', 6],
  ['3 - -2', 5],
  ['--2', 2],
  ['.5 + 1e-1 + 2E+0', 2.6],
  ['6 × 2 ÷ 4 − 1 · 2', 1],
  ['min(3, 1, 2) + max(3, 1, 2)', 4],
  ['sqrt(9) + exp(0) + log(1)', 4],
  ['if 1 < 2 then 10 else 20', 10],
  ['if 1 >= 2 then 10 else 20 + 1', 21],
  ['1 + (if 2 = 2 then 10 else 20) * 2', 21],
  ['if 1 < 2 and 2 < 1 or 3 == 3 then 1 else 0', 1],
  ['if not 1 < 2 and 2 < 1 then 1 else 0', 0],
  ['if not (1 < 2 and 2 < 1) then 1 else 0', 1],
  ['if 3 < 2 or 1 ≤ 1 and 1 ≠ 2 then 1 else 0', 1],
  ['if 1 > 2 then 1 else if 2 > 1 then 2 else 3', 2],
  ['if 0 = 0 then 1 else 1 / 0', 1],
  ['if 1 = 0 and 1 / 0 > 0 then 1 else 2', 2],
];

test.each(values)('%s is %d', (text, value) => {
  expect(valueOf(read(text))).toBeCloseTo(value, 14);
});

test('a plain number is an expression, a negative one too', () => {
  const parsed = parseExpression(-0.5);
  expect(parsed.ok && valueOf(parsed.ast)).toBe(-0.5);
});

test('names are told once each in the order of their use', () => {
  expect(namesIn(read('b * a + if year > b then min(c, a) else größe_2'))).toEqual(['b', 'a', 'year', 'c', 'größe_2']);
});
