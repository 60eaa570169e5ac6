// Life cycles that analyses easily get wrong: a class past breeding, breeding once, one-way ways, groups apart, late primitivity, births all year.
import { describe, expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { leading } from '../../src/numeric/leading.ts';
import { product } from '../../src/numeric/sparse-product.ts';
import { sparseFromRows } from '../../src/numeric/sparse.ts';
import { compileModel } from '../golden/models.ts';

const analysed = (name: string) => analyseModel(compileModel(name), { at: 'zero' }).value!;

test('a class past breeding is worth nothing, and growth does not depend on it', () => {
  const found = analysed('past-breeding');
  expect([found.irreducible, found.primitive, found.blocks.length]).toEqual([false, false, 2]);
  const old = found.reproductiveValue!.find((one) => one.class === 'old cow')!;
  expect(old.value).toBe(0);
  const onIt = found.entries!.filter((one) => one.to.class === 'old cow' || one.from.class === 'old cow');
  expect(onIt.map(({ elasticity }) => elasticity)).toEqual([0, 0]);
  expect(found.stableDistribution!.find((one) => one.class === 'old cow')!.share).toBeGreaterThan(0.05);
  // Derived: those past breeding live on as before, one in ten dying each year.
  expect(found.lifetimes!.find((one) => one.class === 'old cow')!.expectancy).toBeCloseTo(10, 9);
});

test('breeding once at three: a period of three, a growth that is the cube root of a life, no approximation of chance', () => {
  const found = analysed('breeds-once');
  expect([found.irreducible, found.primitive, found.imprimitivity]).toEqual([true, false, 3]);
  expect(found.growthRate).toBeCloseTo(Math.cbrt(7.5 * 0.36 * 0.42), 9);
  expect(found.transients!.lasting).toBeNull();
  expect(found.cautions.join(' ')).toMatch(/multiple of 3 years/);
});

test('young that only drift down: each reach feeds the ones below it, and only the highest decides the growth', () => {
  const found = analysed('one-way');
  expect(found.blocks.map(({ states, feeds }) => [states[0]!.patch, feeds.length])).toEqual([
    ['Headwater', 1],
    ['Middle reach', 1],
    ['Mill pool', 0],
  ]);
  expect(found.growthRate).toBe(found.blocks[0]!.growthRate);
  const values = found.reproductiveValue!.map(({ patch, value }) => [patch, value > 0]);
  expect(values).toEqual([
    ['Headwater', true],
    ['Middle reach', false],
    ['Mill pool', false],
  ]);
  for (const { removalLoss, patch } of found.patches!) expect(removalLoss! > 0).toBe(patch === 'Headwater');
});

test('two groups that nobody travels between each have a growth rate of their own', () => {
  const found = analysed('two-islands');
  expect(found.irreducible).toBe(false);
  const rates = found.blocks.map(({ growthRate }) => growthRate).sort((a, b) => a - b);
  expect(rates).toHaveLength(2);
  expect(found.growthRate).toBe(rates[1]);
  expect(found.patches!.find(({ patch }) => patch === 'Skerry')!.share).toBe(0);
});

// The matrix of Wielandt (1950), from memory: the first power without a zero is the tenth, n² − 2n + 2 of n = 4.
test('a life cycle may take long to be without zeros and still settle', () => {
  const matrix = sparseFromRows([
    [0, 1, 0, 0],
    [0, 0, 1, 0],
    [0, 0, 0, 1],
    [1, 1, 0, 0],
  ]);
  let power = matrix;
  for (let k = 2; k <= 9; k++) power = product(matrix, power);
  expect(power.values.length).toBeLessThan(16);
  expect(product(matrix, power).values.length).toBe(16);
  expect(leading(matrix)).toMatchObject({ irreducible: true, primitive: true, period: 1 });
});

describe('survivors 1, 0.6, 0.4, 0.2, 0 at ages 0 to 4 (Caswell 2001, formulas from memory; growth derived)', () => {
  test('births all year: P = (l_i + l_i+1)/(l_i−1 + l_i), F = l(½)(m_i + P_i m_i+1)/2', () => {
    const [l, m] = [
      [1, 0.6, 0.4, 0.2, 0],
      [0, 1, 2, 1, 0],
    ];
    const survival = [1, 2, 3, 4].map((i) => (l[i]! + (l[i + 1] ?? 0)) / (l[i - 1]! + l[i]!));
    const births = [0, 1, 2, 3].map((i) => (Math.sqrt(0.6) * (m[i]! + survival[i]! * m[i + 1]!)) / 2);
    [0.625, 0.6, 1 / 3].forEach((value, i) => expect(survival[i]).toBeCloseTo(value, 12));
    [0.2420615, 0.8520563, 0.9036961, 0.3872983].forEach((value, i) => expect(births[i]).toBeCloseTo(value, 7));
    const rows = [births, ...[0, 1, 2].map((i) => [0, 1, 2, 3].map((j) => (i === j ? survival[i]! : 0)))];
    expect(leading(sparseFromRows(rows)).growthRate).toBeCloseTo(1.072480582, 9);
  });

  test('births on a birthday: counted before and after them, the growth is the same', () => {
    const before = [
      [0.6, 1.2, 0.6],
      [2 / 3, 0, 0],
      [0, 0.5, 0],
    ];
    const after = [
      [0.6, 4 / 3, 0.5, 0],
      [0.6, 0, 0, 0],
      [0, 2 / 3, 0, 0],
      [0, 0, 0.5, 0],
    ];
    for (const rows of [before, after]) expect(leading(sparseFromRows(rows)).growthRate).toBeCloseTo(1.3205174101, 9);
  });
});
