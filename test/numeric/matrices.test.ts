import { describe, expect, test } from 'vitest';
import { cholesky } from '../../src/numeric/cholesky.ts';
import { strongComponents } from '../../src/numeric/components.ts';
import { factor, invertDense, solveDense } from '../../src/numeric/dense-solve.ts';
import { symmetricEigen } from '../../src/numeric/eigenvalues.ts';
import { nearestCorrelation } from '../../src/numeric/nearest-correlation.ts';
import { findRoot } from '../../src/numeric/root.ts';
import { principalPart } from '../../src/numeric/principal-part.ts';
import { multiply, multiplyTransposed, product, transpose, weightedSum } from '../../src/numeric/sparse-product.ts';
import { entryAt, sparseFromDense, sparseFromRows, sparseFromTriplets, toDense } from '../../src/numeric/sparse.ts';
import { stream } from './random-matrix.ts';

const dense = (rows: number[][]) => toDense(sparseFromRows(rows));

describe('sparse matrices', () => {
  const rows = [
    [0, 2, 0],
    [1, 0, 3],
  ];

  test('triplets in any order, with repeats and zeros, give sorted columns', () => {
    const built = sparseFromTriplets({
      rows: 2,
      columns: 3,
      rowIndex: [1, 0, 1, 0, 0],
      columnIndex: [2, 1, 0, 1, 2],
      values: [3, 0.5, 1, 1.5, 0],
    });
    expect(built).toEqual(sparseFromRows(rows));
  });

  test('a place outside the matrix is refused', () => {
    expect(() => sparseFromTriplets({ rows: 1, columns: 1, rowIndex: [1], columnIndex: [0], values: [1] })).toThrow(
      /outside 1 × 1/,
    );
  });

  test('entries, dense form and back', () => {
    const built = sparseFromRows(rows);
    expect([entryAt(built, 1, 2), entryAt(built, 0, 0)]).toEqual([3, 0]);
    expect(sparseFromDense(toDense(built))).toEqual(built);
  });

  test('products with vectors, matrices and sums', () => {
    const a = sparseFromRows(rows);
    expect([...multiply(a, Float64Array.of(1, 2, 3))]).toEqual([4, 10]);
    expect([...multiplyTransposed(a, Float64Array.of(1, 2))]).toEqual([2, 2, 6]);
    expect(toDense(product(a, transpose(a)))).toEqual(
      dense([
        [4, 0],
        [0, 10],
      ]),
    );
    expect(weightedSum([2, a], [-1, a])).toEqual(a);
    expect(
      toDense(
        principalPart(
          sparseFromRows([
            [1, 2, 3],
            [4, 5, 6],
            [7, 8, 9],
          ]),
          [2, 0],
        ),
      ),
    ).toEqual(
      dense([
        [9, 7],
        [3, 1],
      ]),
    );
  });
});

test('components are numbered so that each feeds only later ones', () => {
  const found = strongComponents(
    sparseFromRows([
      [0, 0, 0, 1],
      [0, 0, 1, 0],
      [0, 1, 0, 1],
      [1, 0, 0, 0],
    ]),
  );
  expect([...found.of]).toEqual([0, 1, 1, 0]);
  expect(found.states.map((states) => [...states])).toEqual([
    [0, 3],
    [1, 2],
  ]);
});

test('a chain of 50,000 states is searched without recursion', () => {
  const size = 50_000;
  const rowIndex = Array.from({ length: size }, (_, i) => (i + 1) % size);
  const columnIndex = Array.from({ length: size }, (_, i) => i);
  const ring = { rows: size, columns: size, rowIndex, columnIndex, values: rowIndex.map(() => 1) };
  expect(strongComponents(sparseFromTriplets(ring)).states).toHaveLength(1);
});

test('dense systems are solved and inverted; singular ones give null', () => {
  const a = dense([
    [0, 2, 1],
    [1, 0, 0],
    [3, 0, 4],
  ]);
  const x = solveDense(a, Float64Array.of(7, 1, 15));
  expect([...x!].map((value) => value.toFixed(12))).toEqual(['1.000000000000', '2.000000000000', '3.000000000000']);
  const identity = product(sparseFromDense(a), sparseFromDense(invertDense(a)!));
  toDense(identity).values.forEach((value, k) => expect(value).toBeCloseTo(k % 4 === 0 ? 1 : 0, 14));
  expect(
    factor(
      dense([
        [1, 2],
        [2, 4],
      ]),
    ),
  ).toBeNull();
});

test('Cholesky factors multiply back, singular matrices included, and indefinite ones give null', () => {
  const next = stream(3);
  const root = sparseFromRows(Array.from({ length: 6 }, () => Array.from({ length: 4 }, () => next() - 0.5)));
  const given = toDense(product(root, transpose(root)));
  const lower = sparseFromDense(cholesky(given)!);
  toDense(product(lower, transpose(lower))).values.forEach((value, k) =>
    expect(value).toBeCloseTo(given.values[k]!, 12),
  );
  expect(
    cholesky(
      dense([
        [1, 2],
        [2, 1],
      ]),
    ),
  ).toBeNull();
});

describe('nearest correlation matrix', () => {
  const offDiagonal = (rows: number[][], places: [number, number][]): number[] => {
    const { matrix } = nearestCorrelation(dense(rows));
    return places.map(([i, j]) => matrix.values[i * rows.length + j]!);
  };

  test('of the 3×3 example of Higham 2002 (input as quoted by numerical library pages, values from memory)', () => {
    const rows = [
      [1, 1, 0],
      [1, 1, 1],
      [0, 1, 1],
    ];
    const found = offDiagonal(rows, [
      [0, 1],
      [0, 2],
    ]);
    expect(found[0]).toBeCloseTo(0.76069, 5);
    expect(found[1]).toBeCloseTo(0.157298, 5);
    expect(nearestCorrelation(dense(rows)).distance).toBeCloseTo(0.5277905, 5);
  });

  test('of the tridiagonal 4×4 example (a numerical library’s printed example output)', () => {
    const rows = [
      [2, -1, 0, 0],
      [-1, 2, -1, 0],
      [0, -1, 2, -1],
      [0, 0, -1, 2],
    ];
    const found = offDiagonal(rows, [
      [0, 1],
      [0, 2],
      [0, 3],
      [1, 2],
    ]);
    [-0.808412, 0.191588, 0.106775, -0.656233].forEach((value, k) => expect(found[k]).toBeCloseTo(value, 5));
    expect(nearestCorrelation(dense(rows)).distance).toBeCloseTo(2.1337291, 5);
  });

  test('of an impossible table of three correlations (derived)', () => {
    const rows = [
      [1, 0.9, 0.7],
      [0.9, 1, -0.4],
      [0.7, -0.4, 1],
    ];
    const found = offDiagonal(rows, [
      [0, 1],
      [0, 2],
      [1, 2],
    ]);
    [0.6942185, 0.5258644, -0.247144].forEach((value, k) => expect(found[k]).toBeCloseTo(value, 5));
    expect(symmetricEigen(dense(rows)).values[0]).toBeCloseTo(-0.353636, 6);
    expect(nearestCorrelation(dense(rows)).distance).toBeCloseTo(0.4382561, 5);
  });

  test('a possible one stays as it is', () => {
    const rows = [
      [1, 0.5],
      [0.5, 1],
    ];
    expect(offDiagonal(rows, [[0, 1]])[0]).toBeCloseTo(0.5, 12);
  });
});

describe('roots', () => {
  test('of smooth, steep and flat functions', () => {
    expect(findRoot((x) => x * x - 2, { low: 0, high: 2 })).toBeCloseTo(Math.SQRT2, 14);
    expect(findRoot((x) => Math.tanh(1000 * (x - 0.3)), { low: -1, high: 1 })).toBeCloseTo(0.3, 13);
    expect(findRoot((x) => (x - 1) ** 9, { low: -4, high: 3.5 })).toBeCloseTo(1, 9);
    expect(findRoot((x) => x, { low: 0, high: 1 })).toBe(0);
  });

  test('is null where the ends have one sign', () => {
    expect(findRoot((x) => x * x + 1, { low: -1, high: 1 })).toBeNull();
  });
});
