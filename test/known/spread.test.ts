import { describe, expect, test } from 'vitest';
import { momentOf, spreadSpeed, type LineKernel } from '../../src/analysis/spread/speed.ts';
import { entryAt, forEachEntry, sparseFromRows } from '../../src/numeric/sparse.ts';
import { twoStage } from '../numeric/published.ts';

describe('moments of kernels seen along a line (derived)', () => {
  /** Mean of e^(θx) by summing a density over a fine grid. */
  const summed = (density: (x: number) => number, theta: number): number => {
    const step = 0.005;
    let [total, weighted] = [0, 0];
    for (let x = -60; x <= 60; x += step) {
      total += density(x);
      weighted += density(x) * Math.exp(theta * x);
    }
    return weighted / total;
  };

  test('normal, two-sided exponential and uniform', () => {
    expect(momentOf({ kind: 'normal', sdKm: 2 }, 0.7)).toBeCloseTo(
      summed((x) => Math.exp((-x * x) / 8), 0.7),
      8,
    );
    expect(momentOf({ kind: 'two-sided exponential', meanKm: 1.5 }, 0.3)).toBeCloseTo(1 / (1 - 0.2025), 12);
    expect(momentOf({ kind: 'uniform', halfWidthKm: 3 }, 0.5)).toBeCloseTo(Math.sinh(1.5) / 1.5, 12);
    expect(momentOf({ kind: 'uniform', halfWidthKm: 3 }, 1e-6)).toBeCloseTo(1, 10);
  });

  test('the exponential in the plane, integrated across', () => {
    const across = (x: number): number => {
      let sum = 0;
      for (let y = -40; y <= 40; y += 0.1) sum += Math.exp(-Math.hypot(x, y));
      return sum;
    };
    let [total, weighted] = [0, 0];
    for (let x = -40; x <= 40; x += 0.1) {
      const density = across(x);
      total += density;
      weighted += density * Math.exp(0.4 * x);
    }
    expect(momentOf({ kind: 'exponential in the plane', scaleKm: 1 }, 0.4)).toBeCloseTo(weighted / total, 3);
    expect(momentOf({ kind: 'exponential in the plane', scaleKm: 1 }, 1)).toBe(Infinity);
  });
});

test('one class with a normal kernel spreads at σ √(2 ln λ) (Kot, Lewis & van den Driessche 1996, from memory)', () => {
  const kernel: LineKernel = { kind: 'normal', sdKm: 3 };
  const found = spreadSpeed({ matrix: sparseFromRows([[1.4]]), kernelOf: () => kernel })!;
  expect(found.speedKm).toBeCloseTo(3 * Math.sqrt(2 * Math.log(1.4)), 10);
  expect(found.theta).toBeCloseTo(Math.sqrt(2 * Math.log(1.4)) / 3, 6);
});

test('two stages of which the young move: sensitivities agree with differences', () => {
  const kernelOf = (row: number, column: number): LineKernel =>
    row === 0 && column === 1 ? { kind: 'exponential in the plane', scaleKm: 2 } : { kind: 'stays' };
  const matrix = sparseFromRows(twoStage);
  const found = spreadSpeed({ matrix, kernelOf })!;
  const h = 1e-5;
  forEachEntry(matrix, (row, column, _value, k) => {
    const moved = [h, -h].map((by) => {
      const rows = [0, 1].map((i) => [0, 1].map((j) => entryAt(matrix, i, j) + (i === row && j === column ? by : 0)));
      return spreadSpeed({ matrix: sparseFromRows(rows), kernelOf })!.speedKm;
    });
    expect(found.sensitivity![k]).toBeCloseTo((moved[0]! - moved[1]!) / (2 * h), 5);
  });
});

test('nothing spreads that declines or never moves', () => {
  const normal = (): LineKernel => ({ kind: 'normal', sdKm: 1 });
  expect(spreadSpeed({ matrix: sparseFromRows([[0.9]]), kernelOf: normal })).toBeNull();
  expect(spreadSpeed({ matrix: sparseFromRows([[1.4]]), kernelOf: () => ({ kind: 'stays' }) })).toBeNull();
});
