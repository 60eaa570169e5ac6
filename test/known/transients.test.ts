import { expect, test } from 'vitest';
import { vectorsOf } from '../../src/analysis/sensitivity.ts';
import { euclideanRise, pathFromStart, transientBounds } from '../../src/analysis/transients.ts';
import { leading } from '../../src/numeric/leading.ts';
import { sparseFromRows } from '../../src/numeric/sparse.ts';
import { bernardelli, loggerhead, twoStage, williamson } from '../numeric/published.ts';

const bounds = (rows: number[][]) => {
  const matrix = sparseFromRows(rows);
  const found = leading(matrix);
  return transientBounds(matrix, vectorsOf(found)!, found.primitive);
};

test('the Euclidean rise is the largest singular value (derived: σ² solves x² − (a² + b² + d²)x + a²d² = 0)', () => {
  for (const [a, b, d] of [
    [0.5, 1, 0.25],
    [0.9, 8, 0.8],
  ] as const) {
    const trace = a * a + b * b + d * d;
    const expected = Math.sqrt((trace + Math.sqrt(trace * trace - 4 * a * a * d * d)) / 2);
    expect(
      euclideanRise(
        sparseFromRows([
          [a, b],
          [0, d],
        ]),
      ),
    ).toBeCloseTo(expected, 12);
  }
});

test('two stages: first-year extremes are the column sums over λ, lasting ones the reproductive values (derived)', () => {
  const found = bounds(twoStage);
  const growth = 1.1211102550927978;
  expect(found.reactivity).toBeCloseTo(2 / growth, 12);
  expect(found.firstStepAttenuation).toBeCloseTo(0.3 / growth, 12);
  const [w1, v2] = [1.2 / (1.2 + growth), growth / 0.3];
  const scale = w1 + v2 * (1 - w1);
  expect(found.lasting!.gain).toBeCloseTo(v2 / scale, 12);
  expect(found.lasting!.loss).toBeCloseTo(1 / scale, 12);
});

test('three ages that breed once: at most six-fold and back, for ever (derived from the powers of Bernardelli’s matrix)', () => {
  const found = bounds(bernardelli);
  expect(found.highest.times).toBeCloseTo(6, 10);
  expect(found.lowest.times).toBeCloseTo(1 / 6, 10);
  expect(found.lasting).toBeNull();
});

test('Kreiss bounds enclose what powers reach', () => {
  for (const rows of [loggerhead, twoStage, williamson]) {
    const found = bounds(rows);
    expect(found.kreiss!.atLeast).toBeLessThanOrEqual(found.highest.times * (1 + 1e-9));
    expect(found.kreiss!.atLeast).toBeGreaterThan(1);
    expect(found.kreiss!.atMost).toBeGreaterThanOrEqual(found.lowest.times * (1 - 1e-9));
    expect(found.kreiss!.atMost).toBeLessThan(1);
  }
});

test('the path of a start ends at its reproductive value, and the stable one never leaves 1', () => {
  const matrix = sparseFromRows(williamson);
  const vectors = vectorsOf(leading(matrix))!;
  const path = pathFromStart(matrix, vectors, { start: Float64Array.of(1, 1, 1), steps: 3, primitive: true })!;
  const sizes = [1, (21 + 1 / 3 + 1 / 2) / 3 / 2, (9 + 7 + 1 / 6) / 3 / 4, (65 + 3 + 3.5) / 3 / 8];
  sizes.forEach((value, t) => expect(path.times[t]).toBeCloseTo(value, 12));
  expect(path.lasting).toBeCloseTo(13 / 3 / (54 / 29), 12);
  expect(path.stepsToSettle).toBe(7);
  const steady = pathFromStart(matrix, vectors, { start: vectors.right, steps: 10, primitive: true })!;
  steady.times.forEach((value) => expect(value).toBeCloseTo(1, 12));
  expect(steady.stepsToSettle).toBe(0);
});
