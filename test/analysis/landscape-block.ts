// A landscape as the compiler hands it on: two-class patches, demography then natal dispersal.
import type { BlockMatrix } from '../../src/compile/block-matrix.ts';
import { product } from '../../src/numeric/sparse-product.ts';
import { sparseFromTriplets, type SparseMatrix } from '../../src/numeric/sparse.ts';
import { stream } from '../numeric/random-matrix.ts';

export interface Shape {
  readonly patches: number;
  readonly classes: number;
  /** Neighbours on each side that newborns go to. */
  readonly reach: number;
  readonly seed: number;
}

type Entry = readonly [number, number, number];

function build(size: number, entries: readonly Entry[]): SparseMatrix {
  return sparseFromTriplets({
    rows: size,
    columns: size,
    rowIndex: entries.map(([row]) => row),
    columnIndex: entries.map(([, column]) => column),
    values: entries.map(([, , value]) => value),
  });
}

export function ringBlock({ patches, classes, reach, seed }: Shape): {
  block: BlockMatrix;
  split: { fates: SparseMatrix; births: SparseMatrix };
} {
  const next = stream(seed);
  const size = patches * classes;
  const [fates, births, moves]: [Entry[], Entry[], Entry[]] = [[], [], []];
  for (let p = 0; p < patches; p++) {
    const quality = 0.3 + 0.5 * next();
    for (let c = 0; c < classes; c++) {
      const here = p * classes + c;
      fates.push([p * classes + Math.min(c + 1, classes - 1), here, 0.4 + 0.45 * ((c + 1) / classes)]);
      if (c > 0) births.push([p * classes, here, quality]);
      if (c > 0) moves.push([here, here, 1]);
    }
    moves.push([p * classes, p * classes, 0.7]);
    const neighbours = Array.from({ length: reach }, (_, k) => [
      (p + k + 1) % patches,
      (p - k - 1 + patches) % patches,
    ]).flat();
    const others = [...new Set(neighbours)].filter((to) => to !== p);
    others.forEach((to) => moves.push([to * classes, p * classes, 0.27 / others.length]));
  }
  const [U, F, M] = [build(size, fates), build(size, births), build(size, moves)];
  const demography = build(size, [...fates, ...births]);
  const block: BlockMatrix = {
    matrix: product(M, demography),
    states: Array.from({ length: size }, (_, s) => ({ patch: Math.floor(s / classes), class: s % classes })),
    patches: Array.from({ length: patches }, (_, p) => `patch ${String(p + 1).padStart(3, '0')}`),
    classes: Array.from({ length: classes }, (_, c) => `age ${c}`),
    at: 'zero',
    phaseMaps: [
      { phase: 'demography', map: demography },
      { phase: 'natal', map: M },
    ],
  };
  return { block, split: { fates: product(M, U), births: product(M, F) } };
}
