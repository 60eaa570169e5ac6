// What is not known as the outer loop draws it: moments of every kind of uncertainty, correlations, and which draws a further number
// leaves as they were. Bounds are 5.5 standard errors.
import { describe, expect, test } from 'vitest';
import { drawnValues } from '../../src/results/draws/plan.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { correlationBound, correlationOf, meanOf } from './weather.ts';

const draws = 20_000;

const text = (parameters: Readonly<Record<string, string>>, more = ''): string =>
  framed(`classes: [animal]
parameters: { ${Object.entries(parameters)
    .map(([name, words]) => `${name}: ${words}`)
    .join(', ')} }
survival: { animal: 0.5 }
oldest: open-ended
year: [count, survival]
start: { table: { Meadow: { animal: 10 } } }
${more}
`);

function drawn(spec: string, seed = 4): (name: string) => Float64Array {
  const { uncertainty } = compileText(spec).model;
  const rows = Array.from({ length: draws }, (_, draw) => drawnValues(uncertainty!, seed, draw));
  return (name) => Float64Array.from(rows, (row) => row[name]!);
}

function expectMoments(values: Float64Array, mean: number, variance: number): void {
  expect(Math.abs(meanOf(values) - mean)).toBeLessThan(5.5 * Math.sqrt(variance / draws));
  const squares = values.map((value) => (value - mean) ** 2);
  const spread = meanOf(squares);
  const error = Math.sqrt(meanOf(squares.map((one) => (one - spread) ** 2)) / draws);
  expect(Math.abs(spread - variance)).toBeLessThan(5.5 * error);
}

// Derived: the mean is the value and the variance that of the standard error; (high − low)²/12 of a uniform, and
// (a² + b² + c² − ab − ac − bc)/18 of a triangular distribution around (a + b + c)/3.
const kinds: Readonly<Record<string, { readonly words: string; readonly mean: number; readonly variance: number }>> = {
  'a share, beta': { words: '{ value: 0.8, uncertainty: { standard-error: 0.07 } }', mean: 0.8, variance: 0.0049 },
  'a positive number, lognormal': {
    words: '{ value: 2.5, uncertainty: { standard-error: 0.9 } }',
    mean: 2.5,
    variance: 0.81,
  },
  'any number, normal': {
    words: '{ value: -1, uncertainty: { standard-error: 0.5 } }',
    mean: -1,
    variance: 0.25,
  },
  uniform: { words: '{ value: 3, uncertainty: { uniform: [1, 7] } }', mean: 4, variance: 3 },
  triangular: {
    words: '{ value: 2, uncertainty: { triangular: [1, 6] } }',
    mean: 3,
    variance: (1 + 4 + 36 - 2 - 6 - 12) / 18,
  },
  'an interval of any number': {
    words: '{ value: 10, uncertainty: { interval: [8, 12], as: number } }',
    mean: 10,
    variance: (2 / 1.959963984540054) ** 2,
  },
};

test.each(Object.entries(kinds))('%s', (_, { words, mean, variance }) => {
  expectMoments(drawn(text({ x: words }))('x'), mean, variance);
});

test.each([
  { kind: 'share', value: 0.7, low: 0.55, high: 0.83 },
  { kind: 'positive number', value: 4, low: 2.2, high: 7 },
])('of a $kind the middle 95 % are as wide as its interval', ({ kind, value, low, high }) => {
  const words = `{ value: ${value}, uncertainty: { interval: [${low}, ${high}], as: ${kind} } }`;
  const sorted = drawn(text({ x: words }))('x').sort();
  const width = sorted[Math.floor(0.975 * draws)]! - sorted[Math.floor(0.025 * draws)]!;
  // The error of a quantile is √(p(1 − p)/n) over the density there; a tenth of the width bounds it well.
  expect(Math.abs(width / (high - low) - 1)).toBeLessThan(0.05);
  expect(Math.abs(meanOf(sorted) / value - 1)).toBeLessThan(0.02);
});

describe('correlations', () => {
  const two = {
    a: '{ value: 0.8, uncertainty: { standard-error: 0.05, as: number } }',
    b: '{ value: 2, uncertainty: { standard-error: 0.5, as: number } }',
  };

  test('are those that were given, and none where none were', () => {
    const together = drawn(text(two, 'uncertainty: { correlations: { a: { b: -0.6 } } }'));
    expect(Math.abs(correlationOf(together('a'), together('b')) + 0.6)).toBeLessThan(correlationBound(-0.6, draws));
    const apart = drawn(text(two));
    expect(Math.abs(correlationOf(apart('a'), apart('b')))).toBeLessThan(correlationBound(0, draws));
  });

  test('a further number leaves all other draws as they were, another seed none', () => {
    const more = { ...two, aa: '{ value: 1, uncertainty: { uniform: [0, 2] } }' };
    expect(drawn(text(more))('b')).toEqual(drawn(text(two))('b'));
    expect(drawn(text(two), 5)('b')).not.toEqual(drawn(text(two))('b'));
  });
});
