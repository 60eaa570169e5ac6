import { describe, expect, test } from 'vitest';
import {
  describe as describeState,
  equilibriaFrom,
  equilibriumFrom,
  invasionGrowth,
  sharpen,
  startThreshold,
} from '../../src/analysis/equilibrium.ts';
import type { YearMap } from '../../src/analysis/year-map.ts';
import { findRoot } from '../../src/numeric/root.ts';
import { sparseFromRows } from '../../src/numeric/sparse.ts';

/** One class whose multiplier is a function of its number. */
function oneClass(multiplier: (animals: number) => number): YearMap {
  return {
    states: 1,
    apply: (n) => Float64Array.of(n[0]! * multiplier(n[0]!)),
    matrixAt: (n) => sparseFromRows([[multiplier(n[0]!)]]),
  };
}
const one = (animals: number): Float64Array => Float64Array.of(animals);

describe('Beverton-Holt with R = 2, K = 100 (Beverton & Holt 1957; analytic)', () => {
  const map = oneClass((n) => 2 / (1 + n / 100));

  test('its first years', () => {
    const years: number[] = [10];
    for (let t = 0; t < 10; t++) years.push(map.apply(one(years[t]!))[0]!);
    const expected = [
      [1, 18.1818182],
      [2, 30.7692308],
      [5, 78.0487805],
      [10, 99.1287513],
    ] as const;
    expected.forEach(([t, value]) => expect(years[t]).toBeCloseTo(value, 6));
  });

  test('stands still at K and comes back at 1/R a year; invades at R', () => {
    const found = equilibriumFrom(map, one(10))!;
    expect(found.animals[0]).toBeCloseTo(100, 9);
    expect(found.leadingModulus).toBeCloseTo(0.5, 8);
    expect(found.stable).toBe(true);
    expect(invasionGrowth(map)).toBe(2);
  });
});

describe('Ricker (Ricker 1954; May 1974 from memory; cycles derived)', () => {
  const ricker = (r: number): YearMap => oneClass((n) => Math.exp(r * (1 - n)));

  test('r = 1.5 stands still at K with slope 1 − r', () => {
    const found = equilibriumFrom(ricker(1.5), one(0.1))!;
    expect(found.animals[0]).toBeCloseTo(1, 10);
    expect(found.leadingModulus).toBeCloseTo(0.5, 8);
  });

  test('r = 2.2 does not stand still but swings between 0.497 K and 1.503 K', () => {
    const map = ricker(2.2);
    expect(equilibriumFrom(map, one(0.3), 3000)).toMatchObject({ stable: false });
    let n = one(0.3);
    for (let t = 0; t < 3000; t++) n = map.apply(n);
    const pair = [n[0]!, map.apply(n)[0]!].sort((a, b) => a - b);
    expect(pair[0]).toBeCloseTo(0.4970594, 6);
    expect(pair[1]).toBeCloseTo(1.5029406, 6);
  });

  test('the equilibrium of r = 2.2 exists but is not stable', () => {
    const map = ricker(2.2);
    expect(sharpen(map, one(0.9))![0]).toBeCloseTo(1, 10);
  });

  test('r = 2.6 swings over four years', () => {
    const map = ricker(2.6);
    let n = one(0.3);
    for (let t = 0; t < 4000; t++) n = map.apply(n);
    const cycle = [0, 1, 2, 3].map(() => (n = map.apply(n))[0]!).sort((a, b) => a - b);
    [0.181222, 0.390846, 1.523166, 1.904765].forEach((value, k) => expect(cycle[k]).toBeCloseTo(value, 6));
  });
});

// Derived: 1 ∓ δ are the two ends of the swing over two years where r = ln((1 + δ)/(1 − δ))/δ. A page of a public gallery prints 7.25 for
// the first threshold; e² = 7.389 is right.
describe('Ricker: where it stops to stand still, and where a swing of two years becomes one of four (May 1974 from memory; derived)', () => {
  const growing = (r: number) => (n: number) => n * Math.exp(r * (1 - n));

  test('the standstill stops to be stable at r = 2, a growth of 7.389', () => {
    const modulus = (r: number): number =>
      describeState(
        oneClass((n) => Math.exp(r * (1 - n))),
        one(1),
      ).leadingModulus;
    const threshold = findRoot((r) => modulus(r) - 1, { low: 1.5, high: 2.5 })!;
    expect(threshold).toBeCloseTo(2, 7);
    expect(Math.exp(threshold)).toBeCloseTo(7.3890561, 5);
  });

  test('the swing of two years at r = 2.526467726, a growth of 12.509', () => {
    const modulus = (r: number): number => {
      const delta = findRoot((d) => Math.log((1 + d) / (1 - d)) / d - r, { low: 1e-6, high: 1 - 1e-9 })!;
      const year = growing(r);
      const twoYears = oneClass((n) => year(year(n)) / n);
      expect(year(year(1 - delta))).toBeCloseTo(1 - delta, 9);
      return describeState(twoYears, one(1 - delta)).leadingModulus;
    };
    const threshold = findRoot((r) => modulus(r) - 1, { low: 2.4, high: 2.6 })!;
    expect(threshold).toBeCloseTo(2.526467726, 6);
    expect(Math.exp(threshold)).toBeCloseTo(12.5092419, 4);
  });
});

test('Hassell with λ = 5, a = 0.01, b = 4 (Hassell 1975; analytic)', () => {
  const found = equilibriumFrom(
    oneClass((n) => 5 / (1 + 0.01 * n) ** 4),
    one(10),
  )!;
  expect(found.animals[0]).toBeCloseTo(49.5348781, 7);
  expect(found.leadingModulus).toBeCloseTo(0.3250388, 7);
  const limit = (4 / 2) ** 4;
  const slope = (growth: number): number => 1 - 4 * (1 - growth ** (-1 / 4));
  expect(slope(limit)).toBeCloseTo(-1, 12);
});

describe('a sigmoid with an Allee threshold: 100 N² / (30² + N²) (analytic)', () => {
  const map = oneClass((n) => (100 * n) / (900 + n * n));

  test('two stable states, nobody and 90, and the threshold 10 between them', () => {
    const found = equilibriaFrom(map, [one(5), one(50), one(200)]);
    expect(found.map((each) => Math.round(each.animals[0]! * 1e6) / 1e6)).toEqual([90, 0]);
    expect(found.every((each) => each.stable)).toBe(true);
    const threshold = startThreshold(map, one(1), [0.1, 80])!;
    expect(threshold.lastsAbove).toBeCloseTo(10, 7);
    expect(sharpen(map, one(11))![0]).toBeCloseTo(10, 9);
  });

  test('there is none where every start lasts', () => {
    expect(
      startThreshold(
        oneClass((n) => 2 / (1 + n / 100)),
        one(1),
        [1e-3, 100],
      ),
    ).toBeNull();
  });
});

test('two classes with crowded births: the equilibrium solves A(n)n = n, and its Jacobian agrees with a given one', () => {
  const births = (adults: number): number => 1.2 / (1 + 0.02 * adults);
  const plain: YearMap = {
    states: 2,
    apply: (n) => Float64Array.of(births(n[1]!) * n[1]!, 0.3 * n[0]! + 0.8 * n[1]!),
    matrixAt: (n) =>
      sparseFromRows([
        [0, births(n[1]!)],
        [0.3, 0.8],
      ]),
  };
  const exact: YearMap = {
    ...plain,
    jacobianAt: (n) =>
      sparseFromRows([
        [0, 1.2 / (1 + 0.02 * n[1]!) ** 2],
        [0.3, 0.8],
      ]),
  };
  const found = equilibriumFrom(plain, Float64Array.of(1, 1))!;
  expect(found.animals[1]).toBeCloseTo((1.2 * 0.3 - 0.2) / (0.2 * 0.02), 8);
  expect(found.leadingModulus).toBeCloseTo(equilibriumFrom(exact, Float64Array.of(1, 1))!.leadingModulus, 8);
});

test('many states: the return rate is found without the whole Jacobian', () => {
  const size = 402;
  const map: YearMap = {
    states: size,
    apply: (n) => n.map((value, i) => ((1.5 + 0.2 * (i % 3)) * value) / (1 + value / 10)),
    matrixAt: () => sparseFromRows([[1]]),
  };
  const found = equilibriumFrom(map, new Float64Array(size).fill(1))!;
  expect(found.leadingModulus).toBeCloseTo(1 / 1.5, 6);
});

describe('many patches without links, each Beverton-Holt with R = 2 (analytic)', () => {
  const states = 120;
  const rate = (p: number, n: number): number => 2 / (1 + n / (50 + p));
  const many: YearMap = {
    states,
    apply: (n) => n.map((own, p) => own * rate(p, own)),
    matrixAt: (n) => sparseFromRows(Array.from(n, (own, p) => Array.from(n, (_, q) => (p === q ? rate(p, own) : 0)))),
  };
  const start = new Float64Array(states).fill(10);

  test('stand still at their own capacities, once, whichever starts lead there', () => {
    const found = equilibriaFrom(many, [start, start.map((n) => 20 * n)]);
    expect(found).toHaveLength(1);
    found[0]!.animals.forEach((n, p) => expect(n).toBeCloseTo(50 + p, 8));
    expect(found[0]!.leadingModulus).toBeCloseTo(0.5, 8);
  });
});

test('two years that swing are followed no longer than asked', () => {
  let years = 0;
  const states = 500;
  const swing: YearMap = {
    states,
    apply: (n) => {
      years++;
      return n.map((own) => own * Math.exp(2.2 * (1 - own)));
    },
    matrixAt: () => sparseFromRows([[1]]),
  };
  const starts = [0.3, 0.6].map((n) => new Float64Array(states).fill(n));
  expect(equilibriaFrom(swing, starts, 50)).toEqual([]);
  expect(years).toBeLessThanOrEqual(2 * 51);
});
