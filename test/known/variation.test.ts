// Distributions of numbers that vary from year to year, and survivors under them, against exact values.
import { expect, test } from 'vitest';
import { distributionOf, numberAt } from '../../src/model/variation/distribution.ts';
import { betaOf } from '../../src/numeric/chance/beta.ts';
import { logitNormalMoments } from '../../src/numeric/chance/logit-normal.ts';
import { betaTable, gammaTable, tableAt } from '../../src/numeric/chance/quantile-table.ts';
import { normalBelow } from '../../src/numeric/normal.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { runReplicates } from '../kernel/collect.ts';

// Derived from the moments: a = m(m(1−m)/v − 1), b = a(1−m)/m (Morris & Doak 2002, from memory).
test('a beta distribution from mean and SD', () => {
  expect(betaOf(0.8, 0.1)).toEqual({ a: expect.closeTo(12, 10), b: expect.closeTo(3, 10) });
  expect(betaOf(0.5, 0.2)).toEqual({ a: expect.closeTo(2.625, 10), b: expect.closeTo(2.625, 10) });
  expect(betaOf(0.5, 0.5)).toBeNull();
});

// Derived: σ² = ln(1 + v/m²), μ = ln m − σ²/2.
test('a lognormal distribution from mean and SD', () => {
  const found = distributionOf('lognormal', { mean: 2, sd: 0.5 });
  expect(found).toEqual({ shape: 'lognormal', mu: expect.closeTo(0.6628349, 7), sigma: expect.closeTo(0.2462207, 7) });
});

// Derived by quadrature.
test('a logit-normal distribution from mean and SD, and back', () => {
  const moments = logitNormalMoments({ mu: 1, sigma: 0.5 });
  expect(moments.mean).toBeCloseTo(0.7205808, 6);
  expect(moments.sd ** 2).toBeCloseTo(0.0094029, 6);
  const found = distributionOf('logit-normal', { mean: 0.8, sd: 0.1 });
  expect(found).toMatchObject({ mu: expect.closeTo(1.5046073, 6), sigma: expect.closeTo(0.6474768, 6) });
});

// Derived: Beta(1, 1) is uniform, Beta(2, 1) has F(x) = x²; the gamma of shape 1 is exponential.
test('quantiles of distributions that have them in closed form, far tails included', () => {
  for (const z of [-8, -4, -1, 0, 0.5, 3, 7]) {
    const below = normalBelow(z);
    expect(numberAt({ shape: 'beta', a: 1, b: 1 }, z)).toBeCloseTo(below, 14);
    expect(numberAt({ shape: 'beta', a: 2, b: 1 }, z) / Math.sqrt(below)).toBeCloseTo(1, 11);
    expect(
      numberAt({ shape: 'gamma', k: 1, scale: 3 }, z) / (-3 * (z < 0 ? Math.log1p(-below) : Math.log(normalBelow(-z)))),
    ).toBeCloseTo(1, 9);
  }
});

test('tables keep mean and SD, also of shapes with most of their weight at the ends', () => {
  for (const [mean, sd] of [
    [0.8, 0.1],
    [0.5, 0.45],
    [0.02, 0.01],
    [0.98, 0.1],
  ] as const) {
    expectMoments(betaTable(betaOf(mean, sd)!, sd), mean, sd);
  }
  expectMoments(gammaTable({ shape: 16, scale: 0.125 }, 0.5), 2, 0.5);
  expectMoments(gammaTable({ shape: 0.25, scale: 8 }, 4), 2, 4);
});

// Held against the inversion of the distribution at every node, which is another way to the same numbers.
test.each([
  { shape: 'beta', mean: 0.8, sd: 0.1 },
  { shape: 'beta', mean: 0.999, sd: 0.001 },
  { shape: 'beta', mean: 0.3, sd: 0.4 },
  { shape: 'beta', mean: 0.9999, sd: 0.009 },
  { shape: 'gamma', mean: 2, sd: 0.5 },
  { shape: 'gamma', mean: 1, sd: 10 },
] as const)('the nodes of tables are quantiles: $shape of mean $mean and SD $sd', ({ shape, mean, sd }) => {
  const found = distributionOf(shape, { mean, sd });
  const table =
    found?.shape === 'beta' ? betaTable(found, sd) : gammaTable({ shape: (mean / sd) ** 2, scale: sd ** 2 / mean }, sd);
  const { nodes, perUnit } = table;
  const tiny = 1e-5;
  for (let i = 0; 2 * i < nodes.length; i++) {
    const z = i / perUnit - 9;
    expect(Math.abs(nodes[2 * i]! - numberAt(found!, z)) / sd).toBeLessThan(1e-8);
    const slope = (numberAt(found!, z + tiny) - numberAt(found!, z - tiny)) / (2 * tiny);
    expect(Math.abs(nodes[2 * i + 1]! * perUnit - slope) / sd).toBeLessThan(2e-5 * (1 + slope / sd));
  }
});

function expectMoments(table: ReturnType<typeof betaTable>, mean: number, sd: number): void {
  let [weights, sum, squares] = [0, 0, 0];
  for (let z = -9; z <= 9; z += 1 / 128) {
    const weight = Math.exp((-z * z) / 2);
    const x = tableAt(table, z);
    weights += weight;
    sum += weight * x;
    squares += weight * x * x;
  }
  expect(Math.abs(sum / weights - mean)).toBeLessThan(1e-7 * sd);
  expect(Math.abs(Math.sqrt(squares / weights - (sum / weights) ** 2) - sd)).toBeLessThan(1e-6 * sd);
}

// Derived by the law of total variance: n = 20, p ~ Beta(12, 3): mean 16, variance 20·0.16 + 20·19·0.01 = 7.
test('survivors of 20 whose survival varies have the variance of both chances', () => {
  const { image } = compileText(`skein: 1
study: { title: Total variance }
years: 1
patches: [{ name: A }]
counts: females
classes: [adult]
oldest: open-ended
survival: { adult: 0.8 }
year: [count, survival]
variation: { survival: { adult: { sd: 0.1 } } }
start: { table: { A: { adult: 20 } } }
`);
  const replicates = 60_000;
  const { counts, columns } = runReplicates(image, { replicates, steps: 1, seed: 5 });
  const survivors = counts.slice(columns * replicates, (columns + 1) * replicates);
  const mean = survivors.reduce((a, b) => a + b, 0) / replicates;
  const squares = survivors.map((n) => (n - 16) ** 2);
  const variance = squares.reduce((a, b) => a + b, 0) / replicates;
  const spread = Math.sqrt(squares.reduce((a, b) => a + (b - variance) ** 2, 0) / replicates);
  expect(Math.abs(mean - 16)).toBeLessThan(5.5 * Math.sqrt(7 / replicates));
  expect(Math.abs(variance - 7)).toBeLessThan((5.5 * spread) / Math.sqrt(replicates));
});
