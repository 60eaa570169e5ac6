// Derivatives are exact: against closed forms, and against differences of the expression itself.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Ast } from '../../../src/spec/expression/ast.ts';
import { derivative } from '../../../src/spec/expression/derivative.ts';
import { printExpression } from '../../../src/spec/expression/print.ts';
import { evaluated, read, valueOf, type Names } from './reading.ts';
import { anyTree } from './trees.ts';

// Derived by hand.
const closedForms: readonly (readonly [string, string, number])[] = [
  ['3', '0', 2],
  ['y', '0', 2],
  ['x^3', '3 * x^2', 2],
  ['x^x', 'x^x * (log(x) + 1)', 1.5],
  ['2^x', '2^x * log(2)', 1.5],
  ['0^x', '0', 1.5],
  ['1 / x', '-1 / x^2', 2],
  ['x / (1 + x)', '1 / (1 + x)^2', 2],
  ['exp(-x^2)', '-2 * x * exp(-x^2)', 0.7],
  ['log(1 + x^2)', '2 * x / (1 + x^2)', 0.7],
  ['sqrt(x)', '1 / (2 * sqrt(x))', 2],
  ['min(x^2, 9)', '2 * x', 2],
  ['min(x^2, 9)', '0', 4],
  ['max(1, x, x^2)', '2 * x', 2],
  ['max(1, x, x^2)', '0', 0.5],
  ['if x > 1 then x^2 else 5 * x', '5', 0.5],
  ['if x > 1 then x^2 else 5 * x', '2 * x', 3],
];

test.each(closedForms)('the derivative of %s is %s at %d', (text, by, x) => {
  const names = { x, y: 0.4 };
  expect(valueOf(derivative(read(text), 'x'), names)).toBeCloseTo(valueOf(read(by), names), 13);
});

test('what does not depend on the name drops out', () => {
  expect(printExpression(derivative(read('a * x + exp(b) * 3 + c^2'), 'x'))).toBe('a');
});

const step = 1e-5;

/** Central difference, or undefined where the expression is undefined, steep or bent near the point. */
function difference(tree: Ast, names: Names & { readonly x: number }): number | undefined {
  const at = (x: number): number => {
    const result = evaluated(tree, { ...names, x });
    return result.ok ? result.value : NaN;
  };
  const central = (h: number): number => (at(names.x + h) - at(names.x - h)) / (2 * h);
  const [fine, coarse] = [central(step), central(2 * step)];
  const [left, right] = [at(names.x) - at(names.x - step), at(names.x + step) - at(names.x)];
  const smooth = Math.abs(fine - coarse) < 1e-6 * (1 + Math.abs(fine)) && Math.abs(left - right) < 1e-2 * step;
  return smooth && Math.abs(fine) < 100 && Math.abs(at(names.x)) < 1000 ? fine : undefined;
}

test('any derivative agrees with differences where the expression is smooth', () => {
  let compared = 0;
  const point = fc.double({ min: 0.3, max: 1.9, noNaN: true });
  fc.assert(
    fc.property(anyTree, point, point, (tree, x, y) => {
      const names = { x, y, z: 1.3 };
      const expected = difference(tree, names);
      if (expected === undefined) return;
      const exact = evaluated(derivative(tree, 'x'), names);
      if (!exact.ok) return;
      if (exact.value !== 0) compared++;
      expect(Math.abs(exact.value - expected)).toBeLessThan(1e-4 * (1 + Math.abs(expected)));
    }),
    { seed: 4202, numRuns: 3000 },
  );
  expect(compared).toBeGreaterThan(150);
});
