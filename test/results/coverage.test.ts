// Whether 95 % intervals hold what they claim, over 2,000 small studies with a known truth (that of the model, not of nature).
import { expect, test } from 'vitest';
import { uniformAt } from '../../src/machine/random.ts';
import { normalBelow } from '../../src/numeric/normal.ts';
import { normalQuantile } from '../../src/numeric/normal-quantile.ts';
import { intervalFromRuns, intervalFromUnknown } from '../../src/results/draws/intervals.ts';
import { wilson } from '../../src/results/wilson.ts';
import { runReplicates } from '../kernel/collect.ts';
import { compileText } from '../pipeline/compile-text.ts';

const studies = 2000;

function between(share: number): void {
  expect(share).toBeGreaterThan(0.925);
  expect(share).toBeLessThan(0.975);
}

// Derived: 20 animals that die alone, survival 0.8: all gone by year 10 with the chance (1 − 0.8^10)^20 = 0.1031309.
test('intervals from the number of runs', () => {
  const { image } = compileText(`skein: 1
study: { title: Pure death }
years: 10
patches: [{ name: A }]
counts: females
classes: [adult]
oldest: open-ended
survival: { adult: 0.8 }
year: [count, survival]
start: { table: { A: { adult: 20 } } }
`);
  const each = 80;
  const { counts, columns } = runReplicates(image, { replicates: studies * each, steps: 10, seed: 8 });
  const last = counts.subarray(10 * columns * studies * each, (10 * columns + 1) * studies * each);
  const truth = (1 - 0.8 ** 10) ** 20;
  let held = 0;
  let all = 0;
  for (let study = 0; study < studies; study++) {
    const hits = last.subarray(study * each, (study + 1) * each).reduce((sum, n) => sum + (n === 0 ? 1 : 0), 0);
    all += hits;
    const { lower, upper } = wilson(hits, each);
    if (lower <= truth && truth <= upper) held++;
  }
  expect(Math.abs(all / (studies * each) - truth)).toBeLessThan(
    5.5 * Math.sqrt((truth * (1 - truth)) / (studies * each)),
  );
  between(held / studies);
});

/** A normal number of its own for each study, draw and purpose. */
function normal(study: number, draw: number, what: number): number {
  return normalQuantile(uniformAt({ seed: 77, words: [study, what, 1] }, draw));
}

/** Successes of n, by inversion. */
function binomial(n: number, p: number, u: number): number {
  let chance = (1 - p) ** n;
  let k = 0;
  let sum = chance;
  while (u > sum && k < n) {
    k++;
    chance *= ((n - k + 1) / k) * (p / (1 - p));
    sum += chance;
  }
  return k;
}

/** The risk of a study whose one parameter is θ. */
function riskOf(theta: number): number {
  return 0.02 + 0.9 * normalBelow(theta - 1.2);
}

// Each study estimates θ = 0 with a standard error of 0.6, draws 79 values around its estimate and runs each 60 times.
test('intervals from what is not known, and what pooled runs would have claimed', () => {
  const [draws, runs, error] = [79, 60, 0.6];
  let [held, pooled] = [0, 0];
  const truth = riskOf(0);
  for (let study = 0; study < studies; study++) {
    const estimate = error * normal(study, 0, 2);
    const counts = Array.from({ length: draws }, (_, d) => {
      const risk = riskOf(estimate + error * normal(study, d + 1, 3));
      return { hits: binomial(runs, risk, uniformAt({ seed: 78, words: [study, 4, 1] }, d)), runs };
    });
    const { lower, upper } = intervalFromUnknown(counts)!;
    if (lower <= truth && truth <= upper) held++;
    const hits = counts.reduce((sum, one) => sum + one.hits, 0);
    const whole = wilson(hits, draws * runs);
    if (whole.lower <= truth && truth <= whole.upper) pooled++;
  }
  between(held / studies);
  expect(pooled / studies).toBeLessThan(0.3);
});

// The mean chance over all draws that there could be, here with 60 draws of 30 runs.
test('intervals from the number of draws and runs', () => {
  const [draws, runs] = [60, 30];
  const nodes = Array.from({ length: 4001 }, (_, i) => -8 + i * 0.004);
  const weights = nodes.map((z) => Math.exp((-z * z) / 2));
  const all = weights.reduce((a, b) => a + b, 0);
  const truth = nodes.reduce((sum, z, i) => sum + (weights[i]! / all) * riskOf(0.6 * z), 0);
  let held = 0;
  const fewer = 400;
  for (let study = 0; study < fewer; study++) {
    const counts = Array.from({ length: draws }, (_, d) => {
      const risk = riskOf(0.6 * normal(study, d, 5));
      return { hits: binomial(runs, risk, uniformAt({ seed: 78, words: [study, 6, 1] }, d)), runs };
    });
    const { lower, upper } = intervalFromRuns(counts);
    if (lower <= truth && truth <= upper) held++;
  }
  expect(held / fewer).toBeGreaterThan(0.915);
  expect(held / fewer).toBeLessThan(0.985);
});
