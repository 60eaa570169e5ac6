// Whether 95 % intervals hold what they claim, over 2,000 small studies with a known truth (that of the model, not of nature).
import { expect, test } from 'vitest';
import { readSections } from '../../src/compile/image/read.ts';
import { uniformAt } from '../../src/machine/random.ts';
import { fromStandardError, valueAt } from '../../src/model/uncertainty/distribution.ts';
import { normalBelow } from '../../src/numeric/normal.ts';
import { intervalFromRuns, intervalFromUnknown } from '../../src/results/draws/intervals.ts';
import { wilson } from '../../src/results/wilson.ts';
import { runReplicates } from '../kernel/collect.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { between, binomial, normals, studies } from './small-studies.ts';

const normal = normals(77);

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

/** The draws of a study are patches without links, each with a survival of its own, which is put into the image for each study. */
function manyDraws(draws: number): { readonly image: ArrayBuffer; readonly survival: Float64Array } {
  const names = Array.from({ length: draws }, (_, d) => `D${d}`);
  const { image } = compileText(`skein: 1
study: { title: Draws side by side }
years: ${years}
patches: [${names.map((name) => `{ name: ${name} }`).join(', ')}]
counts: females
classes: [adult]
oldest: open-ended
survival: { adult: 0.625 }
year: [count, survival]
start: { table: { ${names.map((name) => `${name}: { adult: ${animals} }`).join(', ')} } }
`);
  const tables = readSections(image).filter(({ data }) => data.length === draws && data.every((one) => one === 0.625));
  expect(tables).toHaveLength(1);
  return { image, survival: tables[0]!.data as Float64Array };
}

const [animals, years] = [3, 4];

// Each study marks 80 animals, whose true survival lies between 0.6 and 0.85, and takes the share that lived with its standard
// error. Draws are of the beta distribution with that mean and SD, and the kernel runs each draw. The truth is that of the model:
// with the true survival s, 3 animals that die alone are all gone by year 4 with the chance (1 − s^4)^3.
test('intervals from what is not known, over draws that the kernel runs', () => {
  const [draws, runs, marked] = [79, 64, 80];
  const { image, survival } = manyDraws(draws);
  const gone = (s: number): number => (1 - s ** years) ** animals;
  let [held, sum, expected, variance] = [0, 0, 0, 0];
  for (let study = 0; study < studies; study++) {
    const truth = 0.6 + 0.25 * uniformAt({ seed: 79, words: [study, 7, 1] }, 0);
    const seen = binomial(marked, truth, uniformAt({ seed: 79, words: [study, 8, 1] }, 0)) / marked;
    const known = fromStandardError({ value: seen, kind: 'share' }, Math.sqrt((seen * (1 - seen)) / marked))!;
    for (let d = 0; d < draws; d++) survival[d] = valueAt(known, normal(study, d, 9));
    const { counts, columns } = runReplicates(image, { replicates: runs, steps: years, seed: study });
    const hits = Array.from(survival, (s, d) => {
      const from = (years * columns + 1 + d) * runs;
      const here = counts.subarray(from, from + runs).reduce((all, n) => all + (n === 0 ? 1 : 0), 0);
      sum += here;
      expected += runs * gone(s);
      variance += runs * gone(s) * (1 - gone(s));
      return here;
    });
    const { lower, upper } = intervalFromUnknown(hits.map((one) => ({ hits: one, runs })))!;
    if (lower <= gone(truth) && gone(truth) <= upper) held++;
  }
  expect(Math.abs(sum - expected)).toBeLessThan(5.5 * Math.sqrt(variance));
  between(held / studies);
});

// The mean chance over all draws that there could be, here with 60 draws of 30 runs.
test('intervals from the number of draws and runs', () => {
  const [draws, runs] = [60, 30];
  const nodes = Array.from({ length: 4001 }, (_, i) => -8 + i * 0.004);
  const weights = nodes.map((z) => Math.exp((-z * z) / 2));
  const all = weights.reduce((a, b) => a + b, 0);
  const truth = nodes.reduce((sum, z, i) => sum + (weights[i]! / all) * riskOf(0.6 * z), 0);
  let held = 0;
  for (let study = 0; study < studies; study++) {
    const counts = Array.from({ length: draws }, (_, d) => {
      const risk = riskOf(0.6 * normal(study, d, 5));
      return { hits: binomial(runs, risk, uniformAt({ seed: 78, words: [study, 6, 1] }, d)), runs };
    });
    const { lower, upper } = intervalFromRuns(counts);
    if (lower <= truth && truth <= upper) held++;
  }
  between(held / studies);
});
