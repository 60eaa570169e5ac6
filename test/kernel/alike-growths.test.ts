// Matrices of one pattern, made and solved eight at a time, have the growth of each alone, wherever they begin and whoever is beside
// them.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { openAlikeSolver, type AlikeSolver } from '../../src/kernel/alike-growths.ts';
import type { AlikeMatrices } from '../../src/kernel/alike-program.ts';
import { openManySolver } from '../../src/kernel/many-growths.ts';
import { bernardelli, killerWhale, loggerhead, teasel, wielandt } from '../numeric/published.ts';
import { irreducibleRows, stream } from '../numeric/random-matrix.ts';

type Rows = readonly (readonly number[])[];

/** Every entry of the pattern moves by itself. */
function entriesMove(rows: Rows): AlikeMatrices {
  const cells = rows.flatMap((own, row) => own.flatMap((value, column) => (value === 0 ? [] : [{ row, column }])));
  return {
    order: rows.length,
    sources: cells.length,
    start: new Float64Array(cells.length),
    moving: cells.map((_, at) => ({ at, constant: 0, slope: 1, source: at })),
    sums: [],
    entries: cells.map((cell, place) => ({ ...cell, place })),
  };
}

/** A column for each entry of the pattern of the first matrix. */
function columnsOf(matrices: readonly Rows[]): readonly Float64Array[] {
  const [first = []] = matrices;
  return first.flatMap((own, row) =>
    own.flatMap((value, column) => (value === 0 ? [] : [Float64Array.from(matrices, (rows) => rows[row]![column]!)])),
  );
}

const flatStart = (order: number) => ({
  right: new Float64Array(order).fill(1),
  left: new Float64Array(order).fill(1),
});

function solverOf(rows: Rows, start = flatStart(rows.length)): AlikeSolver {
  return openAlikeSolver(entriesMove(rows), start)!;
}

const many = openManySolver();
const alone = (matrices: readonly Rows[]): Float64Array =>
  many.solve({ matrices: Float64Array.from(matrices.flat(2)), order: matrices[0]!.length }).growthRate;

function likeness(found: Float64Array, expected: Float64Array): number {
  return found.reduce((most, value, k) => Math.max(most, Math.abs(value / expected[k]! - 1)), 0);
}

/** The pattern of a matrix with other numbers, each up to `factor` times as large or as small. */
function others(rows: Rows, count: number, factor: number, seed: number): readonly Rows[] {
  const next = stream(seed);
  return Array.from({ length: count }, () => rows.map((own) => own.map((value) => value * factor ** (2 * next() - 1))));
}

describe('growth', () => {
  test.each([
    ['loggerhead', loggerhead],
    ['killer whale', killerWhale.filter((_, i) => i < 3).map((own) => own.slice(0, 3))],
    ['teasel', teasel],
    ['all breed in their last year, so that numbers go in a circle (Bernardelli 1941)', bernardelli],
    ['the slowest to mix (Wielandt 1950)', wielandt],
  ])('of published life cycles and others of their pattern: %s', (_, rows) => {
    const matrices = [rows, ...others(rows, 50, 3, 5)];
    const found = solverOf(rows).growthAt(columnsOf(matrices), matrices.length);
    expect(likeness(found, alone(matrices))).toBeLessThan(1e-12);
  });

  test('of random patterns from flat vectors and numbers over many orders of size', () => {
    const shape = fc.record({
      size: fc.integer({ min: 1, max: 12 }),
      density: fc.double({ min: 0, max: 1, noNaN: true }),
      seed: fc.integer({ min: 1, max: 2_000_000_000 }),
      factor: fc.constantFrom(1.1, 2, 30, 1e4),
    });
    fc.assert(
      fc.property(shape, ({ size, density, seed, factor }) => {
        const rows = size === 1 ? [[0.7]] : irreducibleRows(size, density, seed);
        const matrices = others(rows, 20, factor, seed);
        const found = solverOf(rows).growthAt(columnsOf(matrices), matrices.length);
        const expected = alone(matrices);
        // What does not close is told, and never a wrong number.
        const known = [...found.keys()].filter((k) => !Number.isNaN(found[k]));
        const of = (growth: Float64Array) => Float64Array.from(known, (k) => growth[k]!);
        expect(likeness(of(found), of(expected))).toBeLessThan(1e-11);
        if (factor <= 30) expect(known).toHaveLength(20);
        if (factor <= 2) expect(likeness(found, expected)).toBeLessThan(1e-12);
      }),
      { numRuns: 300, seed: 11 },
    );
  });

  test('of parts that hardly meet is the greater of both, from vectors that lie in the other', () => {
    const weak = 1e-10;
    const rows = [
      [0.9, weak],
      [weak, 0.9],
    ];
    const matrices = [0.5, 0.9, 0.9 + 1e-9, 1.3].map((second): Rows => [
      [0.9, weak],
      [weak, second],
    ]);
    const start = { right: Float64Array.of(1, 1e-9), left: Float64Array.of(1, 1e-9) };
    const found = solverOf(rows, start).growthAt(columnsOf(matrices), 4);
    const exact = [0.5, 0.9, 0.9 + 1e-9, 1.3].map((second) => {
      const [mean, half] = [(0.9 + second) / 2, (0.9 - second) / 2];
      return mean + Math.sqrt(half * half + weak * weak);
    });
    found.forEach((value, k) => {
      expect(Number.isNaN(value) || Math.abs(value / exact[k]! - 1) < 1e-12).toBe(true);
    });
    expect(found[3]).toBeCloseTo(1.3, 12);
  });
});

test('an entry that is 0, negative or no number has no answer, and its neighbours have theirs', () => {
  const rows = irreducibleRows(6, 0.4, 3);
  const matrices = others(rows, 20, 2, 9);
  const columns = columnsOf(matrices).map((column) => column.slice());
  [0, -1, NaN, Infinity].forEach((value, k) => (columns[k]![3 * k + 1] = value));
  const found = solverOf(rows).growthAt(columns, 20);
  const clean = solverOf(rows).growthAt(columnsOf(matrices), 20);
  const wrong = [1, 4, 7, 10];
  found.forEach((value, k) => {
    expect(value).toBe(wrong.includes(k) ? NaN : clean[k]);
  });
});

test('an answer depends on nobody beside it and on no number of points, to the last bit', () => {
  const rows = irreducibleRows(9, 0.3, 21);
  const count = 5000;
  const matrices = others(rows, count, 4, 2);
  const columns = columnsOf(matrices);
  const solver = solverOf(rows);
  const all = solver.growthAt(columns, count);
  for (const k of [0, 1, 7, 8, 2047, 2048, 4999]) {
    const own = columns.map((column) => column.slice(k, k + 1));
    expect(solver.growthAt(own, 1)[0]).toBe(all[k]);
  }
});

test('entries are made as sums of products of what moves along lines', () => {
  const matrices: AlikeMatrices = {
    order: 2,
    sources: 2,
    start: Float64Array.of(0, 0, 0.5, 0, 0),
    moving: [
      { at: 0, constant: 0.1, slope: 2, source: 0 },
      { at: 1, constant: 1, slope: -1, source: 1 },
    ],
    sums: [
      {
        target: 3,
        products: [
          [0, 1],
          [0, 2],
        ],
      },
      { target: 4, products: [[3, 3]] },
    ],
    entries: [
      { row: 0, column: 1, place: 3 },
      { row: 1, column: 0, place: 4 },
    ],
  };
  const found = openAlikeSolver(matrices, flatStart(2))!.growthAt(
    [Float64Array.of(0.2, 0.3), Float64Array.of(0.4, 0.6)],
    2,
  );
  [
    [0.2, 0.4],
    [0.3, 0.6],
  ].forEach(([x = 0, y = 0], k) => {
    const made = (0.1 + 2 * x) * (1 - y) + (0.1 + 2 * x) * 0.5;
    expect(found[k]).toBeCloseTo(Math.sqrt(made * made * made), 13);
  });
});
