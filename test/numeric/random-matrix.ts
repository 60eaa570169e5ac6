// Seeded nonnegative matrices for tests.
import fc from 'fast-check';

/** A repeatable stream of numbers in [0, 1) (linear congruential; Park & Miller 1988). */
export function stream(seed: number): () => number {
  let state = (seed % 2147483646) + 1;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}

/** Rows of an n×n matrix with a loop through all states (so irreducible) and other entries at the density given. */
export function irreducibleRows(size: number, density: number, seed: number): number[][] {
  const next = stream(seed);
  const rows = Array.from({ length: size }, () =>
    Array.from({ length: size }, () => (next() < density ? next() * 2 : 0)),
  );
  rows.forEach((row, i) => (row[(i + size - 1) % size] = 0.05 + next()));
  return rows;
}

/** Sizes, densities and seeds for `irreducibleRows`. */
export const anyIrreducible = fc
  .record({
    size: fc.integer({ min: 2, max: 9 }),
    density: fc.double({ min: 0, max: 1, noNaN: true }),
    seed: fc.integer({ min: 1, max: 2_000_000_000 }),
  })
  .map(({ size, density, seed }) => irreducibleRows(size, density, seed));

/** A landscape of patches in a row of rings: `classes` ages each, young going to the `reach` nearest on both sides. */
export function ringLandscape(shape: {
  patches: number;
  classes: number;
  reach: number;
  leaving: number;
  seed: number;
}) {
  const next = stream(shape.seed);
  const [row, column, values]: [number[], number[], number[]] = [[], [], []];
  const { patches, classes, reach, leaving } = shape;
  const add = (to: number, from: number, value: number): void => {
    row.push(to);
    column.push(from);
    values.push(value);
  };
  for (let p = 0; p < patches; p++) {
    const births = 0.45 + 0.3 * next();
    for (let c = 0; c < classes; c++) {
      add(p * classes + Math.min(c + 1, classes - 1), p * classes + c, 0.5 + (0.4 * c) / classes);
      if (c === 0) continue;
      add(p * classes, p * classes + c, births * (1 - leaving));
      for (let step = 1; step <= reach; step++) {
        for (const to of [(p + step) % patches, (p - step + patches) % patches]) {
          add(to * classes, p * classes + c, (births * leaving) / (2 * reach));
        }
      }
    }
  }
  return { rows: patches * classes, columns: patches * classes, rowIndex: row, columnIndex: column, values };
}
