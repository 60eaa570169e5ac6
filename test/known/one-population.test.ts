import { describe, expect, test } from 'vitest';
import { generationTimes, lifetimes, netReproductiveRate, nextGeneration } from '../../src/analysis/life-history.ts';
import { sensitivityAlong, vectorsOf } from '../../src/analysis/sensitivity.ts';
import { spectrum } from '../../src/analysis/spectrum.ts';
import { growthStandardError } from '../../src/analysis/growth-error.ts';
import { leading } from '../../src/numeric/leading.ts';
import { sparseFromRows } from '../../src/numeric/sparse.ts';
import { ageingOnly, twoStage } from '../numeric/published.ts';
import { analysed, split, type Rows } from './analysed.ts';

describe('two stages with closed forms (derived)', () => {
  const { vectors, spectrum: all, S, E } = analysed(twoStage);
  const parts = split(twoStage);

  test('sensitivities and elasticities', () => {
    expect(S(1, 2)).toBeCloseTo(0.208013, 6);
    expect(S(2, 1)).toBeCloseTo(0.83205, 6);
    expect(S(2, 2)).toBeCloseTo(0.77735, 6);
    expect(E(1, 2)).toBeCloseTo(0.22265, 6);
    expect(E(2, 1)).toBeCloseTo(0.22265, 6);
    expect(E(2, 2)).toBeCloseTo(0.5547, 6);
    expect(all.dampingRatio).toBeCloseTo(3.4913561, 7);
  });

  test('generation times under three definitions, each its own number', () => {
    const next = nextGeneration(parts)!;
    const times = generationTimes(parts, vectors, next);
    expect(next.netRate).toBeCloseTo(1.8, 12);
    expect(times.cohort).toBeCloseTo(6, 10);
    expect(times.stable).toBeCloseTo(4.4913561, 7);
    expect(times.replacement).toBeCloseTo(5.1416136, 7);
  });

  test('life expectancy and its variance', () => {
    const { expectancy, variance } = lifetimes(parts.fates)!;
    [2.5, 5].forEach((value, i) => expect(expectancy[i]).toBeCloseTo(value, 12));
    [11.25, 20].forEach((value, i) => expect(variance[i]).toBeCloseTo(value, 11));
  });

  test('the chain rule to survival, young and first-year survival, against differences', () => {
    const [youngSurvival, survival, young] = [0.3, 0.8, 1.5];
    const build = (s0: number, s: number, f: number) =>
      sparseFromRows([
        [0, s * f],
        [s0, s],
      ]);
    const along = (rows: Rows): number => sensitivityAlong(sparseFromRows(rows), vectors);
    const found = [
      along([
        [0, young],
        [0, 1],
      ]),
      along([
        [0, survival],
        [0, 0],
      ]),
      along([
        [0, 0],
        [1, 0],
      ]),
    ];
    [1.089369, 0.1664101, 0.8320503].forEach((value, k) => expect(found[k]).toBeCloseTo(value, 7));
    const values = [survival, young, youngSurvival];
    const elasticities = found.map((value, k) => (value * values[k]!) / vectors.growthRate);
    expect(elasticities.reduce((sum, value) => sum + value, 0)).toBeCloseTo(1.2226499, 7);
    const h = 1e-6;
    const grown = (s0: number, s: number, f: number): number => leading(build(s0, s, f)).growthRate;
    const byDifference = (grown(0.3, 0.8 + h, 1.5) - grown(0.3, 0.8 - h, 1.5)) / (2 * h);
    expect(found[0]).toBeCloseTo(byDifference, 8);
  });

  test('standard error of the growth from those of three entries', () => {
    const sensitivities = Float64Array.of(S(2, 1), S(2, 2), S(1, 2));
    const errors = [0.05, 0.03, 0.2];
    const values = Float64Array.from({ length: 9 }, (_, k) => (k % 4 === 0 ? errors[k / 4]! ** 2 : 0));
    const error = growthStandardError(sensitivities, { rows: 3, columns: 3, values });
    expect(error).toBeCloseTo(0.0632881, 7);
    expect(error ** 2).toBeCloseTo(0.0040053843, 8);
  });
});

test('the Fibonacci matrix has the golden ratio in everything (analytic)', () => {
  const {
    found,
    spectrum: all,
    S,
  } = analysed([
    [1, 1],
    [1, 0],
  ]);
  const golden = (1 + Math.sqrt(5)) / 2;
  expect(found.growthRate).toBeCloseTo(golden, 14);
  expect(found.right![0]).toBeCloseTo(1 / golden, 14);
  expect(found.left![1]).toBeCloseTo(1 / golden, 14);
  expect([S(1, 1), S(1, 2)].map((value) => value.toFixed(6))).toEqual(['0.723607', '0.447214']);
  expect(all.dampingRatio).toBeCloseTo(golden * golden, 10);
});

test('pure ageing: nobody is replaced, and nothing is divided by a growth of 0', () => {
  const parts = split(ageingOnly);
  const matrix = sparseFromRows(ageingOnly);
  expect(netReproductiveRate(parts)).toBe(0);
  expect(vectorsOf(leading(matrix))).toBeNull();
  expect(spectrum(matrix, leading(matrix))).toMatchObject({ dampingRatio: null, oscillationSteps: null });
  expect([...lifetimes(parts.fates)!.expectancy]).toEqual([4, 3, 2, 1]);
});

describe('breeding early against breeding often (from memory of Cole 1954)', () => {
  const perennial = (alpha: number, births: number): number[][] =>
    Array.from({ length: alpha }, (_, i) =>
      Array.from({ length: alpha }, (_unused, j) => {
        if (i === 0 && j === alpha - 1) return births;
        return j === i - 1 || (i === alpha - 1 && j === i) ? 1 : 0;
      }),
    );

  test('an annual with b + 1 young equals an immortal with b', () => {
    expect(leading(sparseFromRows([[4]])).growthRate).toBe(4);
    expect(leading(sparseFromRows([[3 + 1]])).growthRate).toBe(leading(sparseFromRows([[1 + 3]])).growthRate);
  });

  test('first breeding later needs b = λ^(α−1)(λ − 1)', () => {
    expect(leading(sparseFromRows(perennial(2, 2))).growthRate).toBeCloseTo(2, 13);
    expect(leading(sparseFromRows(perennial(3, 4))).growthRate).toBeCloseTo(2, 13);
    expect(leading(sparseFromRows(perennial(5, 1.1 ** 4 * 0.1))).growthRate).toBeCloseTo(1.1, 13);
  });
});

describe('one life table, counted before and after breeding (derived)', () => {
  const growth = (rows: number[][]): number => leading(sparseFromRows(rows)).growthRate;
  const expected = 1.1567791752841;

  test('three codings agree', () => {
    expect(
      growth([
        [0.1, 0.375, 0.6],
        [0.6, 0, 0],
        [0, 0.85, 0.85],
      ]),
    ).toBeCloseTo(expected, 10);
    expect(
      growth([
        [0.1, 0.9, 2.04, 2.04],
        [0.25, 0, 0, 0],
        [0, 0.6, 0, 0],
        [0, 0, 0.85, 0.85],
      ]),
    ).toBeCloseTo(expected, 10);
    expect(
      growth([
        [0.1, 0.9, 2.04],
        [0.25, 0, 0],
        [0, 0.6, 0.85],
      ]),
    ).toBeCloseTo(expected, 10);
  });

  test('two classic mistakes show', () => {
    expect(
      growth([
        [0.4, 1.5, 2.4],
        [0.6, 0, 0],
        [0, 0.85, 0.85],
      ]),
    ).toBeCloseTo(1.7278478543, 9);
    expect(
      growth([
        [0.1, 0.9, 2.04],
        [0.25, 0, 0],
        [0, 0.6, 0],
      ]),
    ).toBeCloseTo(0.8238915373, 9);
  });
});

test('a life of one class with survival 0.8 lasts 5 steps with variance 20 (analytic)', () => {
  const found = lifetimes(sparseFromRows([[0.8]]))!;
  expect(found.expectancy[0]).toBeCloseTo(5, 12);
  expect(found.variance[0]).toBeCloseTo(20, 11);
  expect(lifetimes(sparseFromRows([[1]]))).toBeNull();
});
