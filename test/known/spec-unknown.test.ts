// The standard error of the growth from what is not known, from specs.
import { expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { estimateErrors } from '../../src/analysis/chance/estimate-errors.ts';
import { compileText } from '../pipeline/compile-text.ts';

const spec = (parameters: string, uncertainty = '') => `
skein: 1
study: { title: One fen, invented: true }
years: 10
patches: [{ name: Fen }]
counts: females
classes: [young, adult]
parameters: ${parameters}
demography: { fates: [[0, 0], [s0, s]], births: [[0, f], [0, 0]] }
year: [count, demography]
start: { table: { Fen: { young: 10, adult: 10 } } }
${uncertainty}
`;
const known =
  '{ s: { value: 0.8, uncertainty: { standard-error: 0.03 } }, s0: { value: 0.3, uncertainty: { standard-error: 0.05 } }';
const growthError = (text: string) => analyseModel(compileText(text), { at: 'zero' }).value!;

// Derived: [[0, f], [s0, s]] with s0 = 0.3 ± 0.05, s = 0.8 ± 0.03, f = 1.2 ± 0.2, independent: Var λ = 0.0040053843.
test('three numbers of a two-stage life', () => {
  const { growthStandardError } = growthError(
    spec(`${known}, f: { value: 1.2, uncertainty: { standard-error: 0.2 } } }`),
  );
  expect(growthStandardError! ** 2).toBeCloseTo(0.0040053843, 9);
});

test('a number that moves nothing adds nothing, and one without uncertainty neither', () => {
  const { growthStandardError } = growthError(
    spec(`${known}, f: 1.2, unused: { value: 4, uncertainty: { standard-error: 1 } } }`),
  );
  expect(growthStandardError! ** 2).toBeCloseTo(0.0040053843 - (0.2 * 0.20801257) ** 2, 8);
});

test('without any uncertainty there is none, and the reason says so', () => {
  const found = growthError(spec('{ s: 0.8, s0: 0.3, f: 1.5 }'));
  expect(found.growthStandardError).toBeNull();
  expect(found.reasons['growthStandardError']).toMatch(/taken as known/);
});

// Derived: correlated normal numbers have just the given correlation; lognormals e^(σ²r) − 1 over e^σ² − 1.
test('correlations are those of the numbers, not of the normals behind them', () => {
  const uncertainty = 'uncertainty: { correlations: { a: { b: 0.6 }, c: { d: 0.6 } } }';
  const text = spec(
    `{ s: 0.8, s0: 0.3, f: 1.5, a: { value: 4, uncertainty: { standard-error: 2, as: number } }, b: { value: 3, uncertainty: { standard-error: 1, as: number } },
       c: { value: 4, uncertainty: { standard-error: 2 } }, d: { value: 8, uncertainty: { standard-error: 4 } } }`,
    uncertainty,
  );
  const { names, covariance } = estimateErrors(compileText(text).model.uncertainty!)!;
  const at = (left: string, right: string) =>
    covariance.values[names.indexOf(left) * names.length + names.indexOf(right)];
  expect(at('a', 'b')).toBeCloseTo(0.6 * 2, 9);
  expect(at('c', 'd')).toBeCloseTo(4 * 8 * (1.25 ** 0.6 - 1), 6);
  expect([at('c', 'c'), at('a', 'c')]).toEqual([expect.closeTo(4, 12), 0]);
});

test('draws of the author have the covariance that they have', () => {
  const draws = 'uncertainty: { draws: [{ s: 0.7, f: 1 }, { s: 0.8, f: 2 }, { s: 0.9, f: 1.5 }] }';
  const { names, covariance } = estimateErrors(
    compileText(spec('{ s: 0.8, s0: 0.3, f: 1.5 }', draws)).model.uncertainty!,
  )!;
  expect(names).toEqual(['s', 'f']);
  [0.01, 0.025, 0.025, 0.25].forEach((value, k) => expect(covariance.values[k]).toBeCloseTo(value, 12));
});
