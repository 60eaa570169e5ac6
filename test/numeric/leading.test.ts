import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { eigenvalues } from '../../src/numeric/eigenvalues.ts';
import { leading } from '../../src/numeric/leading.ts';
import { multiply, multiplyTransposed, product } from '../../src/numeric/sparse-product.ts';
import { sparseFromRows, sparseFromTriplets, toDense } from '../../src/numeric/sparse.ts';
import {
  ageingOnly,
  bernardelli,
  killerWhale,
  loggerhead,
  teasel,
  twoStage,
  wielandt,
  williamson,
} from './published.ts';
import { anyIrreducible, ringLandscape } from './random-matrix.ts';

const of = (rows: number[][]) => leading(sparseFromRows(rows));
const near = (found: Float64Array | null, expected: readonly number[], digits: number): void => {
  expect(found?.length).toBe(expected.length);
  expected.forEach((value, i) => expect(found![i]!).toBeCloseTo(value, digits));
};

describe('published life cycles', () => {
  test('two stages have their closed form (derived)', () => {
    const found = of(twoStage);
    expect(found.growthRate).toBeCloseTo((0.8 + Math.sqrt(0.64 + 1.44)) / 2, 14);
    near(found.right, [1.2 / (1.2 + 1.1211102550927978), 1.1211102550927978 / (1.2 + 1.1211102550927978)], 14);
    near(found.left, [1, 1.1211102550927978 / 0.3], 12);
  });

  test('the loggerhead turtle declines at 0.945 (Crouse, Crowder & Caswell 1987)', () => {
    const found = of(loggerhead);
    expect(found.growthRate).toBeCloseTo(0.94503098, 8);
    const shares = [20.650484, 66.975032, 11.45997, 0.662371, 0.036307, 0.031084, 0.184751];
    near(
      found.right,
      shares.map((share) => share / 100),
      8,
    );
    const values = [1, 1.400668, 5.995523, 115.844511, 568.780852, 507.37304, 587.669314];
    values.forEach((value, i) => expect(found.left![i]! / value).toBeCloseTo(1, 6));
    expect([found.irreducible, found.primitive, found.period]).toEqual([true, true, 1]);
  });

  test('the post-reproductive class of the killer whale feeds nobody (Brault & Caswell 1993)', () => {
    const found = of(killerWhale);
    expect(found.growthRate).toBeCloseTo(1.02544133, 8);
    near(found.right, [0.036972, 0.316071, 0.32291, 0.324047], 6);
    near(found.left, [1, 1.049045, 1.57132, 0], 6);
    expect(found.irreducible).toBe(false);
    expect(found.blocks.map(({ growthRate, feeds }) => [growthRate.toFixed(6), feeds])).toEqual([
      ['1.025441', [1]],
      ['0.980400', []],
    ]);
  });

  test('teasel grows at 2.334 (from memory of Caswell 2001)', () => {
    const found = of(teasel);
    expect(found.growthRate).toBeCloseTo(2.33388017, 8);
    near(found.right, [0.63772, 0.263954, 0.012155, 0.069313, 0.012241, 0.004617], 6);
  });

  test('a defective second eigenvalue does no harm (from memory of Williamson 1959)', () => {
    const found = of(williamson);
    expect(found.growthRate).toBeCloseTo(2, 14);
    near(found.right, [24 / 29, 4 / 29, 1 / 29], 14);
    near(found.left, [1, 6, 6], 13);
  });

  test('breeding once at age three has period three and growth one (from memory of Bernardelli 1941)', () => {
    const found = of(bernardelli);
    expect(found.growthRate).toBeCloseTo(1, 14);
    expect([found.irreducible, found.primitive, found.period]).toEqual([true, false, 3]);
    near(found.right, [0.6, 0.3, 0.1], 14);
  });

  test('the slowest primitive pattern is told to be primitive (from memory of Wielandt 1950)', () => {
    expect([of(wielandt).primitive, of(wielandt).period]).toEqual([true, 1]);
    const matrix = sparseFromRows(wielandt);
    let power = matrix;
    const filled = [power.values.length];
    for (let exponent = 2; exponent <= 10; exponent++) {
      power = product(power, matrix);
      filled.push(power.values.length);
    }
    expect(filled.indexOf(16) + 1).toBe(10);
  });
});

describe('life cycles without one leading vector', () => {
  test('pure ageing has growth exactly 0 and says that nothing persists', () => {
    const found = of(ageingOnly);
    expect([found.growthRate, found.right, found.left, found.period, found.irreducible]).toEqual([
      0,
      null,
      null,
      0,
      false,
    ]);
    expect(found.reason).toMatch(/nothing persists/);
  });

  test('two equal patches that exchange nobody share a growth but no spread', () => {
    const found = of([
      [0, 1.2, 0, 0],
      [0.3, 0.8, 0, 0],
      [0, 0, 0, 1.2],
      [0, 0, 0.3, 0.8],
    ]);
    expect(found.growthRate).toBeCloseTo(1.1211102550927978, 13);
    expect([found.right, found.left]).toEqual([null, null]);
    expect(found.reason).toMatch(/depends on the start/);
  });

  test('a one-way link fills the patch it leads to, and its animals are worth nothing to the source', () => {
    const found = of([
      [1.2, 0],
      [0.1, 0.9],
    ]);
    near(found.right, [0.75, 0.25], 14);
    near(found.left, [1, 0], 14);
  });

  test('a source that nobody returns to is empty in the long run', () => {
    const found = of([
      [0.9, 0],
      [0.1, 1.2],
    ]);
    near(found.right, [0, 1], 14);
    near(found.left, [1, 3], 13);
  });
});

test('a negative entry is refused', () => {
  expect(() =>
    of([
      [1, -0.1],
      [0.5, 0],
    ]),
  ).toThrow(/-0.1/);
});

test('any irreducible matrix: positive vectors, and the growth is its largest eigenvalue by another route', () => {
  fc.assert(
    fc.property(anyIrreducible, (rows) => {
      const matrix = sparseFromRows(rows);
      const found = leading(matrix);
      const [right, left] = [found.right!, found.left!];
      multiply(matrix, right).forEach((value, i) => expect(value / (found.growthRate * right[i]!)).toBeCloseTo(1, 11));
      multiplyTransposed(matrix, left).forEach((value, i) =>
        expect(value / (found.growthRate * left[i]!)).toBeCloseTo(1, 11),
      );
      const largest = Math.max(...eigenvalues(toDense(matrix)).map(({ re }) => re));
      expect(found.growthRate / largest).toBeCloseTo(1, 7);
    }),
    { seed: 20240611, numRuns: 150 },
  );
});

test('reordering the states reorders the vectors and changes no growth', () => {
  fc.assert(
    fc.property(anyIrreducible, (rows) => {
      const turned = rows.map((row) => row.slice().reverse()).reverse();
      const [one, other] = [of(rows), of(turned)];
      expect(other.growthRate / one.growthRate).toBeCloseTo(1, 13);
      one.right!.forEach((value, i) => expect(other.right![rows.length - 1 - i]! / value).toBeCloseTo(1, 11));
    }),
    { seed: 7, numRuns: 60 },
  );
});

test('a large landscape agrees with its dense solution, entry by entry', () => {
  const shape = { patches: 60, classes: 5, reach: 3, leaving: 0.2, seed: 5 };
  const matrix = sparseFromTriplets(ringLandscape(shape));
  const found = leading(matrix);
  const [right, left] = [found.right!, found.left!];
  expect(matrix.columns).toBe(300);
  multiply(matrix, right).forEach((value, i) => expect(value / (found.growthRate * right[i]!)).toBeCloseTo(1, 12));
  multiplyTransposed(matrix, left).forEach((value, i) =>
    expect(value / (found.growthRate * left[i]!)).toBeCloseTo(1, 12),
  );
  const largest = Math.max(...eigenvalues(toDense(matrix)).map(({ re }) => re));
  expect(found.growthRate / largest).toBeCloseTo(1, 10);
});

test('weak links between many patches do not hide the best one', () => {
  const shape = { patches: 800, classes: 4, reach: 2, leaving: 1e-5, seed: 9 };
  const matrix = sparseFromTriplets(ringLandscape(shape));
  const found = leading(matrix);
  const residual = multiply(matrix, found.right!).reduce(
    (sum, value, i) => sum + Math.abs(value - found.growthRate * found.right![i]!),
    0,
  );
  expect(residual).toBeLessThan(1e-11);
  const alone = sparseFromTriplets(ringLandscape({ ...shape, leaving: 0 }));
  const fastest = Math.max(...leading(alone).blocks.map((block) => block.growthRate));
  expect(found.growthRate).toBeGreaterThan(fastest * (1 - 1e-5));
  expect(found.growthRate).toBeLessThanOrEqual(fastest * (1 + 1e-12));
});

// Derived: away from the patch that grows, (ρ − s) w_i = m (w_{i−1} + w_{i+1}), so w falls by r with (ρ − s) r = m (1 + r²) from patch
// to patch, and m (r − 1/r) + 1.2 − s = 0 at the patch itself.
test('a line of 700 patches: entries far below rounding are as accurate as large ones', () => {
  const [size, source, here, stay, moved] = [700, 200, 1.2, 0.8, 0.05];
  const [rowIndex, columnIndex, values]: [number[], number[], number[]] = [[], [], []];
  const put = (row: number, column: number, value: number): void => {
    if (row < 0 || row >= size) return;
    rowIndex.push(row);
    columnIndex.push(column);
    values.push(value);
  };
  for (let i = 0; i < size; i++) {
    put(i, i, i === source ? here : stay);
    put(i - 1, i, moved);
    put(i + 1, i, moved);
  }
  const { growthRate, right, left } = leading(
    sparseFromTriplets({ rows: size, columns: size, rowIndex, columnIndex, values }),
  );
  const half = (here - stay) / moved / 2;
  const r = Math.sqrt(half * half + 1) - half;
  expect(growthRate).toBeCloseTo(stay + moved * (r + 1 / r), 12);
  for (const vector of [right!, left!]) {
    for (const distance of [1, 3, 10, 40, 100, 180]) {
      for (const place of [source - distance, source + distance]) {
        expect(Math.log(vector[place]! / vector[source]!) / Math.log(r) / distance).toBeCloseTo(1, 9);
        expect(vector[place + 1]! / vector[place]! / (place < source ? 1 / r : r)).toBeCloseTo(1, 9);
      }
    }
  }
});
