// What is printed of matrices, or follows from them, for single populations.
import { describe, expect, test } from 'vitest';
import { generationTimes, lifetimes, nextGeneration } from '../../src/analysis/life-history.ts';
import { findRoot } from '../../src/numeric/root.ts';
import { leading } from '../../src/numeric/leading.ts';
import { multiply } from '../../src/numeric/sparse-product.ts';
import { entryAt, sparseFromRows } from '../../src/numeric/sparse.ts';
import { bernardelli, killerWhale, loggerhead, teasel, williamson } from '../numeric/published.ts';
import { analysed, split } from './analysed.ts';

describe('loggerhead turtle (Crouse, Crowder & Caswell 1987; values recomputed from its matrix)', () => {
  const { found, vectors, spectrum: all, E } = analysed(loggerhead);
  const parts = split(loggerhead);
  const next = nextGeneration(parts)!;

  test('settles by a factor of 1.218 a year in waves of 22.6 years', () => {
    expect(all.dampingRatio).toBeCloseTo(1.217837, 6);
    expect(all.oscillationSteps).toBeCloseTo(22.5906, 4);
    expect(all.eigenvalues[1]!.re).toBeCloseTo(0.7461702, 6);
    expect(Math.abs(all.eigenvalues[1]!.im)).toBeCloseTo(0.2130565, 6);
  });

  test('elasticities: 5 % young, 67 % staying, 28 % growing on', () => {
    const young = E(1, 5) + E(1, 6) + E(1, 7);
    const staying = E(2, 2) + E(3, 3) + E(4, 4) + E(7, 7);
    const growing = [1, 2, 3, 4, 5, 6].reduce((sum, c) => sum + E(c + 1, c), 0);
    expect(young).toBeCloseTo(0.051, 5);
    expect(staying).toBeCloseTo(0.66741, 5);
    expect(growing).toBeCloseTo(0.28159, 5);
  });

  test('net reproductive rate, generation times, life expectancy', () => {
    const times = generationTimes(parts, vectors, next);
    expect(next.netRate).toBeCloseTo(0.3660585, 7);
    expect(times.stable).toBeCloseTo(19.60706, 5);
    expect(times.replacement).toBeCloseTo(17.77512, 5);
    expect(lifetimes(parts.fates)!.expectancy[0]).toBeCloseTo(3.955401, 6);
  });

  test('needs its rates raised 5.8 % to stand still', () => {
    expect(1 / found.growthRate).toBeCloseTo(1.0581664, 7);
  });
});

describe('killer whale (Brault & Caswell 1993; values recomputed from its matrix)', () => {
  const { found, vectors, spectrum: all, E } = analysed(killerWhale);
  const parts = split(killerWhale);

  test('elasticities', () => {
    expect(E(2, 2)).toBeCloseTo(0.336326, 6);
    expect(E(3, 3)).toBeCloseTo(0.538563, 6);
    expect(E(2, 1)).toBeCloseTo(0.042208, 6);
    expect(E(3, 2)).toBeCloseTo(0.040695, 6);
    expect(E(1, 3)).toBeCloseTo(0.040695, 6);
    expect(E(1, 2)).toBeCloseTo(0.001513, 6);
    expect(E(4, 4)).toBe(0);
  });

  test('all eigenvalues, over both blocks', () => {
    const expected = [1.025441, 0.9804, 0.834223, 0.004836];
    expected.forEach((value, k) => expect(all.eigenvalues[k]!.re).toBeCloseTo(value, 6));
  });

  test('life history', () => {
    const next = nextGeneration(parts)!;
    expect(next.netRate).toBeCloseTo(2.013144, 6);
    expect(generationTimes(parts, vectors, next).stable).toBeCloseTo(23.69205, 5);
    const { expectancy } = lifetimes(parts.fates)!;
    [69.41056, 69.98523, 70.94683, 51.02041].forEach((value, i) => expect(expectancy[i]).toBeCloseTo(value, 5));
  });

  test('bears a proportional harvest of 2.5 % at most', () => {
    expect(1 - 1 / found.growthRate).toBeCloseTo(0.0248101, 7);
  });
});

describe('three ages with a defective second eigenvalue (from memory of Williamson 1959)', () => {
  const { spectrum: all, E } = analysed(williamson);

  test('damping 2 and elasticities in ninths', () => {
    expect(all.dampingRatio).toBeCloseTo(2, 6);
    expect(all.oscillationSteps).toBeCloseTo(2, 3);
    expect([E(1, 2), E(1, 3), E(2, 1), E(3, 2)].map((value) => value * 9)).toEqual(
      [3, 1, 4, 1].map((value) => expect.closeTo(value, 10) as number),
    );
  });

  test('its first five years', () => {
    const matrix = sparseFromRows(williamson);
    let animals: Float64Array = Float64Array.of(1, 1, 1);
    const years = [1, 2, 3, 4, 5].map(() => (animals = multiply(matrix, animals)));
    const expected = [
      [21, 1 / 3, 1 / 2],
      [9, 7, 1 / 6],
      [65, 3, 3.5],
      [69, 65 / 3, 1.5],
      [213, 23, 65 / 6],
    ];
    expected.forEach((year, t) => year.forEach((value, i) => expect(years[t]![i]).toBeCloseTo(value, 10)));
  });
});

test('breeding once keeps its waves for ever: damping 1, back after three years (from memory of Bernardelli 1941)', () => {
  const { spectrum: all } = analysed(bernardelli);
  const matrix = sparseFromRows(bernardelli);
  expect(all.dampingRatio).toBe(1);
  expect(all.oscillationSteps).toBeCloseTo(3, 10);
  const back = multiply(matrix, multiply(matrix, multiply(matrix, Float64Array.of(5, 7, 9))));
  [5, 7, 9].forEach((value, i) => expect(back[i]).toBeCloseTo(value, 12));
});

test('teasel: damping, and what one wrong entry does (from memory of Caswell 2001)', () => {
  expect(analysed(teasel).spectrum.dampingRatio).toBeCloseTo(1.315313, 6);
  const slipped = teasel.map((row, i) => row.map((value, j) => (i === 4 && j === 2 ? 0 : value)));
  expect(leading(sparseFromRows(slipped)).growthRate).toBeCloseTo(2.32188, 5);
});

test('northern spotted owl: growth by the characteristic equation and by the matrix (Lande 1988; derived)', () => {
  const growth = (s0: number): number => {
    const equation = (x: number): number => x ** 3 * (1 - 0.942 / x) - s0 * 0.71 * 0.942 * 0.24;
    return findRoot(equation, { low: 0.943, high: 1.2 })!;
  };
  expect(growth(0.108)).toBeCloseTo(0.96078003, 8);
  const h = 1e-6;
  expect((growth(0.108 + h) - growth(0.108 - h)) / (2 * h)).toBeCloseTo(0.167347, 5);
  const matrix = sparseFromRows([
    [0, 0, 0.942 * 0.24],
    [0.108, 0, 0],
    [0, 0.71, 0.942],
  ]);
  expect(leading(matrix).growthRate).toBeCloseTo(0.96078003, 8);
  expect(entryAt(matrix, 0, 2)).toBeCloseTo(0.22608, 12);
});
