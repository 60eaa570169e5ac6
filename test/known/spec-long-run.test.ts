// Growth in the long run where years differ, against exact and published values. Seeds are fixed; bounds are 5 standard errors.
import { describe, expect, test } from 'vitest';
import { runLongRun } from '../../src/kernel/long-run.ts';
import { followPath } from '../../src/pipeline.ts';
import { longRunGrowth } from '../../src/results/long-run.ts';
import { compileModel } from '../golden/models.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';

const start = (patches: readonly string[], name = 'animal'): string =>
  `start: { table: { ${patches.map((patch) => `${patch}: { ${name}: 10 }`).join(', ')} } }`;

/** Longer than what `path` prints. */
function growth(text: string, years = 20_000): { readonly logGrowth: number; readonly standardError: number } {
  const { image } = compileText(text);
  return longRunGrowth(runLongRun(image, { settling: 300, years, seed: 17 }), years)!;
}

function expectGrowth(found: ReturnType<typeof growth>, logGrowth: number, known = 0): void {
  expect(Math.abs(found.logGrowth - logGrowth)).toBeLessThan(5 * Math.hypot(found.standardError, known));
}

// The mean matrix and the noise are chosen; the values were simulated over 3.2 million steps outside this project and lie
// within 1e-4 of Tuljapurkar's small-noise approximation (1982, from memory).
test.each([
  [0, 0.112246],
  [0.5, 0.111284],
  [-0.5, 0.113092],
])('two stages with noisy births and survival that are correlated by %d', (correlation, expected) => {
  const found = growth(
    framed(`classes: [young, adult]
demography: { fates: [[0, 0], [0.3, 0.8]], births: [[0, 1.2], [0, 0]] }
year: [count, demography]
variation:
  births: { adult: { sd: 0.3, shape: lognormal } }
  fates: { adult: { sd: 0.05, shape: beta } }
  between-rates: { births of adult: { fates of adult: ${correlation} } }
${start(['Meadow'], 'adult')}
`),
    40_000,
  );
  expect(found.standardError).toBeLessThan(0.0005);
  expectGrowth(found, expected, 5e-5);
});

/** Animals that live a year with 0.85 after having one young each: 1.7 in good years, 0.5 where struck. */
const sinks = (patches: number, reach: string): string => {
  const names = Array.from({ length: patches }, (_, i) => `P${i}`);
  const others = (own: string) => names.filter((name) => name !== own).map((name) => `${name}: ${1 / patches}`);
  const shares = names.map((name) => `${name}: { ${others(name).join(', ')} }`).join(', ');
  return framed(
    `classes: [animal]
oldest: open-ended
births: { animal: 1 }
survival: { animal: 0.85 }
year: [count, breeding, survival, mixing]
mixing: { kind: dispersal, classes: [animal], shares: { ${shares} } }
bad: { kind: catastrophe, chance: 0.5 per ${reach === 'everywhere' ? 'landscape' : 'patch'}, reach: ${reach}, multiplies: { survival: { animal: ${0.5 / 1.7} } } }
${start(names)}
`,
    { patches: `[${names.map((name) => `{ name: ${name} }`).join(', ')}]` },
  );
};

// Derived: each patch has 1.7 or 0.5 with the same chance, all are mixed whole every year, so that ln λ_s is the mean of the
// logarithm of the average of the patches. The idea is that of Jansen & Yoshimura (1998): none of them could last alone.
describe('sinks of which none lasts alone', () => {
  test.each([
    [2, 'one patch', 1.0070501],
    [4, 'one patch', 1.055396],
    [4, 'everywhere', 0.9219544],
  ])('%d patches, bad years that strike %s: %d', (patches, reach, rate) => {
    const found = growth(sinks(patches, reach));
    expectGrowth(found, Math.log(rate));
    expect(found.standardError).toBeLessThan(0.0025);
  });
});

// Derived: ln λ_s = ln 1.03 + 0.05 ln 0.5, against the 1.03 · (1 − 0.05 · 0.5) of an average year.
test('a catastrophe that halves with 5 % a year turns growth into decline', () => {
  const text = framed(`classes: [animal]
oldest: open-ended
births: { animal: 0.03 }
survival: { animal: 1 }
year: [count, breeding, survival]
flood: { kind: catastrophe, chance: 0.05 per landscape, reach: everywhere, multiplies: { survival: { animal: 0.5 } } }
${start(['Meadow'])}
`);
  expectGrowth(growth(text), Math.log(0.9949144));
  const { growth: told } = followPath(compileText(text));
  expect(told.withoutChance).toBeCloseTo(1.03 * 0.975, 12);
  expect(told.reason).toBeNull();
});

// Derived: with one class ln λ_s is the mean of ln λ, however the years follow on one another: μ of a lognormal is ln m − σ²/2.
test('autocorrelation changes the error, not the growth, of one class', () => {
  const text = (autocorrelation: number): string =>
    framed(`classes: [animal]
demography: { fates: [[0]], births: [[0.9]] }
year: [count, demography]
variation: { births: { animal: { sd: 0.45, shape: lognormal } }, autocorrelation: ${autocorrelation} }
${start(['Meadow'])}
`);
  const sigma2 = Math.log(1 + 0.25);
  const [apart, runs] = [growth(text(0)), growth(text(0.6))];
  expectGrowth(apart, Math.log(0.9) - sigma2 / 2);
  expectGrowth(runs, Math.log(0.9) - sigma2 / 2);
  // The variance of a long sum is (1 + φ)/(1 − φ) = 4 times as large (derived).
  expect(runs.standardError / apart.standardError).toBeGreaterThan(1.2);
  expect(runs.standardError / apart.standardError).toBeLessThan(3.3);
});

// Derived: a year adds σ² where years are independent; with AR(1) and φ = 0.6 a stretch of 50 years has 50 σ² times
// (1 + φ)/(1 − φ) − 2φ/(50 (1 − φ)²) = 3.85; a strike of 1 in 20 years that halves, 0.05 · 0.95 (ln 2)². Of 6400 stretches the variance
// is known to 1.8 %.
test.each([
  ['independent years', 'variation: { births: { animal: { sd: 0.45, shape: lognormal } } }', Math.log(1.25)],
  [
    'years that go on',
    'variation: { births: { animal: { sd: 0.45, shape: lognormal } }, autocorrelation: 0.6 }',
    3.85 * Math.log(1.25),
  ],
  [
    'rare bad years',
    'flood: { kind: catastrophe, chance: 0.05 per landscape, reach: everywhere, multiplies: { births: { animal: 0.5 } } }',
    0.05 * 0.95 * Math.log(2) ** 2,
  ],
])('the variance that a year adds: %s', (_what, chance, variance) => {
  const { image } = compileText(
    framed(`classes: [animal]
demography: { fates: [[0]], births: [[0.9]] }
year: [count, demography]
${chance}
${start(['Meadow'])}
`),
  );
  const found = longRunGrowth(runLongRun(image, { settling: 300, years: 20_000, seed: 23 }), 20_000)!;
  expect(Math.abs(found.yearlyVariance / variance - 1)).toBeLessThan(4.5 * 0.018);
});

test('its standard error is honest: over 60 seeds the truth lies within it as often as it should', () => {
  const { image } = compileText(sinks(2, 'one patch'));
  const scores = Array.from({ length: 60 }, (_, seed) => {
    const { logGrowth, standardError } = longRunGrowth(runLongRun(image, { settling: 20, years: 400, seed }), 400)!;
    return (logGrowth - Math.log(1.0070501)) / standardError;
  });
  // Student's t with 15 degrees of freedom has the variance 15/13.
  const square = scores.reduce((sum, z) => sum + z * z, 0) / scores.length;
  expect(square).toBeGreaterThan(0.4);
  expect(square).toBeLessThan(2.4);
  const within = scores.filter((z) => Math.abs(z) < 2.131).length;
  expect(within).toBeGreaterThanOrEqual(50);
});

test('the partridges of dry springs increase in an average year and decline in the long run', () => {
  const { growth: told } = followPath(compileModel('dry-springs'));
  expect(told.withoutChance).toBeGreaterThan(1.03);
  expect(told.withChance!.logGrowth + 5 * told.withChance!.standardError).toBeLessThan(0);
});

test('where nothing differs between years, or where a year can leave nobody, it says so', () => {
  const still = followPath(compileModel('two-ponds')).growth;
  expect(still).toMatchObject({
    withChance: null,
    reason: 'No rate varies from year to year and no catastrophe strikes.',
  });
  const all = sinks(2, 'everywhere').replace(/animal: 0\.29\d*/u, 'animal: 0');
  expect(followPath(compileText(all)).growth).toMatchObject({
    withChance: null,
    reason: 'In some years nobody is left.',
  });
});

test('releases and what people do in some years only have no part in it', () => {
  const { growth: told } = followPath(
    compileText(
      sinks(2, 'one patch')
        .replace('survival, mixing]', 'survival, mixing, gift]')
        .replace('bad: {', 'gift: { kind: add, in: P0, number: { animal: 5 } }\nbad: {'),
    ),
  );
  expect(told.withChance!.logGrowth).toBeLessThan(0.05);
});
