// How much was run at the points of a sweep, in words.
import { expect, test } from 'vitest';
import { andRuns, noneSeen } from '../../src/report/sweep/words.ts';
import type { QuantitySummary, SweepSummary } from '../../src/sweep/summary/summarise.ts';

type Asked = Pick<SweepSummary, 'runs' | 'factors'>;

const survival = { name: 'survival.adult', base: 0.8, unit: 'share' };
const summary = (replicates: number, years: number, factors = [survival]): SweepSummary =>
  ({ runs: { replicates, years, seed: 1 }, factors }) satisfies Asked as unknown as SweepSummary;

test('counts runs and years, and one of each', () => {
  expect(andRuns(summary(1200, 40))).toBe(', 1,200 runs of 40 years each');
  expect(andRuns(summary(1, 1))).toBe(', 1 run of 1 year each');
});

test('tells no years of the model where years are what is swept', () => {
  expect(andRuns(summary(20, 40, [{ name: 'years', base: 40, unit: '' }]))).toBe(', 20 runs each');
});

test('says what nothing seen may still be', () => {
  const never = { unit: 'share', least: 0 } satisfies Partial<QuantitySummary> as unknown as QuantitySummary;
  expect(noneSeen(never, summary(1, 40))).toMatch(/0\s% of 1 run of a point means at most 79\.3\s%/u);
});
