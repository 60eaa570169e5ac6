// Global sensitivity against closed forms.
import { expect, test } from 'vitest';
import { openDesign, type DesignPlan } from '../../src/sweep/design/design.ts';
import type { Factor } from '../../src/sweep/design/factor.ts';
import { shareOf, wordOf } from '../../src/sweep/design/hash.ts';
import { noiseShare, type Observed } from '../../src/sweep/sensitivity/observed.ts';
import { partialRankCorrelations } from '../../src/sweep/sensitivity/rank-correlation.ts';
import { screening } from '../../src/sweep/sensitivity/screening.ts';
import { sharesOfVariance } from '../../src/sweep/sensitivity/shares-of-variance.ts';

function ranged(count: number, from: number, to: number): readonly Factor[] {
  return Array.from({ length: count }, (_, i) => ({
    name: `x${i + 1}`,
    base: from,
    range: { by: 'from to', from, to, scale: 'even', steps: 5 },
  }));
}

/** Normal noise from the hash, by Box and Muller. */
function noiseAt(half: number, point: number): number {
  const [u, v] = [shareOf(wordOf(99, half, point, 1)), shareOf(wordOf(99, half, point, 2))];
  return Math.sqrt(-2 * Math.log(u)) * Math.cos(2 * Math.PI * v);
}

function observe(plan: DesignPlan, f: (x: readonly number[]) => number, noise = 0): Observed {
  const design = openDesign(plan);
  const values = Float64Array.from({ length: design.size }, (_, i) => f(design.at(i).map(Number)));
  if (noise === 0) return { first: values, second: values };
  const half = (which: number) => values.map((value, i) => value + noise * noiseAt(which, i));
  return { first: half(1), second: half(2) };
}

function ishigami(b: number) {
  return ([x = 0, y = 0, z = 0]: readonly number[]): number =>
    Math.sin(x) + 7 * Math.sin(y) ** 2 + b * z ** 4 * Math.sin(x);
}

// Ishigami & Homma 1990; indices from the closed form (derived): for a = 7 and b = 0.1 often printed as .3139, .4424, 0 (from memory).
test.each([
  [0.1, 13.8445879, [0.3139052, 0.4424111, 0], [0.5575889, 0.4424111, 0.2436837]],
  [0.05, 8.9169424, [0.2185186, 0.6868947, 0], [0.3131053, 0.6868947, 0.0945868]],
])('shares of variance of the Ishigami function, b = %f', (b, variance, first, total) => {
  const plan: DesignPlan = { design: 'sobol indices', factors: ranged(3, -Math.PI, Math.PI), points: 16384, seed: 2 };
  const found = sharesOfVariance(observe(plan, ishigami(b)), 3);
  expect(found?.rows).toBe(16384);
  expect(Math.abs((found?.variance ?? 0) / variance - 1)).toBeLessThan(0.002);
  found?.factors.forEach((own, i) => {
    expect(Math.abs(own.first - (first[i] ?? 9))).toBeLessThan(0.0015);
    expect(Math.abs(own.firstByDifferences - (first[i] ?? 9))).toBeLessThan(0.0015);
    expect(Math.abs(own.total - (total[i] ?? 9))).toBeLessThan(0.0015);
    expect(own.totalBand.lower).toBeLessThanOrEqual(own.total);
    expect(own.totalBand.upper).toBeGreaterThanOrEqual(own.total);
  });
});

// Sobol's g function (Saltelli & Sobol' 1995), a = 0, 1, 4.5, 9, 99, 99, 99, 99; numbers derived from V_i = 1 / (3 (1 + a_i)²).
test("shares of variance of Sobol's g function", () => {
  const a = [0, 1, 4.5, 9, 99, 99, 99, 99];
  const g = (x: readonly number[]) =>
    x.reduce((product, xi, i) => (product * (Math.abs(4 * xi - 2) + (a[i] ?? 0))) / (1 + (a[i] ?? 0)), 1);
  const plan: DesignPlan = { design: 'sobol indices', factors: ranged(8, 0, 1), points: 16384, seed: 4 };
  const found = sharesOfVariance(observe(plan, g), 8);
  const first = [0.716192, 0.179048, 0.023676, 0.007162, 0.000072];
  const total = [0.787144, 0.242198, 0.034317, 0.01046, 0.000105];
  first.forEach((value, i) => {
    expect(Math.abs((found?.factors[i]?.first ?? 9) - value)).toBeLessThan(0.003);
  });
  total.forEach((value, i) => {
    expect(Math.abs((found?.factors[i]?.total ?? 9) - value)).toBeLessThan(0.003);
  });
});

test('noise of replicates is told apart from effect', () => {
  const factors = ranged(3, 0, 1);
  const plan: DesignPlan = { design: 'sobol indices', factors, points: 8192, seed: 2 };
  // 3x − 2y has variance (9 + 4) / 12 and shares 9/13, 4/13; noise of the halves has variance 1.
  const noisy = observe(plan, ([x = 0, y = 0]) => 3 * x - 2 * y, 1);
  const found = sharesOfVariance(noisy, 3);
  expect(found?.variance).toBeCloseTo(13 / 12, 1);
  [9 / 13, 4 / 13, 0].forEach((value, i) => {
    expect(Math.abs((found?.factors[i]?.total ?? 9) - value)).toBeLessThan(0.06);
    expect(Math.abs((found?.factors[i]?.first ?? 9) - value)).toBeLessThan(0.06);
  });
  expect(noiseShare(noisy)).toBeCloseTo(0.5 / (0.5 + 13 / 12), 1);
  expect(noiseShare(observe(plan, ([x = 0]) => x))).toBe(0);
});

test('screening of a line finds its slopes and no spread', () => {
  const plan: DesignPlan = { design: 'morris', factors: ranged(3, 0, 1), points: 20, seed: 1 };
  const found = screening(
    observe(plan, ([x = 0, y = 0]) => 3 * x - 2 * y),
    3,
    1,
  );
  [
    [3, 3],
    [2, -2],
    [0, 0],
  ].forEach(([size = 9, mean = 9], i) => {
    expect(Math.abs((found[i]?.meanSize ?? 9) - size)).toBeLessThan(1e-12);
    expect(Math.abs((found[i]?.mean ?? 9) - mean)).toBeLessThan(1e-12);
    expect(found[i]?.spread ?? 9).toBeLessThan(1e-12);
    expect(found[i]?.noise).toBe(0);
  });
});

test('a failed point costs its own row or walk only', () => {
  const plan: DesignPlan = { design: 'sobol indices', factors: ranged(2, 0, 1), points: 256, seed: 1 };
  const { first } = observe(plan, ([x = 0, y = 0]) => x + y);
  first[7] = NaN;
  expect(sharesOfVariance({ first, second: first }, 2)).toMatchObject({ rows: 255, failedRows: 1 });
});

test('a measure that rises or falls with its only factor has a partial rank correlation of 1 or −1', () => {
  const x = Float64Array.from({ length: 50 }, (_, i) => shareOf(wordOf(1, i)));
  expect(
    partialRankCorrelations(
      [x],
      x.map((value) => Math.exp(value)),
    )[0]?.correlation,
  ).toBe(1);
  expect(
    partialRankCorrelations(
      [x],
      x.map((value) => -(value ** 3)),
    )[0]?.correlation,
  ).toBe(-1);
});

test('partial rank correlations agree with correlations of residuals, and leave out what does not vary', () => {
  const n = 400;
  const at = (k: number) => Float64Array.from({ length: n }, (_, i) => shareOf(wordOf(5, k, i)));
  const [x, y, noise] = [at(1), at(2), at(3)];
  const both = y.map((value, i) => value + (x[i] ?? 0));
  const measure = both.map((value, i) => value + 2 * (x[i] ?? 0) + (noise[i] ?? 0));
  const [ofX, ofBoth, constant] = partialRankCorrelations([x, both, new Float64Array(n)], measure);
  expect(constant).toBeNull();
  const ranks = (values: Float64Array) => values.map((value) => values.filter((other) => other < value).length);
  const residual = (of: Float64Array, by: Float64Array) => {
    const [a, b] = [ranks(of), ranks(by)];
    const mean = (values: Float64Array) => values.reduce((s, v) => s + v, 0) / n;
    const [ma, mb] = [mean(a), mean(b)];
    const slope =
      a.reduce((s, v, i) => s + (v - ma) * ((b[i] ?? 0) - mb), 0) / b.reduce((s, v) => s + (v - mb) ** 2, 0);
    return a.map((v, i) => v - ma - slope * ((b[i] ?? 0) - mb));
  };
  const correlation = (a: Float64Array, b: Float64Array) =>
    a.reduce((s, v, i) => s + v * (b[i] ?? 0), 0) /
    Math.sqrt(a.reduce((s, v) => s + v * v, 0) * b.reduce((s, v) => s + v * v, 0));
  expect(ofX?.correlation).toBeCloseTo(correlation(residual(measure, both), residual(x, both)), 8);
  expect(ofBoth?.correlation).toBeCloseTo(correlation(residual(measure, x), residual(both, x)), 8);
  expect(ofX?.band.lower).toBeLessThan(ofX?.correlation ?? 0);
});
