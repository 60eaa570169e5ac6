// A printed expression reads back to the same tree, with no bracket more than it needs.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { printExpression } from '../../../src/spec/expression/print.ts';
import { bare, read } from './reading.ts';
import { anyTree } from './trees.ts';

test('any tree comes back from its text', () => {
  fc.assert(
    fc.property(anyTree, (tree) => {
      expect(bare(read(printExpression(tree)))).toEqual(bare(tree));
    }),
    { seed: 4201, numRuns: 1500 },
  );
});

const spared: readonly (readonly [string, string])[] = [
  ['((a + (b * c)))', 'a + b * c'],
  ['(a + b) * c', '(a + b) * c'],
  ['a - (b - c)', 'a - (b - c)'],
  ['(a - b) - c', 'a - b - c'],
  ['a^(b^c)', 'a^b^c'],
  ['(a^b)^c', '(a^b)^c'],
  ['-(a^2)', '-a^2'],
  ['(-a)^2', '(-a)^2'],
  ['a*(-b)', 'a * -b'],
  ['if (a<b) and (not (b<c)) then (1) else (2+3)', 'if a < b and not b < c then 1 else 2 + 3'],
];

test.each(spared)('%s is printed as %s', (text, printed) => {
  expect(printExpression(read(text))).toBe(printed);
});
