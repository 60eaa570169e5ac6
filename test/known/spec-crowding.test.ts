// Crowding in one patch that all breed once in: the classical maps of one number.
import { describe, expect, test } from 'vitest';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { largestDifference, pathOf } from '../pipeline/measure.ts';

interface Crowded {
  readonly form: 'beverton-holt' | 'ricker';
  readonly births: string;
  readonly years: number;
}

/** Counts from 10 animals towards a capacity of 100. */
function countsOf({ form, births, years }: Crowded): readonly number[] {
  const text = framed(
    `classes: [animal]
demography: { births: [["${births}"]] }
year: [count, demography]
crowding: { form: ${form}, changes: { births: [animal] }, counted: [animal], capacity: 100 }
start: { table: { Meadow: { animal: 10 } } }
`,
    { years },
  );
  return pathOf(compileText(text)).map(([animals]) => animals!);
}

describe('Beverton & Holt 1957, R = 2, K = 100 (analytic)', () => {
  const counts = countsOf({ form: 'beverton-holt', births: '2', years: 60 });

  test('the path from 10', () => {
    const found = [1, 2, 5, 10].map((t) => counts[t]!);
    expect(largestDifference(found, [18.1818182, 30.7692308, 78.0487805, 99.1287512])).toBeLessThan(6e-8);
  });

  test('N(t) = K / (1 + (K/N₀ − 1) R^−t) at every count', () => {
    const wanted = counts.map((_, t) => 100 / (1 + 9 / 2 ** t));
    expect(largestDifference(counts, wanted)).toBeLessThan(1e-11);
  });
});

describe('Ricker 1954 (thresholds from memory of May 1974; cycles derived)', () => {
  test('r = 1.5 settles at K', () => {
    const counts = countsOf({ form: 'ricker', births: 'exp(1.5)', years: 200 });
    expect(counts[200]).toBeCloseTo(100, 10);
    expect(counts[1]).toBeCloseTo(10 * Math.exp(1.5 * 0.9), 10);
  });

  test('r = 2.2 swings between 0.497 K and 1.503 K', () => {
    const counts = countsOf({ form: 'ricker', births: 'exp(2.2)', years: 1001 });
    const [low, high] = [...counts.slice(-2)].sort((a, b) => a - b);
    expect(Math.abs(low! - 49.70594)).toBeLessThan(6e-6);
    expect(Math.abs(high! - 150.29406)).toBeLessThan(6e-6);
  });

  test('r = 2.6 goes round four counts', () => {
    const counts = countsOf({ form: 'ricker', births: 'exp(2.6)', years: 4000 });
    const found = [...counts.slice(-4)].sort((a, b) => a - b);
    expect(largestDifference(found, [18.1222, 39.0846, 152.3166, 190.4765])).toBeLessThan(6e-5);
  });
});
