// Designs: points of published sequences, margins, and that any point can be asked by itself.
import { expect, test } from 'vitest';
import { openDesign, type DesignPlan } from '../../src/sweep/design/design.ts';
import type { Factor } from '../../src/sweep/design/factor.ts';
import { shuffled } from '../../src/sweep/design/permutation.ts';
import { mostDimensions, scrambledWord, sobolSequence } from '../../src/sweep/design/sobol.ts';

const share = (word: number): number => word / 2 ** 32;

function unit(name: string): Factor {
  return { name, base: 0.5, range: { by: 'from to', from: 0, to: 1, scale: 'even', steps: 5 } };
}

// Joe & Kuo (2008): the first points in Gray-code order; recomputed by hand from the rows of their table.
const published = [
  [0, 0, 0, 0, 0],
  [0.5, 0.5, 0.5, 0.5, 0.5],
  [0.75, 0.25, 0.25, 0.25, 0.75, 0.75, 0.25, 0.75, 0.75, 0.75],
  [0.25, 0.75, 0.75, 0.75, 0.25, 0.25, 0.75, 0.25, 0.25, 0.25],
  [0.375, 0.375, 0.625, 0.875, 0.375, 0.125, 0.375, 0.875, 0.875, 0.625],
  [0.875, 0.875, 0.125, 0.375, 0.875, 0.625, 0.875, 0.375, 0.375, 0.125],
  [0.625, 0.125, 0.875, 0.625, 0.625, 0.875, 0.125, 0.125, 0.125, 0.375],
  [0.125, 0.625, 0.375, 0.125, 0.125, 0.375, 0.625, 0.625, 0.625, 0.875],
];

test("the first points of Sobol's sequence are the published ones", () => {
  const sequence = sobolSequence(10);
  published.forEach((row, point) => {
    expect(row.map((_, d) => share(sequence.word(point, d)))).toEqual(row);
  });
});

test('all thousand dimensions put one point into each of 1024 slices, and scrambling keeps that', () => {
  const sequence = sobolSequence(mostDimensions);
  const slices = (d: number, of: (word: number) => number) =>
    new Set(Array.from({ length: 1024 }, (_, i) => of(sequence.word(i, d)) >>> 22)).size;
  const uneven = Array.from({ length: mostDimensions }, (_, d) => d).filter((d) => slices(d, (word) => word) !== 1024);
  expect(uneven).toEqual([]);
  for (const d of [0, 1, 9, 99, 499, 998, 999]) {
    expect(slices(d, (word) => scrambledWord(word, 7, d))).toBe(1024);
  }
  expect(() => sobolSequence(1001)).toThrow(RangeError);
});

test('scrambling depends on the seed and keeps pairs of dimensions even', () => {
  const sequence = sobolSequence(2);
  const words = (seed: number) =>
    Array.from({ length: 256 }, (_, i) => [0, 1].map((d) => scrambledWord(sequence.word(i, d), seed, d)));
  expect(words(1)).not.toEqual(words(2));
  const cells = new Set(words(1).map(([x = 0, y = 0]) => (x >>> 28) * 16 + (y >>> 28)));
  expect(cells.size).toBe(256);
});

test.each([1, 2, 3, 10, 1000, 4097])('a shuffle of %i reaches every place once', (size) => {
  const reached = new Set(Array.from({ length: size }, (_, i) => shuffled({ seed: 3, key: 9, size }, i)));
  expect(reached.size).toBe(size);
  expect(Math.max(...reached)).toBe(size - 1);
});

test('each margin of a Latin hypercube has one point in each slice, and a further factor moves no other', () => {
  const plan = (names: readonly string[]): DesignPlan => ({
    design: 'latin hypercube',
    factors: names.map(unit),
    points: 10,
    seed: 1,
  });
  const design = openDesign(plan(['a', 'b', 'c']));
  const points = Array.from({ length: design.size }, (_, i) => design.at(i));
  for (const k of [0, 1, 2]) {
    expect(points.map((point) => Math.floor(Number(point[k]) * 10)).sort((a, b) => a - b)).toEqual([
      ...Array(10).keys(),
    ]);
  }
  const more = openDesign(plan(['z', 'a', 'b', 'c']));
  expect(more.at(4).slice(1)).toEqual(design.at(4));
});

test('a grid has every combination, the last factor changing fastest', () => {
  const factors: Factor[] = [
    { name: 'a', base: 1, range: { by: 'from to', from: 1, to: 100, scale: 'ratio', steps: 3 } },
    { name: 'b', base: 'x', range: { by: 'values', values: ['x', 'y'] } },
  ];
  const design = openDesign({ design: 'grid', factors });
  const all = Array.from({ length: design.size }, (_, i) => design.at(i));
  expect(all.map(([, b]) => b)).toEqual(['x', 'y', 'x', 'y', 'x', 'y']);
  expect(all[0]?.[0]).toBe(1);
  expect(all[2]?.[0]).toBeCloseTo(10, 12);
  expect(all[5]?.[0]).toBe(100);
});

test('one at a time begins with the base and changes a single factor at each other point', () => {
  const design = openDesign({ design: 'one at a time', factors: [unit('a'), unit('b')] });
  expect(design.size).toBe(11);
  expect(design.at(0)).toEqual([0.5, 0.5]);
  for (let i = 1; i < design.size; i++)
    expect(design.at(i).filter((value) => value !== 0.5).length).toBeLessThanOrEqual(1);
});

test('the rows for shares of variance are A, B, and A with one column of B', () => {
  const design = openDesign({ design: 'sobol indices', factors: ['a', 'b', 'c'].map(unit), points: 8, seed: 5 });
  expect(design.size).toBe(40);
  for (let row = 0; row < 8; row++) {
    const [a, b] = [design.at(row * 5), design.at(row * 5 + 1)];
    for (const i of [0, 1, 2])
      expect(design.at(row * 5 + 2 + i)).toEqual(a.map((value, k) => (k === i ? b[k] : value)));
  }
});

test('every walk of a screening moves every factor once, by two thirds of its range', () => {
  const design = openDesign({ design: 'morris', factors: ['a', 'b', 'c', 'd'].map(unit), points: 6, seed: 5 });
  expect(design.size).toBe(30);
  for (let walk = 0; walk < 6; walk++) {
    const moved = [0, 1, 2, 3].map((step) => {
      const [before, after] = [design.at(walk * 5 + step), design.at(walk * 5 + step + 1)];
      const changed = before.flatMap((value, k) => (value === after[k] ? [] : [k]));
      expect(changed).toHaveLength(1);
      const k = changed[0] ?? 0;
      expect(Math.abs(Number(after[k]) - Number(before[k]))).toBeCloseTo(2 / 3, 12);
      return k;
    });
    expect(moved.sort()).toEqual([0, 1, 2, 3]);
  }
});
