// Numbers that grow by chance alone, counted once a year, from a spec to the results; and what plans that share their weather
// share. So many animals that the luck of single ones hardly counts. Seeds are fixed; bounds are 4.5 standard errors.
import { describe, expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { chanceFallenBy } from '../../src/analysis/diffusion.ts';
import { runModel } from '../../src/pipeline.ts';
import { runReplicates } from '../kernel/collect.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';

/** Yearly logarithm of growth is normal with this drift and variance. */
function walk({
  drift,
  variance,
  animals,
  years = 50,
}: {
  drift: number;
  variance: number;
  animals: number;
  years?: number;
}) {
  const mean = Math.exp(drift + variance / 2);
  const sd = mean * Math.sqrt(Math.exp(variance) - 1);
  return (run: string): string =>
    framed(
      `classes: [animal]
demography: { fates: [[0]], births: [[${mean}]] }
year: [count, demography]
variation: { births: { animal: { sd: ${sd}, shape: lognormal } } }
start: { table: { Meadow: { animal: ${animals} } } }
outcomes: { tenth: { of: all, below: ${animals / 10} } }
run: { ${run} }
`,
      { years },
    );
}

const animals = 200_000;
const replicates = 12_000;

// Derived by numerical convolution, to 2e-5; watched all the time the chances would be 0.2762, 0.1035 and 0.0276. Mean lowest
// counts by the same, the start included, to 1e-3; watched all the time they would be 0.568, 0.428, 0.280 and 0.214.
describe.each([
  [0.02, 0.02205, 0.6315],
  [0, 0.087965, 0.4767],
  [-0.02, 0.24761, 0.3124],
  [-0.03, null, 0.2389],
])('numbers with drift %d and variance 0.04, counted once a year for 50 years', (drift, fallen, lowest) => {
  const { outcomes, meanLowestCount, stopped } = runModel(
    compileText(walk({ drift, variance: 0.04, animals })(`replicates: ${replicates}, seed: 12`)),
  );

  test('the chance to fall to a tenth', () => {
    expect(stopped.runs).toBe(0);
    if (fallen === null) return;
    const bound = 4.5 * Math.sqrt((fallen * (1 - fallen)) / replicates);
    expect(Math.abs(outcomes[0]!.ever.probability - fallen)).toBeLessThan(bound);
  });

  test('the mean lowest count', () => {
    const bound = 4.5 * (meanLowestCount.standardError / animals) + 1e-3;
    expect(Math.abs(meanLowestCount.mean / animals - lowest)).toBeLessThan(bound);
  });
});

// Derived: the diffusion curve of Lande & Orzack (1988) with the shift of 0.5826 standard deviations for yearly counts (Broadie,
// Glasserman & Kou 1997, from memory); drift and variance are those of the simulated long run, so that both come with their errors.
test.each([
  [-0.02, 0.24557, 0.24761],
  [0, 0.08716, 0.087965],
  [0.02, 0.02186, 0.02205],
])('drift %d: the analysis sets the curve for yearly counts beside the simulated one', (drift, curve, truth) => {
  const compiled = compileText(walk({ drift, variance: 0.04, animals })(`replicates: 3000, seed: 12`));
  const { value } = analyseModel(compiled, { at: 'zero' });
  const [fall] = value!.fallingBelow!;
  expect(fall!.logDistance).toBeCloseTo(Math.log(10), 12);
  // 1600 stretches tell the variance to 3.5 %, 80,000 years the drift to 0.0007.
  expect(Math.abs(fall!.drift - drift)).toBeLessThan(4.5 * 0.0007);
  expect(Math.abs(fall!.variance / 0.04 - 1)).toBeLessThan(4.5 * 0.0354);
  const last = fall!.years.at(-1)!;
  const given = (by: number, from: number) =>
    chanceFallenBy(50, Math.log(10), { drift: drift + by, variance: 0.04 + from }, 'once a year') - curve;
  const bound = Math.hypot(given(0.0007, 0), given(0, 0.04 * 0.0354)) * 4.5;
  expect(Math.abs(last.diffusion - curve)).toBeLessThan(bound);
  expect(Math.abs(last.simulated - truth)).toBeLessThan(4.5 * Math.sqrt((truth * (1 - truth)) / 3000));
  // The very runs of `skein run`.
  expect(fall!.years.map(({ simulated }) => simulated)).toEqual(
    runModel(compiled).outcomes[0]!.byYear.map(({ ever }) => ever),
  );
});

// Derived: mean 10 · 1.2^10, variance 10 · 1.2^9 (1.2^10 − 1)/(1.2 − 1) · 1.2 of ten families.
test('ten families with 1.2 Poisson young for ten generations have the mean 61.917 and the variance 1607.3', () => {
  const runs = 60_000;
  const { abundance } = runModel(
    compileText(
      framed(
        `classes: [animal]
demography: { fates: [[0]], births: [[1.2]] }
year: [count, demography]
start: { table: { Meadow: { animal: 10 } } }
run: { replicates: ${runs}, seed: 2 }
`,
        { years: 10 },
      ),
    ),
  );
  const { mean, sd } = abundance.whole[10]!;
  expect(Math.abs(mean - 61.9173642)).toBeLessThan(4.5 * Math.sqrt(1607.2932 / runs));
  // Its kurtosis is below 5.
  expect(Math.abs(sd ** 2 / 1607.2932 - 1)).toBeLessThan(4.5 * Math.sqrt(4 / runs));
});

// Derived: with the same weather the difference of the logarithms after 50 years has the variance 50 (0.20 − 0.15)² = 0.125, with
// weather of their own 50 (0.20² + 0.15²) = 3.125.
test('two plans that differ in how much years vary meet the same weather under one seed', () => {
  const runs = 3000;
  const ends = (sigma: number, seed: number): Float64Array => {
    const { image } = compileText(walk({ drift: 0, variance: sigma * sigma, animals: 1_000_000 })('replicates: 1'));
    const { counts, columns } = runReplicates(image, { replicates: runs, steps: 50, seed });
    return counts.slice(50 * columns * runs, 50 * columns * runs + runs).map(Math.log);
  };
  const variance = (a: Float64Array, b: Float64Array): number => {
    const apart = a.map((value, i) => value - b[i]!);
    const mean = apart.reduce((x, y) => x + y, 0) / runs;
    return apart.reduce((sum, one) => sum + (one - mean) ** 2, 0) / (runs - 1);
  };
  const wide = ends(0.2, 8);
  const bound = 4.5 * Math.sqrt(2 / runs);
  expect(Math.abs(variance(wide, ends(0.15, 8)) / 0.125 - 1)).toBeLessThan(bound + 0.01);
  expect(Math.abs(variance(wide, ends(0.15, 9)) / 3.125 - 1)).toBeLessThan(bound);
});
