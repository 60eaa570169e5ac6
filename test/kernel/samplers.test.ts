import { describe, expect, it } from 'vitest';
import { loadMachine } from '../../src/machine/machine.ts';
import { binomialChance, chiSquareScore, hypergeometricChance, poissonChance } from './exact.ts';

const machine = loadMachine();
const draws = 80_000;
const work = machine.reserve(1024);
const out = machine.reserve(draws * 8);

const what = { binomial: 0, poisson: 1, hypergeometric: 2, four: 3 } as const;

function sample(kind: keyof typeof what, n: number, x: number, m = 0): Float64Array {
  new Float64Array(machine.memory.buffer, work, 1)[0] = x;
  new Int32Array(machine.memory.buffer, work + 8, 3).set([what[kind], n, m]);
  machine.probeSample(out, draws, work);
  return new Float64Array(machine.memory.buffer, out, draws).slice();
}

// About ninety one-sided chi-square tests in this file: 1e-8 each, so that a false alarm has a chance below 1e-6 in all.
const worst = 5.612;

const sizes = [1, 2, 3, 7, 20, 63, 64, 65, 100, 128, 129, 200, 1000, 20_000];
const chances = [0.004, 0.1, 0.3, 0.5, 0.7, 0.95];
const binomials = sizes.flatMap((n) => chances.map((p) => ({ n, p }))).filter(({ n, p }) => n * p * (1 - p) > 0.001);

describe('binomial draws', () => {
  it.each(binomials)('have the exact distribution for n = $n, p = $p', ({ n, p }) => {
    expect(chiSquareScore(sample('binomial', n, p), binomialChance(n, p))).toBeLessThan(worst);
  });

  it('are the same one by one and two by two, whatever the neighbour', () => {
    for (const n of [1, 5, 33, 64]) {
      for (const neighbour of [0, 1, 64]) {
        expect(sample('four', n, 0.37, neighbour)).toEqual(sample('binomial', n, 0.37));
      }
    }
  });

  it('never fall when n or p rises, up to 128 trials', () => {
    let before = sample('binomial', 1, 0.2);
    for (const [n, p] of [
      [1, 0.3],
      [2, 0.3],
      [40, 0.3],
      [64, 0.31],
      [65, 0.31],
      [127, 0.5],
      [128, 0.5],
      [128, 0.999],
    ] as const) {
      const now = sample('binomial', n, p);
      expect(now.every((k, i) => k >= before[i]!)).toBe(true);
      before = now;
    }
  });

  it('are none at chance 0 and all at chance 1', () => {
    for (const n of [1, 64, 128, 1000]) {
      expect(sample('binomial', n, 0).every((k) => k === 0)).toBe(true);
      expect(sample('binomial', n, 1).every((k) => k === n)).toBe(true);
    }
  });
});

describe('Poisson draws', () => {
  it.each([0.01, 0.3, 1, 4, 9.99, 10, 10.5, 30, 150, 5000])('have the exact distribution for mean %d', (mean) => {
    expect(chiSquareScore(sample('poisson', 0, mean), poissonChance(mean))).toBeLessThan(worst);
  });

  it('never fall when the mean rises, below 10', () => {
    const low = sample('poisson', 0, 4);
    expect(sample('poisson', 0, 4.5).every((k, i) => k >= low[i]!)).toBe(true);
  });
});

describe('draws without replacement', () => {
  it.each([
    { all: 10, kind: 4, taken: 3 },
    { all: 10, kind: 9, taken: 8 },
    { all: 50, kind: 25, taken: 25 },
    { all: 400, kind: 30, taken: 390 },
    { all: 3000, kind: 1200, taken: 700 },
  ])('have the exact distribution for $taken of $all with $kind of a kind', ({ all, kind, taken }) => {
    const chance = hypergeometricChance(all, kind, taken);
    expect(chiSquareScore(sample('hypergeometric', all, kind, taken), chance)).toBeLessThan(worst);
  });
});

// derived: large counts are compared by mean and variance only, to four and five standard errors.
describe('very large draws', () => {
  it.each([
    { kind: 'binomial' as const, n: 900_000_000, x: 0.3, mean: 2.7e8, variance: 1.89e8 },
    { kind: 'binomial' as const, n: 900_000_000, x: 5e-9, mean: 4.5, variance: 4.5 },
    { kind: 'poisson' as const, n: 0, x: 8e8, mean: 8e8, variance: 8e8 },
  ])('have the exact mean and variance: $kind, $n, $x', ({ kind, n, x, mean, variance }) => {
    const found = sample(kind, n, x);
    const average = found.reduce((a, b) => a + (b - mean), 0) / draws;
    const spread = found.reduce((a, b) => a + (b - mean) ** 2, 0) / draws;
    expect(Math.abs(average)).toBeLessThan(5 * Math.sqrt(variance / draws));
    expect(Math.abs(spread / variance - 1)).toBeLessThan(6 * Math.sqrt((2 + 1 / variance) / draws));
  });
});
