// Whether paired intervals hold what they claim: 95 of 100 of the time, over futures and over draws.
import { expect, test } from 'vitest';
import { meanDifference } from '../../src/compare/paired-mean.ts';
import {
  meanDifferenceFromRuns,
  meanDifferenceFromUnknown,
  shareDifferenceFromRuns,
  shareDifferenceFromUnknown,
} from '../../src/compare/over-draws.ts';
import { countPairs, pairedShareDifference, type PairedCounts } from '../../src/compare/paired-share.ts';
import { uniformAt } from '../../src/machine/random.ts';
import { normalBelow } from '../../src/numeric/normal.ts';
import { runReplicates } from '../kernel/collect.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { between, binomial, normals, studies } from '../results/small-studies.ts';

const normal = normals(91);

// Derived by hand from the formula of Bonett & Price 2012: p₁ = 5/102, p₂ = 13/102, se = √((18/102 − (8/102)²)/102).
test('the interval of two shares that were counted in the same futures', () => {
  const { estimate, lower, upper } = pairedShareDifference({ both: 10, onlyFrom: 4, onlyTo: 12, neither: 74 });
  expect(estimate).toBeCloseTo(0.08, 12);
  const se = Math.sqrt((18 / 102 - (8 / 102) ** 2) / 102);
  expect(lower).toBeCloseTo(8 / 102 - 1.959963984540054 * se, 12);
  expect(upper).toBeCloseTo(8 / 102 + 1.959963984540054 * se, 12);
});

test('plans that never ended apart are still not surely the same', () => {
  const { estimate, lower, upper } = pairedShareDifference({ both: 5, onlyFrom: 0, onlyTo: 0, neither: 95 });
  expect(estimate).toBe(0);
  expect(lower).toBeCloseTo(-upper, 15);
  expect(upper).toBeGreaterThan(0.01);
});

test('turning the plans round turns the interval round', () => {
  const there = pairedShareDifference({ both: 1, onlyFrom: 2, onlyTo: 9, neither: 30 });
  const back = pairedShareDifference({ both: 1, onlyFrom: 9, onlyTo: 2, neither: 30 });
  expect(back).toEqual({ estimate: -there.estimate, lower: -there.upper, upper: -there.lower });
});

test('futures that did not end under both plans are left out', () => {
  const counts = countPairs(Uint8Array.of(1, 1, 0, 0, 1), Uint8Array.of(1, 0, 1, 0, 0), Uint8Array.of(1, 1, 1, 1, 0));
  expect(counts).toEqual({ both: 1, onlyFrom: 1, onlyTo: 1, neither: 1 });
});

// Every outcome of n = 40 futures with its exact chance, for differences small and large. The chance is that of the model.
test.each([
  [0.02, 0.08],
  [0.05, 0.05],
  [0.1, 0.3],
  [0.01, 0.01],
])('exact coverage where it happens under one plan only in shares of %f and %f', (onlyFrom, onlyTo) => {
  const n = 40;
  const logFactorial = Array.from({ length: n + 1 }, () => 0);
  for (let i = 1; i <= n; i++) logFactorial[i] = logFactorial[i - 1]! + Math.log(i);
  let held = 0;
  for (let a = 0; a <= n; a++) {
    for (let b = 0; a + b <= n; b++) {
      const rest = n - a - b;
      const ways = logFactorial[n]! - logFactorial[a]! - logFactorial[b]! - logFactorial[rest]!;
      const chance = Math.exp(
        ways + a * Math.log(onlyFrom) + b * Math.log(onlyTo) + rest * Math.log(1 - onlyFrom - onlyTo),
      );
      const { lower, upper } = pairedShareDifference({ both: 0, onlyFrom: a, onlyTo: b, neither: rest });
      if (lower <= onlyTo - onlyFrom && onlyTo - onlyFrom <= upper) held += chance;
    }
  }
  expect(held).toBeGreaterThan(0.93);
});

function death(survival: number): string {
  return `skein: 1
study: { title: Pure death }
years: 10
patches: [{ name: A }]
counts: females
classes: [adult]
oldest: open-ended
survival: { adult: ${survival} }
year: [count, survival]
start: { table: { A: { adult: 20 } } }
`;
}

// Derived: 20 animals that die alone with survival s are all gone by year 10 with the chance (1 − s^10)^20, and 20 s^10 of
// them are left in the mean. Both plans run in the kernel under the same seed.
test('paired intervals over 2,000 studies of 200 futures under common chance', () => {
  const [each, years] = [200, 10];
  const last = (survival: number): Float64Array => {
    const { image } = compileText(death(survival));
    const { counts, columns } = runReplicates(image, { replicates: studies * each, steps: years, seed: 21 });
    return counts.slice(years * columns * studies * each, (years * columns + 1) * studies * each);
  };
  const [from, to] = [last(0.8), last(0.83)];
  const gone = (s: number) => (1 - s ** years) ** 20;
  const ended = new Uint8Array(each).fill(1);
  let [shares, means] = [0, 0];
  for (let study = 0; study < studies; study++) {
    const part = (counts: Float64Array) => counts.subarray(study * each, (study + 1) * each);
    const hits = (counts: Float64Array) => Uint8Array.from(part(counts), (n) => (n === 0 ? 1 : 0));
    const share = pairedShareDifference(countPairs(hits(from), hits(to), ended));
    const truth = gone(0.83) - gone(0.8);
    if (share.lower <= truth && truth <= share.upper) shares++;
    const left = part(to).map((n, i) => n - part(from)[i]!);
    const mean = meanDifference(left);
    const inMean = 20 * (0.83 ** years - 0.8 ** years);
    if (mean.lower <= inMean && inMean <= mean.upper) means++;
  }
  between(shares / studies);
  between(means / studies);
});

/** Risks of two plans at a value of the one parameter; wherever the second fails, so does the first. */
function risks(theta: number): readonly [number, number] {
  const from = 0.05 + 0.7 * normalBelow(theta - 0.6);
  return [from, 0.6 * from];
}

function study(key: number, draws: number, runs: number, thetaOf: (draw: number) => number): readonly PairedCounts[] {
  return Array.from({ length: draws }, (_, d) => {
    const [from, to] = risks(thetaOf(d));
    const hits = binomial(runs, from, uniformAt({ seed: 92, words: [key, 1, 1] }, d));
    const both = binomial(hits, to / from, uniformAt({ seed: 92, words: [key, 2, 1] }, d));
    return { both, onlyFrom: hits - both, onlyTo: 0, neither: runs - hits };
  });
}

// Each study estimates θ = 0 with a standard error of 0.6 and draws 79 values around its estimate; most of the spread of its
// differences is that of its runs.
test('intervals from what is not known, over 2,000 studies of 79 draws of 60 futures', () => {
  const [from, to] = risks(0);
  const truth = to - from;
  let [held, pooled] = [0, 0];
  for (let key = 0; key < studies; key++) {
    const estimate = 0.6 * normal(key, 0, 1);
    const draws = study(key, 79, 60, (d) => estimate + 0.6 * normal(key, d, 2));
    const { lower, upper } = shareDifferenceFromUnknown(draws)!;
    if (lower <= truth && truth <= upper) held++;
    const all = (part: keyof PairedCounts) => draws.reduce((sum, draw) => sum + draw[part], 0);
    const whole = pairedShareDifference({
      both: all('both'),
      onlyFrom: all('onlyFrom'),
      onlyTo: all('onlyTo'),
      neither: all('neither'),
    });
    if (whole.lower <= truth && truth <= whole.upper) pooled++;
  }
  between(held / studies);
  expect(pooled / studies).toBeLessThan(0.4);
});

test('intervals of the mean difference over draws, over 2,000 studies of 30 draws of 30 futures', () => {
  const nodes = Array.from({ length: 4001 }, (_, i) => -8 + i * 0.004);
  const weights = nodes.map((z) => Math.exp((-z * z) / 2));
  const all = weights.reduce((a, b) => a + b, 0);
  const truth = nodes.reduce((sum, z, i) => {
    const [from, to] = risks(0.6 * z);
    return sum + (weights[i]! / all) * (to - from);
  }, 0);
  let held = 0;
  for (let key = 0; key < studies; key++) {
    const draws = study(key + studies, 30, 30, (d) => 0.6 * normal(key, d, 3));
    const { lower, upper } = shareDifferenceFromRuns(draws);
    if (lower <= truth && truth <= upper) held++;
  }
  between(held / studies);
});

test('draws that all agree leave as much room as so many futures would', () => {
  const draws = Array.from({ length: 20 }, () => ({ both: 0, onlyFrom: 0, onlyTo: 0, neither: 50 }));
  const { estimate, lower, upper } = shareDifferenceFromRuns(draws);
  expect([estimate, upper > 0.05, lower < -0.05]).toEqual([0, true, true]);
  expect(shareDifferenceFromUnknown(draws)).toMatchObject({ lower: 0, upper: 0, from: 'what is not known' });
});

test('a draw of which no future came to its end changes nothing', () => {
  const draws = [3, 5, 4].map((onlyFrom) => ({ both: 2, onlyFrom, onlyTo: 1, neither: 9 }));
  const none = { both: 0, onlyFrom: 0, onlyTo: 0, neither: 0 };
  expect(shareDifferenceFromRuns([...draws, none])).toEqual(shareDifferenceFromRuns(draws));
  expect(shareDifferenceFromUnknown([...draws, none])).toEqual(shareDifferenceFromUnknown(draws));
  const means = [Float64Array.of(1, 2), Float64Array.of(3, 5)];
  expect(meanDifferenceFromRuns(means).estimate).toBe(2.75);
  expect(meanDifferenceFromRuns([...means, new Float64Array(0)])).toEqual(meanDifferenceFromRuns(means));
  expect(meanDifferenceFromUnknown([...means, new Float64Array(0)])).toEqual(meanDifferenceFromUnknown(means));
});
