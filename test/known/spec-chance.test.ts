// Chances with closed forms, from a spec through the kernel to the results. Seeds are fixed.
import { describe, expect, test } from 'vitest';
import { runModel } from '../../src/pipeline.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';

/** Half-width of what a right answer stays within: 4.5 standard errors, missed once in 150,000. */
function within(chance: number, runs: number): number {
  return 4.5 * Math.sqrt((chance * (1 - chance)) / runs);
}

describe('twenty animals without young, of which 0.8 survive a year (derived)', () => {
  const replicates = 40_000;
  const results = runModel(
    compileText(
      framed(
        `classes: [animal]
survival: { animal: 0.8 }
year: [count, survival]
start: { table: { Meadow: { animal: 20 } } }
outcomes: { gone: { of: all, below: 1 } }
run: { replicates: ${replicates}, seed: 21 }
`,
        { years: 120 },
      ),
    ),
  );
  const { byYear, ever } = results.outcomes[0]!;
  const goneBy = (t: number): number => (1 - 0.8 ** t) ** 20;

  test('all gone by the tenth count with a chance of 0.1031309', () => {
    expect(goneBy(10)).toBeCloseTo(0.1031309, 7);
    expect(Math.abs(byYear[9]!.ever - 0.1031309)).toBeLessThan(within(0.1031309, replicates));
  });

  test('the whole curve: chance (1 − 0.8^t)²⁰ at every count, in the band that holds for all of it', () => {
    byYear.forEach(({ ever, lower, upper, now }, i) => {
      expect(Math.abs(ever - goneBy(i + 1))).toBeLessThan(4.5 * 0.5 * Math.sqrt(1 / replicates));
      expect(lower).toBeLessThanOrEqual(ever);
      expect(upper).toBeGreaterThanOrEqual(ever);
      // Nobody comes back.
      expect(now).toBe(ever);
    });
    expect(ever.probability).toBeGreaterThan(0.9999);
  });

  test('lasts 16.62 years on average', () => {
    // Mean of the time is the sum of the chances of not being gone yet; its SD is below 6 years.
    const mean = byYear.reduce((sum, { ever }) => sum + (1 - ever), 1);
    expect(Math.abs(mean - 16.62298)).toBeLessThan((4.5 * 6) / Math.sqrt(replicates));
  });

  test('numbers: mean 20 · 0.8^t, variance 20 · 0.8^t (1 − 0.8^t)', () => {
    for (const t of [1, 5, 10]) {
      const share = 0.8 ** t;
      const { mean, sd } = results.abundance.whole[t]!;
      const variance = 20 * share * (1 - share);
      expect(Math.abs(mean - 20 * share)).toBeLessThan(4.5 * Math.sqrt(variance / replicates));
      expect(Math.abs(sd ** 2 / variance - 1)).toBeLessThan(4.5 * Math.sqrt(2.2 / replicates));
    }
  });
});

describe('only ageing: extinction is certain at exactly the number of classes (derived)', () => {
  const results = runModel(
    compileText(
      framed(
        `classes: [one, two, three, four]
oldest: terminal
year: [count, ageing]
start: { table: { Meadow: { one: 4, two: 3, three: 2, four: 1 } } }
outcomes: { gone: { of: all, below: 1 } }
run: { replicates: 50, seed: 1 }
`,
        { years: 6 },
      ),
    ),
  );

  test('never before the fourth count, always at it', () => {
    expect(results.outcomes[0]!.byYear.map((one) => one.ever)).toEqual([0, 0, 0, 1, 1, 1]);
    expect(results.abundance.whole.map((one) => one.mean)).toEqual([10, 9, 7, 4, 0, 0, 0]);
    expect(results.abundance.whole.every((one) => one.sd === 0)).toBe(true);
  });
});
