// Three patches in the plane from a spec to the block matrix, its growth and its path: demography, kernel, attraction and
// losses at once, against numbers worked out apart from this program (derived).
import { describe, expect, test } from 'vitest';
import { buildBlock } from '../../src/compile/block.ts';
import { product } from '../../src/numeric/sparse-product.ts';
import { sparseFromRows, type SparseMatrix } from '../../src/numeric/sparse.ts';
import type { CompiledModel } from '../../src/pipeline.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { blockRows, largestDifference, leadingOf, pathOf, rowsOf } from '../pipeline/measure.ts';

function landscape(year: string): CompiledModel {
  const text = framed(
    `position: plane
unit: km
classes: [newborn, adult]
oldest: open-ended
demography: { survival: [0.3, 0.8], fecundity: [0, 1.2] }
in:
  East: { demography: { survival: [0.25, 0.75], fecundity: [0, 0.9] } }
  North: { demography: { survival: [0.3, 0.8], fecundity: [0, 1.5] } }
year: ${year}
natal:
  kind: dispersal
  classes: [newborn]
  leaving: 0.2
  kernel: { shape: exponential, scale: 5 km }
  attraction: area
  leavers: all arrive
  survival-on-the-way: 0.9
start: { table: { Centre: { newborn: 10, adult: 20 }, East: { newborn: 5, adult: 10 } } }
`,
    {
      patches: `
  - { name: Centre, at: [0, 0],  area: 4 km2 }
  - { name: East,   at: [10, 0], area: 9 km2 }
  - { name: North,  at: [0, 20], area: 1 km2 }`,
    },
  );
  return compileText(text);
}

const demographyFirst = landscape('[count, demography, natal]');
const dispersalFirst = landscape('[count, natal, demography]');

describe('demography, then dispersal', () => {
  test('newborn movement by area × e^(−d/5), a tenth lost on the way', () => {
    const natal = buildBlock(demographyFirst, 'zero').phaseMaps.find(({ phase }) => phase === 'natal')!;
    const rows = rowsOf(natal.map);
    const newborn = [0, 2, 4].map((to) => [0, 2, 4].map((from) => rows[to]![from]!));
    const wanted = [
      [0.8, 0.17628029, 0.07489843],
      [0.17733339, 0.8, 0.10510157],
      [0.00266661, 0.00371971, 0.8],
    ];
    expect(largestDifference(newborn.flat(), wanted.flat())).toBeLessThan(6e-9);
    const sums = [0, 1, 2].map((from) => newborn.reduce((sum, row) => sum + row[from]!, 0));
    expect(largestDifference(sums, [0.98, 0.98, 0.98])).toBeLessThan(1e-15);
    for (const adult of [1, 3, 5]) expect(rows[adult]![adult]).toBe(1);
  });

  test('the block matrix', () => {
    const wanted = [
      [0, 0.96, 0, 0.15865226, 0, 0.11234765],
      [0.3, 0.8, 0, 0, 0, 0],
      [0, 0.21280007, 0, 0.72, 0, 0.15765235],
      [0, 0, 0.25, 0.75, 0, 0],
      [0, 0.00319993, 0, 0.00334774, 0, 1.2],
      [0, 0, 0, 0, 0.3, 0.8],
    ];
    expect(largestDifference(blockRows(demographyFirst).flat(), wanted.flat())).toBeLessThan(6e-9);
  });

  test('its growth', () => {
    expect(Math.abs(leadingOf(demographyFirst).growthRate - 1.1217749866)).toBeLessThan(1e-10);
  });

  test('the path', () => {
    const path = pathOf(demographyFirst);
    expect(path[0]).toEqual([10, 20, 5, 10, 0, 0]);
    const first = [20.78652263, 19, 11.45600143, 8.75, 0.09747594, 0];
    expect(largestDifference(path[1]!, first)).toBeLessThan(6e-9);
    expect(Math.abs(total(path[5]!) - 76.2505841)).toBeLessThan(6e-9);
    // Distances are rounded to a millimetre, which is 3e-8 animals after 20 years.
    expect(Math.abs(total(path[20]!) - 238.99057032)).toBeLessThan(1e-7);
  });
});

describe('dispersal, then demography', () => {
  test('the same growth', () => {
    expect(Math.abs(leadingOf(dispersalFirst).growthRate - 1.1217749866)).toBeLessThan(1e-10);
  });

  test('another path', () => {
    const first = [24, 18.66442044, 9, 8.94333348, 0, 0.01357938];
    expect(largestDifference(pathOf(dispersalFirst)[1]!, first)).toBeLessThan(6e-9);
  });
});

describe('the vec-permutation model (Hunter & Caswell 2005; P from Henderson & Searle 1981)', () => {
  const [classes, patches] = [2, 3];
  const size = classes * patches;

  /** vec(Nᵀ) = P vec(N), N with a row a class and a column a patch. */
  const permutation = sparseFromRows(
    Array.from({ length: size }, (_, row) => {
      const [c, p] = [Math.floor(row / patches), row % patches];
      return Array.from({ length: size }, (_unused, column) => Number(column === p * classes + c));
    }),
  );

  const transposed = sparseFromRows(rowsOf(permutation)[0]!.map((_, i) => rowsOf(permutation).map((row) => row[i]!)));

  function blockDiagonal(blocks: readonly (readonly (readonly number[])[])[]): SparseMatrix {
    const n = blocks[0]!.length;
    const at = (i: number, j: number): number =>
      Math.floor(i / n) === Math.floor(j / n) ? blocks[Math.floor(i / n)]![i % n]![j % n]! : 0;
    const whole = Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_unused, j) => at(i, j)));
    return sparseFromRows(whole);
  }

  const demography = blockDiagonal([rowsWith(1.2, 0.3, 0.8), rowsWith(0.9, 0.25, 0.75), rowsWith(1.5, 0.3, 0.8)]);
  const natal = rowsOf(buildBlock(demographyFirst, 'zero').phaseMaps.find(({ phase }) => phase === 'natal')!.map);
  const newborn = [0, 2, 4].map((to) => [0, 2, 4].map((from) => natal[to]![from]!));
  const stay = [0, 1, 2].map((to) => [0, 1, 2].map((from) => Number(to === from)));
  const movement = blockDiagonal([newborn, stay]);

  test('P selects positions 1, 3, 5, 2, 4, 6', () => {
    expect(rowsOf(permutation).map((row) => row.indexOf(1) + 1)).toEqual([1, 3, 5, 2, 4, 6]);
  });

  test('A = Pᵀ M P B with demography first, A = B Pᵀ M P with dispersal first', () => {
    const moved = product(product(transposed, movement), permutation);
    const [first, second] = [product(moved, demography), product(demography, moved)];
    expect(largestDifference(blockRows(demographyFirst).flat(), rowsOf(first).flat())).toBeLessThan(1e-15);
    expect(largestDifference(blockRows(dispersalFirst).flat(), rowsOf(second).flat())).toBeLessThan(1e-15);
  });
});

function rowsWith(births: number, young: number, adult: number): readonly (readonly number[])[] {
  return [
    [0, births],
    [young, adult],
  ];
}

function total(animals: readonly number[]): number {
  return animals.reduce((sum, value) => sum + value, 0);
}
