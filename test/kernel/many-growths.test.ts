import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { openManySolver, type ManyGrowths } from '../../src/kernel/many-growths.ts';
import { eigenvalues } from '../../src/numeric/eigenvalues.ts';
import { leading } from '../../src/numeric/leading.ts';
import { multiply, multiplyTransposed } from '../../src/numeric/sparse-product.ts';
import { sparseFromRows, toDense } from '../../src/numeric/sparse.ts';
import { ageingOnly, bernardelli, killerWhale, loggerhead, teasel, twoStage, wielandt } from '../numeric/published.ts';
import { anyIrreducible, irreducibleRows, stream } from '../numeric/random-matrix.ts';

type Rows = readonly (readonly number[])[];

const solver = openManySolver();
const flat = (matrices: readonly Rows[]): Float64Array => Float64Array.from(matrices.flat(2));
const solve = (matrices: readonly Rows[]): Required<ManyGrowths> => {
  const order = matrices[0]!.length;
  const found = solver.solve({ matrices: flat(matrices), order, vectors: true, elasticities: true });
  return found as Required<ManyGrowths>;
};
const largest = (rows: Rows): number => {
  const all = eigenvalues(toDense(sparseFromRows(rows)));
  return Math.max(...all.map(({ re, im }) => Math.hypot(re, im)));
};
const close = (found: number, expected: number, tolerance: number): void => {
  expect(Math.abs(found - expected)).toBeLessThanOrEqual(tolerance * Math.abs(expected));
};

/** Largest relative miss of any entry of A w = λ w and Aᵀ v = λ v. */
function miss(rows: Rows, growthRate: number, right: Float64Array, left: Float64Array): number {
  const matrix = sparseFromRows(rows);
  const off = (image: Float64Array, x: Float64Array): number =>
    image.reduce((most, value, i) => Math.max(most, Math.abs(value / (growthRate * x[i]!) - 1)), 0);
  return Math.max(off(multiply(matrix, right), right), off(multiplyTransposed(matrix, left), left));
}

/** Ages whose last also stays, with some that grow back: mostly zeros. */
function lifeCycle(order: number, seed: number): number[][] {
  const next = stream(seed);
  const rows = Array.from({ length: order }, () => new Array<number>(order).fill(0));
  for (let j = 0; j < order; j++) {
    if (j > order / 5) rows[0]![j]! += 3 * next();
    if (next() < 0.3) rows[Math.max(0, j - 1)]![j]! += 0.1 * next();
    rows[Math.min(j + 1, order - 1)]![j]! += 0.3 + 0.6 * next();
  }
  return rows;
}

describe('known growth', () => {
  test('two stages have their closed form (derived)', () => {
    const { growthRate, right, left, error } = solve([twoStage, twoStage]);
    const expected = (0.8 + Math.sqrt(0.64 + 1.44)) / 2;
    close(growthRate[0]!, expected, 1e-14);
    close(right[2]!, 1.2 / (1.2 + expected), 1e-13);
    close(left[3]!, expected / 0.3, 1e-13);
    expect(error[1]).toBeLessThan(1e-12);
  });

  test('the loggerhead turtle declines at 0.945 (Crouse, Crowder & Caswell 1987), teasel grows at 2.334 (from memory of Caswell 2001)', () => {
    expect(solve([loggerhead]).growthRate[0]).toBeCloseTo(0.94503098, 8);
    const plant = solve([teasel]);
    expect(plant.growthRate[0]).toBeCloseTo(2.33388017, 8);
    // Elasticities sum to 1 (de Kroon et al. 1986).
    close(
      plant.elasticities.reduce((sum, value) => sum + value, 0),
      1,
      1e-13,
    );
  });

  test('one state grows by its entry', () => {
    const { growthRate, period } = solve([[[0.7]], [[0]], [[1.2]]]);
    expect([...growthRate]).toEqual([0.7, 0, 1.2]);
    expect([...period]).toEqual([1, 0, 1]);
  });
});

describe('matrices that a multiplication alone would mislead about', () => {
  test('three ages that breed once come back every three years and keep their number (Bernardelli 1941)', () => {
    const { growthRate, period, right } = solve([bernardelli]);
    close(growthRate[0]!, 1, 1e-14);
    expect(period[0]).toBe(3);
    expect(miss(bernardelli, 1, right, solve([bernardelli]).left)).toBeLessThan(1e-13);
  });

  test('the slowest primitive pattern is told as primitive (Wielandt 1950)', () => {
    const { growthRate, period } = solve([wielandt]);
    expect(period[0]).toBe(1);
    close(growthRate[0]!, largest(wielandt), 1e-12);
  });

  test('a post-reproductive class is told as reducible, its vectors are those of the whole', () => {
    const { growthRate, period, right, left, without } = solve([killerWhale, wielandt]);
    expect([...period]).toEqual([0, 1]);
    expect(growthRate[0]).toBeCloseTo(1.02544133, 8);
    const whole = leading(sparseFromRows(killerWhale));
    expect([...right.subarray(0, 4)]).toEqual([...whole.right!]);
    expect([...left.subarray(0, 4)]).toEqual([...whole.left!]);
    expect(without.size).toBe(0);
  });

  test('where nobody comes back, growth is 0 and the reason is told', () => {
    const order = ageingOnly.length;
    const { growthRate, right, elasticities, without } = solve([irreducibleRows(order, 1, 4), ageingOnly]);
    expect(growthRate[1]).toBe(0);
    expect(right[order]).toBeNaN();
    expect(elasticities.subarray(order * order).every(Number.isNaN)).toBe(true);
    expect([...without.keys()]).toEqual([1]);
    expect(without.get(1)).toContain('nothing persists');
  });

  test('two groups that never meet and grow alike have no vectors', () => {
    const apart = [
      [0.9, 0],
      [0, 0.9],
    ];
    const { growthRate, without, left } = solve([apart]);
    expect(growthRate[0]).toBe(0.9);
    expect(left[0]).toBeNaN();
    expect(without.get(0)).toContain('equally fast');
  });

  test.each([
    ['entries over nine orders of magnitude', (next: () => number) => Math.exp(-18 + 22 * next())],
    ['entries over thirty orders of magnitude', (next: () => number) => Math.exp(-60 + 70 * next())],
    ['nearly cut in two', (next: () => number) => (next() < 0.5 ? 1e-13 : 1) * next()],
  ])('%s', (_name, entry) => {
    for (let seed = 1; seed <= 20; seed++) {
      const next = stream(seed);
      const rows = irreducibleRows(12, 0.3, seed).map((row) => row.map((value) => (value > 0 ? entry(next) : 0)));
      const { growthRate, error } = solve([rows]);
      close(growthRate[0]!, leading(sparseFromRows(rows)).growthRate, 1e-12 + error[0]!);
    }
  });
});

describe('any irreducible matrix', () => {
  test('has the growth of its largest eigenvalue, vectors that it multiplies, elasticities as shares', () => {
    fc.assert(
      fc.property(anyIrreducible, (rows) => {
        const { growthRate, error, period, right, left, elasticities } = solve([rows]);
        const whole = leading(sparseFromRows(rows));
        close(growthRate[0]!, whole.growthRate, 1e-12);
        expect(period[0]).toBe(whole.period);
        expect(error[0]).toBeLessThan(1e-12);
        expect(miss(rows, growthRate[0]!, right, left)).toBeLessThan(1e-11);
        close(
          elasticities.reduce((sum, value) => sum + value, 0),
          1,
          1e-12,
        );
      }),
      { seed: 11, numRuns: 300 },
    );
  });

  test.each([2, 3, 4, 5, 17, 50, 63, 64, 65, 66, 130])('of order %i', (order) => {
    for (const rows of [lifeCycle(order, order), irreducibleRows(order, 0.5, order)]) {
      const { growthRate, right, left, period } = solve([rows]);
      close(growthRate[0]!, largest(rows), 1e-11);
      expect(period[0]).toBe(leading(sparseFromRows(rows)).period);
      expect(miss(rows, growthRate[0]!, right, left)).toBeLessThan(1e-11);
    }
  });

  test('elasticities are what growth does when an entry changes', () => {
    const rows = lifeCycle(6, 3);
    const { elasticities } = solve([rows]);
    rows.forEach((row, i) => {
      row.forEach((value, j) => {
        if (value === 0) return;
        const changed = [1 + 1e-5, 1 - 1e-5].map((factor) =>
          rows.map((other, r) => other.map((entry, c) => (r === i && c === j ? entry * factor : entry))),
        );
        const { growthRate } = solve(changed);
        const slope = (Math.log(growthRate[0]!) - Math.log(growthRate[1]!)) / 2e-5;
        expect(elasticities[i * 6 + j]).toBeCloseTo(slope, 8);
      });
    });
  });
});

describe('many at a time', () => {
  const order = 7;
  const all = Array.from({ length: 41 }, (_, k) =>
    k % 5 === 3 ? irreducibleRows(order, 0.2, k + 1) : lifeCycle(order, k + 1),
  );
  const odd = [
    ...all.slice(0, 20),
    all[0]!.map((row, i) => row.map((value) => (i === 0 ? 0 : value))),
    ...all.slice(20),
  ];

  test('each result is the same to the last bit alone, among others and in another order', () => {
    const together = solve(odd);
    const turned = solve(odd.toReversed());
    odd.forEach((rows, k) => {
      const alone = solve([rows]);
      const back = odd.length - 1 - k;
      expect([together.growthRate[k], turned.growthRate[back]]).toEqual([alone.growthRate[0], alone.growthRate[0]]);
      expect(together.right.subarray(k * order, (k + 1) * order)).toEqual(alone.right);
      expect(turned.left.subarray(back * order, (back + 1) * order)).toEqual(alone.left);
      expect(together.error[k]).toBe(alone.error[0]);
    });
  });

  test('growth alone is the growth that comes with vectors, and orders may follow one another', () => {
    const matrices = flat(odd);
    const withVectors = solve(odd);
    solve([lifeCycle(30, 1)]);
    expect(solver.solve({ matrices, order }).growthRate).toEqual(withVectors.growthRate);
  });

  test('a start from like vectors leads to the same answer', () => {
    const { right, left } = solve([all[1]!]);
    const near = all.map((_, k) => all[1]!.map((row) => row.map((value) => value * (1 + 0.01 * k))));
    const cold = solver.solve({ matrices: flat(near), order });
    const warm = solver.solve({ matrices: flat(near), order, start: { right, left } });
    near.forEach((_, k) => {
      close(warm.growthRate[k]!, cold.growthRate[k]!, 2e-13);
    });
  });

  test('more than are given to the kernel at once', () => {
    const matrices = Array.from({ length: 1500 }, (_, k) => irreducibleRows(8, 0.6, k + 1));
    const { growthRate } = solver.solve({ matrices: flat(matrices), order: 8 });
    [0, 1, 1023, 1024, 1025, 1499].forEach((k) => {
      close(growthRate[k]!, largest(matrices[k]!), 1e-11);
    });
  });

  test('arrays of an earlier request are written over where they fit', () => {
    const wishes = { order, vectors: true, elasticities: true };
    const before = solver.solve({ ...wishes, matrices: flat(all) });
    const turned = flat(all.toReversed());
    const fresh = solver.solve({ ...wishes, matrices: turned });
    const again = solver.solve({ ...wishes, matrices: turned, reuse: before });
    expect(again).toEqual(fresh);
    expect(again.elasticities).toBe(before.elasticities);
    const fewer = solver.solve({ ...wishes, matrices: flat(all.slice(0, 3)), reuse: before });
    expect(fewer.growthRate.length).toBe(3);
  });

  test('none are none', () => {
    expect(solver.solve({ matrices: new Float64Array(0), order: 3, vectors: true }).growthRate.length).toBe(0);
  });
});

describe('what is no projection matrix', () => {
  const good = irreducibleRows(3, 1, 1);
  const withEntry = (value: number): number[][] => [...good.slice(0, 2), [0.1, value, 0.2]];
  test.each([-0.5, NaN, Infinity])('an entry of %d is told with its place', (value) => {
    expect(() => solve([good, withEntry(value)])).toThrow(`Matrix 1 has ${value} in row 3, column 2`);
  });
  test('lengths that do not fit', () => {
    expect(() => solver.solve({ matrices: new Float64Array(10), order: 3 })).toThrow('no whole number of matrices');
    expect(() => solver.solve({ matrices: new Float64Array(9), order: 1.5 })).toThrow('order 1.5');
    const start = { right: Float64Array.of(1, 0, 1), left: Float64Array.of(1, 1, 1) };
    expect(() => solver.solve({ matrices: new Float64Array(9), order: 3, start })).toThrow('3 positive numbers');
  });
});
