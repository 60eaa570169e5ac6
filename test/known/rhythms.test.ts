// Life cycles that swing, and eigenvalues that come twice: what settles, what never does, and what the mean over a swing is.
import { describe, expect, test } from 'vitest';
import { spectrum } from '../../src/analysis/spectrum.ts';
import { findRoot } from '../../src/numeric/root.ts';
import { leading } from '../../src/numeric/leading.ts';
import { multiply } from '../../src/numeric/sparse-product.ts';
import { sparseFromRows, toDense } from '../../src/numeric/sparse.ts';
import { bernardelli, williamson } from '../numeric/published.ts';

const eigenvaluesOf = (rows: number[][]) => {
  const matrix = sparseFromRows(rows);
  return spectrum(matrix, leading(matrix))!.eigenvalues;
};

describe('three ages with a defective second eigenvalue (from memory of Williamson 1959)', () => {
  test('2, −1 and −1, to as many digits as a double eigenvalue has', () => {
    const found = eigenvaluesOf(williamson);
    [2, -1, -1].forEach((value, k) => expect(found[k]!.re).toBeCloseTo(value, 6));
    found.forEach(({ im }) => expect(Math.abs(im)).toBeLessThan(1e-6));
  });

  test('only one direction belongs to −1: A + I has rank 2, so no sum over eigenvectors is the matrix', () => {
    const plus = williamson.map((row, i) => row.map((value, j) => value + (i === j ? 1 : 0)));
    const [[a, b, c], [d, e, f], [g, h, i]] = plus as [number[], number[], number[]];
    const determinant = a! * (e! * i! - f! * h!) - b! * (d! * i! - f! * g!) + c! * (d! * h! - e! * g!);
    expect(determinant).toBeCloseTo(0, 12);
    expect(a! * e! - b! * d!).not.toBeCloseTo(0, 6);
  });
});

describe('breeding once at the last of k ages (from memory of Bernardelli 1941; derived)', () => {
  test('its third power is the identity', () => {
    const { values } = toDense(sparseFromRows(bernardelli));
    const times = (x: Float64Array, y: Float64Array) =>
      Float64Array.from({ length: 9 }, (_, k) =>
        [0, 1, 2].reduce((sum, m) => sum + x[Math.floor(k / 3) * 3 + m]! * y[m * 3 + (k % 3)]!, 0),
      );
    times(times(values, values), values).forEach((value, k) => expect(value).toBeCloseTo(k % 4 === 0 ? 1 : 0, 14));
  });

  test.each([
    [3, 6, [1 / 2, 1 / 3]],
    [5, 40, [0.3, 0.5, 0.7, 0.6]],
  ])('%d ages: the k-th roots of F ∏P, evenly around a circle', (k, births, survivals) => {
    const rows = Array.from({ length: k }, (_, i) =>
      Array.from({ length: k }, (_unused, j) => (i === 0 && j === k - 1 ? births : j === i - 1 ? survivals[j]! : 0)),
    );
    const size = survivals.reduce((product, survival) => product * survival, births) ** (1 / k);
    const found = eigenvaluesOf(rows);
    const angles = found.map(({ re, im }) => Math.atan2(im, re)).sort((x, y) => x - y);
    const even = Array.from({ length: k }, (_, m) => (2 * Math.PI * (m - Math.floor(k / 2))) / k);
    found.forEach(({ re, im }) => expect(Math.hypot(re, im)).toBeCloseTo(size, 9));
    even.forEach((angle, m) => expect(angles[m]).toBeCloseTo(angle, 9));
  });

  test('what one swing holds on average is made up as the stable distribution, whatever the start', () => {
    const matrix = sparseFromRows(bernardelli);
    const right = leading(matrix).right!;
    let animals: Float64Array = Float64Array.of(11, 2, 5);
    const sum = new Float64Array(3);
    for (let t = 0; t < 3; t++) {
      animals.forEach((count, i) => (sum[i] = sum[i]! + count));
      animals = multiply(matrix, animals);
    }
    const total = sum.reduce((a, b) => a + b, 0);
    right.forEach((share, i) => expect(sum[i]! / total).toBeCloseTo(share, 12));
  });
});

// Rates from memory of Lande 1988, who prints 0.961: only where adults of the breeding age have survived its first year does the
// equation give it; digits recomputed.
test('the growth of the spotted owl tells which survival its births hold', () => {
  const growth = (reaching: number): number =>
    findRoot((x) => x ** 3 * (1 - 0.942 / x) - reaching * 0.24, { low: 0.943, high: 1.2 })!;
  const [withIt, without] = [growth(0.108 * 0.71 * 0.942), growth(0.108 * 0.71)];
  expect(withIt).toBeCloseTo(0.96078003, 8);
  expect(without).toBeCloseTo(0.96189034, 8);
  expect([withIt, without].map((value) => value.toFixed(3))).toEqual(['0.961', '0.962']);
});
