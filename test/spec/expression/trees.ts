// Arbitrary expressions over x, y and z for property tests.
import fc from 'fast-check';
import type { Ast, Truth } from '../../../src/spec/expression/ast.ts';

const span = { offset: 0, length: 0 };

const leaf: fc.Arbitrary<Ast> = fc.oneof(
  fc.constantFrom(0, 0.25, 0.5, 1, 2, 3, 1e-7, 1.5e21).map((value): Ast => ({ kind: 'number', value, span })),
  fc.constantFrom('x', 'y', 'z').map((name): Ast => ({ kind: 'name', name, span })),
);

export const anyTree: fc.Arbitrary<Ast> = fc.letrec<{ number: Ast; truth: Truth }>((tie) => ({
  number: fc.oneof(
    { depthSize: 'small', withCrossShrink: true },
    leaf,
    fc.record({ kind: fc.constant('negate' as const), of: tie('number'), span: fc.constant(span) }),
    fc.record({
      kind: fc.constant('arithmetic' as const),
      sign: fc.constantFrom('+', '-', '*', '/', '^' as const),
      left: tie('number'),
      right: tie('number'),
      span: fc.constant(span),
    }),
    fc.record({
      kind: fc.constant('call' as const),
      function: fc.constantFrom('exp', 'log', 'sqrt' as const),
      of: tie('number'),
      span: fc.constant(span),
    }),
    fc.record({
      kind: fc.constant('extreme' as const),
      pick: fc.constantFrom('min', 'max' as const),
      of: fc.array(tie('number'), { minLength: 2, maxLength: 3 }),
      span: fc.constant(span),
    }),
    fc.record({
      kind: fc.constant('if' as const),
      condition: tie('truth'),
      then: tie('number'),
      otherwise: tie('number'),
      span: fc.constant(span),
    }),
  ),
  truth: fc.oneof(
    { depthSize: 'small', withCrossShrink: true },
    fc.record({
      kind: fc.constant('compare' as const),
      sign: fc.constantFrom('<', '<=', '>', '>=', '=', '!=' as const),
      left: tie('number'),
      right: tie('number'),
      span: fc.constant(span),
    }),
    fc.record({ kind: fc.constant('not' as const), of: tie('truth'), span: fc.constant(span) }),
    fc.record({
      kind: fc.constantFrom('and', 'or' as const),
      left: tie('truth'),
      right: tie('truth'),
      span: fc.constant(span),
    }),
  ),
})).number;
