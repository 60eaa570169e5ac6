// A run is reduced to totals whose order does not matter, and sketched quantiles stay within what they promise.
import { describe, expect, test } from 'vitest';
import { lanes } from '../../assembly/layout.ts';
import type { BatchCounts } from '../../src/kernel/output.ts';
import { binOf, exactBelow, middleOf, relativeError } from '../../src/results/reduction/bins.ts';
import { ExactValues } from '../../src/results/reduction/exact.ts';
import { isExact, mostExactValues, openQuantiles, quantilesOf } from '../../src/results/reduction/quantiles.ts';
import { Reduction, type ReductionShape } from '../../src/results/reduction/reduction.ts';
import { Sketches } from '../../src/results/reduction/sketch.ts';

/** Whole numbers that look random, the same in every run. */
function numbers(seed: number): (below: number) => number {
  let state = seed;
  return (below) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 4294967296) * below);
  };
}

const shape: ReductionShape = {
  patches: 3,
  steps: 4,
  replicates: 200,
  outcomes: [{ event: { is: 'below', than: 50 }, counts: 1 }],
  handled: 0,
};
const columns = 1 + shape.patches + shape.outcomes.length;

function batch(first: number, count: number): BatchCounts {
  const draw = numbers(first + 1);
  const counts = new Float64Array((shape.steps + 1) * columns * lanes);
  for (let t = 0; t <= shape.steps; t++) {
    for (let lane = 0; lane < count; lane++) {
      const patches = [draw(4), draw(3000), draw(1_000_000_000)];
      const whole = patches.reduce((a, b) => a + b, 0);
      [whole, ...patches, draw(200)].forEach((n, k) => (counts[(t * columns + k) * lanes + lane] = n));
    }
  }
  const stopped = first === 32 ? [{ replicate: 35, step: 2, reason: 'too many' }] : [];
  return { first, lanes: count, counts, stopped, moved: null };
}

const batches = Array.from({ length: 13 }, (_, i) => batch(i * 16, i === 12 ? 8 : 16));

function reduced(order: readonly BatchCounts[]): unknown {
  const reduction = new Reduction(shape);
  for (const one of order) reduction.take(one);
  const { runs, whole, patches, inUse, hits, lowest, stopped } = reduction;
  const cells = [...Array(shape.steps + 1).keys()];
  return {
    runs,
    stopped,
    lowest: [...lowest],
    lowestCount: reduction.lowestCount(),
    whole: cells.map((t) => whole.summary(t, runs)),
    inUse: cells.map((t) => inUse.summary(t, runs)),
    patches: cells.flatMap((t) => [0, 1, 2].map((p) => patches.summary(t * 3 + p, runs))),
    empty: cells.map((t) => patches.empty(t * 3)),
    hits: hits.map(({ first, nowAt, firstAt }) => [[...first], [...nowAt], [...firstAt]]),
  };
}

describe('a reduction', () => {
  test('does not depend on the order of the batches', () => {
    expect(reduced(batches.toReversed())).toEqual(reduced(batches));
    expect(reduced([...batches.slice(5), ...batches.slice(0, 5)])).toEqual(reduced(batches));
  });

  test('leaves out what was stopped and says so', () => {
    const reduction = new Reduction(shape);
    for (const one of batches) reduction.take(one);
    expect(reduction.runs).toBe(199);
    expect(reduction.stopped).toHaveLength(1);
    expect(reduction.lowest[35]).toBe(-1);
    expect(reduction.lowest.filter((n) => n < 0)).toHaveLength(1);
  });

  test('agrees with all values taken together', () => {
    const [reduction, t, p] = [new Reduction(shape), 3, 2];
    for (const one of batches) reduction.take(one);
    const at = (one: BatchCounts, lane: number, k: number) => one.counts[(t * columns + k) * lanes + lane]!;
    const kept = batches.flatMap((one) =>
      [...Array(one.lanes).keys()].flatMap((lane) => (one.first + lane === 35 ? [] : [[one, lane] as const])),
    );
    const values = kept.map(([one, lane]) => at(one, lane, 1 + p)).sort((a, b) => a - b);
    const mean = values.reduce((a, b) => a + b, 0) / 199;
    const variance = values.reduce((sum, n) => sum + (n - mean) * (n - mean), 0) / 198;
    const summary = reduction.patches.summary(t * 3 + p, 199);
    expect(summary.mean).toBeCloseTo(mean, 6);
    expect(summary.sd / Math.sqrt(variance)).toBeCloseTo(1, 12);
    expect(summary.quantiles).toEqual({
      '0.05': values[9],
      '0.25': values[49],
      '0.5': values[99],
      '0.75': values[149],
      '0.95': values[189],
    });
    const below = kept.filter(([one, lane]) => at(one, lane, 4) < 50).length;
    expect(reduction.hits[0]!.nowAt[t]).toBe(below);
  });
});

describe('bins', () => {
  test('are exact below 64, go up one by one, and hold every number to their relative error', () => {
    for (let n = 0; n < exactBelow; n++) expect(middleOf(binOf(n))).toBe(n);
    const draw = numbers(9);
    const tried = [64, 65, 127, 128, 1023, 1024, 1025, 999_999_999, 1_000_000_000, 2 ** 31 - 1];
    for (let i = 0; i < 2000; i++) tried.push(64 + draw(2 ** (7 + (i % 24))));
    for (const n of tried) expect(Math.abs(middleOf(binOf(n)) - n) / n, String(n)).toBeLessThanOrEqual(relativeError);
    for (let n = 1; n < 5000; n++) expect(binOf(n) - binOf(n - 1)).toBeLessThanOrEqual(n < 128 ? 1 : binOf(n));
    for (let bin = 1; bin < 800; bin++) expect(binOf(middleOf(bin))).toBe(bin);
  });
});

describe('sketched quantiles', () => {
  test.each([100, 70_000])('lie within the relative error of the exact ones for %d runs at most', (most) => {
    const draw = numbers(3);
    const [sketch, exact] = [new Sketches(5, most), new ExactValues(5, 96)];
    for (let round = 0; round < 6; round++) {
      for (let cell = 0; cell < 5; cell++) {
        // Cells of quite different sizes, and one whose numbers grow out of its window again and again.
        const values = Float64Array.from({ length: 16 }, () => draw([2, 60, 500, 2e6, 10 * 40 ** round][cell]!));
        sketch.add(cell, values, 0, 16);
        exact.add(cell, values, 0, 16);
      }
    }
    const ranks = [0, 4, 24, 48, 72, 95];
    for (let cell = 0; cell < 5; cell++) {
      const [found, truth] = [sketch.at(cell, ranks), exact.at(cell, ranks)];
      truth.forEach((n, i) => {
        expect(Math.abs(found[i]! - n)).toBeLessThanOrEqual(n < exactBelow ? 0 : n * relativeError);
      });
    }
  });

  test('do not depend on the order in which values come', () => {
    const draw = numbers(8);
    const values = Array.from({ length: 40 }, (_, i) => Float64Array.of(draw(10 ** (1 + (i % 8)))));
    const read = (order: readonly Float64Array[]) => {
      const sketch = new Sketches(1, 40);
      for (const one of order) sketch.add(0, one, 0, 1);
      return quantilesOf(sketch, 0, 40);
    };
    expect(read(values.toReversed())).toEqual(read(values));
  });

  test.each([1, 2, 60, 1000, 1e9])('that are exact are those of the values in order, of numbers below %d', (below) => {
    const draw = numbers(7);
    const exact = new ExactValues(2, 160);
    const all: number[] = [];
    for (let round = 0; round < 6; round++) {
      const values = Float64Array.from({ length: 16 }, () => draw(below));
      exact.add(1, values, 0, 16);
      all.push(...values);
    }
    all.sort((a, b) => a - b);
    expect(exact.at(1, [...all.keys(), 96, 159])).toEqual([...all, 0, 0]);
    expect(exact.at(0, [0, 3])).toEqual([0, 0]);
  });

  test('are taken by the size of the request alone', () => {
    expect(isExact(mostExactValues / 64, 64)).toBe(true);
    expect(isExact(mostExactValues / 64 + 1, 64)).toBe(false);
    expect(openQuantiles(1, 64)).toBeInstanceOf(ExactValues);
    expect(openQuantiles(mostExactValues / 64 + 1, 64)).toBeInstanceOf(Sketches);
  });
});
