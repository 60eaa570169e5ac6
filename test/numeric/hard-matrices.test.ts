import { describe, expect, test } from 'vitest';
import { eigenvalues } from '../../src/numeric/eigenvalues.ts';
import { foldedPair, type IrreduciblePair } from '../../src/numeric/folded-pair.ts';
import { leading } from '../../src/numeric/leading.ts';
import { positivePair } from '../../src/numeric/positive-pair.ts';
import { multiply, multiplyTransposed } from '../../src/numeric/sparse-product.ts';
import { sparseFromTriplets, toDense, type SparseMatrix } from '../../src/numeric/sparse.ts';
import { ringLandscape, stream } from './random-matrix.ts';

interface Recipe {
  readonly size: number;
  readonly seed: number;
  /** Entries a column besides the loop through all states. */
  readonly more: number;
  readonly entry: (random: number) => number;
  /** Size of the one entry that closes the loop. */
  readonly closing?: number;
  /** All other entries point onwards. */
  readonly onwards?: boolean;
}

function irreducible({ size, seed, more, entry, closing, onwards }: Recipe): SparseMatrix {
  const next = stream(seed);
  const [rowIndex, columnIndex, values]: [number[], number[], number[]] = [[], [], []];
  const add = (row: number, column: number, value: number): void => {
    rowIndex.push(row);
    columnIndex.push(column);
    values.push(value);
  };
  for (let i = 0; i < size; i++) {
    add((i + 1) % size, i, i === size - 1 && closing !== undefined ? closing : 0.05 + entry(next()));
    for (let k = 0; k < more; k++) {
      add(onwards === true ? Math.floor(i + next() * (size - i)) : Math.floor(next() * size), i, 0.9 * entry(next()));
    }
  }
  return sparseFromTriplets({ rows: size, columns: size, rowIndex, columnIndex, values });
}

/** Largest relative miss of any entry of A w = λ w and Aᵀ v = λ v. */
function miss(matrix: SparseMatrix, { growthRate, right, left }: IrreduciblePair): number {
  const off = (image: Float64Array, x: Float64Array): number =>
    image.reduce((most, value, i) => Math.max(most, Math.abs(value / (growthRate * x[i]!) - 1)), 0);
  return Math.max(off(multiply(matrix, right), right), off(multiplyTransposed(matrix, left), left));
}

const plain = (random: number): number => random;
const wild = (random: number): number => Math.exp(-18 + 22 * random);

describe('folding agrees with dense solution and with all eigenvalues, each small share as exact as a large one', () => {
  const recipes: readonly (readonly [string, Recipe])[] = [
    ['few links', { size: 170, seed: 5, more: 1, entry: plain }],
    ['many links', { size: 170, seed: 6, more: 12, entry: plain }],
    ['entries over nine orders of magnitude', { size: 170, seed: 7, more: 3, entry: wild }],
    ['entries over nine orders, again', { size: 180, seed: 41, more: 3, entry: wild }],
    ['nearly one-way', { size: 180, seed: 17, more: 3, entry: plain, closing: 1e-12, onwards: true }],
  ];
  test.each(recipes)('%s', (_name, recipe) => {
    const matrix = irreducible(recipe);
    const folded = foldedPair(matrix);
    expect(miss(matrix, folded)).toBeLessThan(1e-11);
    expect(positivePair(toDense(matrix)).growthRate / folded.growthRate).toBeCloseTo(1, 12);
    const largest = Math.max(...eigenvalues(toDense(matrix)).map(({ re }) => re));
    expect(folded.growthRate / largest).toBeCloseTo(1, 9);
  });
});

test('a large life cycle with period three converges like any other', () => {
  const next = stream(8);
  const [rowIndex, columnIndex, values]: [number[], number[], number[]] = [[], [], []];
  for (let i = 0; i < 300; i++) {
    for (const to of [(i + 1) % 300, 3 * Math.floor(next() * 100) + ((i + 1) % 3)]) {
      rowIndex.push(to);
      columnIndex.push(i);
      values.push(0.2 + next());
    }
  }
  const matrix = sparseFromTriplets({ rows: 300, columns: 300, rowIndex, columnIndex, values });
  const found = leading(matrix);
  expect([found.irreducible, found.period, found.primitive]).toEqual([true, 3, false]);
  expect(miss(matrix, { growthRate: found.growthRate, right: found.right!, left: found.left! })).toBeLessThan(1e-11);
});

test('a large sink fed by a large source has the vectors of the whole', () => {
  const shape = { patches: 100, classes: 4, reach: 2, leaving: 0.3, seed: 4 };
  const [source, sink] = [ringLandscape(shape), ringLandscape({ ...shape, seed: 5 })];
  const half = source.rows;
  const matrix = sparseFromTriplets({
    rows: 2 * half,
    columns: 2 * half,
    rowIndex: [...source.rowIndex, ...sink.rowIndex.map((row) => row + half), half, half + 40],
    columnIndex: [...source.columnIndex, ...sink.columnIndex.map((column) => column + half), 3, 43],
    values: [...source.values, ...sink.values.map((value) => 0.97 * value), 0.01, 0.02],
  });
  const found = leading(matrix);
  expect(found.blocks).toHaveLength(2);
  expect(found.irreducible).toBe(false);
  const image = multiply(matrix, found.right!);
  const off = image.reduce((sum, value, i) => sum + Math.abs(value - found.growthRate * found.right![i]!), 0);
  expect(off).toBeLessThan(1e-11);
  expect(found.right!.every((share) => share > 0)).toBe(true);
  expect(found.left!.subarray(half).every((value) => value === 0)).toBe(true);
});
