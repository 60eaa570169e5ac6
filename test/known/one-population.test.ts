import { describe, expect, test } from 'vitest';
import { generationTimes, lifetimes, netReproductiveRate, nextGeneration } from '../../src/analysis/life-history.ts';
import { entrySensitivities, sensitivityAlong, vectorsOf } from '../../src/analysis/sensitivity.ts';
import { spectrum } from '../../src/analysis/spectrum.ts';
import { growthStandardError } from '../../src/analysis/growth-error.ts';
import { findRoot } from '../../src/numeric/root.ts';
import { leading } from '../../src/numeric/leading.ts';
import { multiply } from '../../src/numeric/sparse-product.ts';
import { entryAt, forEachEntry, sparseFromRows } from '../../src/numeric/sparse.ts';
import {
  ageingOnly,
  bernardelli,
  killerWhale,
  loggerhead,
  teasel,
  twoStage,
  williamson,
} from '../numeric/published.ts';

type Rows = readonly (readonly number[])[];

/** Births are what the first row holds, but for the stay of the first class; the rest are fates. */
function split(rows: Rows) {
  const births = rows.map((row, i) => row.map((value) => (i === 0 ? value : 0)));
  const fates = rows.map((row, i) => row.map((value) => (i === 0 ? 0 : value)));
  return { fates: sparseFromRows(fates), births: sparseFromRows(births) };
}

function analysed(rows: Rows) {
  const matrix = sparseFromRows(rows);
  const found = leading(matrix);
  const vectors = vectorsOf(found)!;
  const { sensitivity, elasticity } = entrySensitivities(matrix, vectors);
  const at = (values: Float64Array, row: number, column: number): number => {
    let result = 0;
    forEachEntry(matrix, (i, j, _value, k) => {
      if (i === row - 1 && j === column - 1) result = values[k]!;
    });
    return result;
  };
  return {
    found,
    vectors,
    spectrum: spectrum(matrix, found)!,
    S: (row: number, column: number) => at(sensitivity, row, column),
    E: (row: number, column: number) => at(elasticity, row, column),
  };
}

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

test('pure ageing: nobody is replaced, and nothing is divided by a growth of 0', () => {
  const parts = split(ageingOnly);
  const matrix = sparseFromRows(ageingOnly);
  expect(netReproductiveRate(parts)).toBe(0);
  expect(vectorsOf(leading(matrix))).toBeNull();
  expect(spectrum(matrix, leading(matrix))).toMatchObject({ dampingRatio: null, oscillationSteps: null });
  expect([...lifetimes(parts.fates)!.expectancy]).toEqual([4, 3, 2, 1]);
});

test('teasel: damping, and what one wrong entry does (from memory of Caswell 2001)', () => {
  expect(analysed(teasel).spectrum.dampingRatio).toBeCloseTo(1.315313, 6);
  const slipped = teasel.map((row, i) => row.map((value, j) => (i === 4 && j === 2 ? 0 : value)));
  expect(leading(sparseFromRows(slipped)).growthRate).toBeCloseTo(2.32188, 5);
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
