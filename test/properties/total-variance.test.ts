// Phases whose rate differs between years: means and variances by the law of total variance, E Var + Var E. Bounds are 5.5
// standard errors, with the standard error of the variance from the draws themselves.
import { expect, test } from 'vitest';
import { runReplicates } from '../kernel/collect.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { expectYear, n, share, type Case } from './one-year.ts';

const horses = {
  sexes: 'counts: both sexes\nclasses: { females: [filly, mare], males: [colt, stallion] }',
  start: `{ mare: ${n}, stallion: 15 }`,
};

/** The mean of a function of a lognormal number with mean 1 and this SD, by the midpoint rule. */
function overLognormal(sd: number, value: (s: number) => number): number {
  const variance = Math.log(1 + sd * sd);
  const step = 1e-4;
  let sum = 0;
  for (let z = -9 + step / 2; z < 9; z += step) {
    sum += value(Math.exp(Math.sqrt(variance) * z - variance / 2)) * Math.exp((-z * z) / 2);
  }
  return (sum * step) / Math.sqrt(2 * Math.PI);
}

/** Chances of 0 to `trials` survivors whose survival varies by a beta distribution with this mean and SD. */
function betaBinomial(trials: number, mean: number, sd: number): readonly number[] {
  const all = (mean * (1 - mean)) / (sd * sd) - 1;
  const [a, b] = [mean * all, (1 - mean) * all];
  const chances = [1];
  for (let k = 0; k < trials; k++) {
    chances.push((chances[k]! * (trials - k) * (k + a)) / ((k + 1) * (trials - k - 1 + b)));
  }
  const sum = chances.reduce((x, y) => x + y, 0);
  return chances.map((one) => one / sum);
}

/**
 * 15 stallions survive with 0.4 and an SD of 0.15 between years, then 40 mares have 1.5 young times `mated` of the stallions
 * left: the young are Poisson given those.
 */
function mares(mated: (stallions: number) => number): Pick<Case, 'mean' | 'variance'> {
  const chances = betaBinomial(15, 0.4, 0.15);
  const over = (value: (stallions: number) => number): number =>
    chances.reduce((sum, chance, stallions) => sum + chance * value(stallions), 0);
  const young = (stallions: number): number => n * 1.5 * mated(stallions);
  const mean = n + over((stallions) => stallions + young(stallions));
  return { mean, variance: over(young) + over((stallions) => (n + stallions + young(stallions) - mean) ** 2) };
}

const mating = (form: string): string => `survival: { filly: 1, mare: 1, colt: 1, stallion: 0.4 }
births: { mare: 1.5, female-share: 0.5 }
oldest: open-ended
mating: { form: ${form}, males: [stallion], females-per-male: 5 }
year: [count, survival, breeding]
variation: { survival: { stallion: { sd: 0.15 } } }`;

const cases: Readonly<Record<string, Case>> = {
  'survivors, beta': {
    essence: `survival: { adult: 0.7 }
oldest: open-ended
year: [count, survival]
variation: { survival: { adult: { sd: 0.15 } } }`,
    mean: n * 0.7,
    variance: share(0.7, 0.15),
  },
  'survivors, logit-normal': {
    essence: `survival: { adult: 0.3 }
oldest: open-ended
year: [count, survival]
variation: { survival: { adult: { sd: 0.2, shape: logit-normal } } }`,
    mean: n * 0.3,
    variance: share(0.3, 0.2),
  },
  // Poisson given the year: n m + n² s².
  'young, lognormal': {
    essence: `demography: { fates: [[0]], births: [[1.4]] }
year: [count, demography]
variation: { births: { adult: { sd: 0.5, shape: lognormal } } }`,
    mean: n * 1.4,
    variance: n * 1.4 + n * n * 0.25,
  },
  'young, gamma, through a parameter': {
    essence: `parameters: { litter: 0.7 }
births: { adult: 2 * litter }
year: [count, breeding]
oldest: open-ended
variation: { litter: { sd: 0.25, shape: gamma } }`,
    mean: n + n * 1.4,
    variance: n * 1.4 + n * n * 0.25,
  },
  'those that stay, fates of a matrix': {
    essence: `demography: { fates: [[0.6]], births: [[0]] }
year: [count, demography]
variation: { fates: { adult: { sd: 0.1 } } }`,
    mean: n * 0.6,
    variance: share(0.6, 0.1),
  },
  'those that leave': {
    essence: `going: { kind: dispersal, classes: [adult], leaving: 0.25, kernel: { shape: exponential, mean: 1 km }, leavers: all arrive }
oldest: open-ended
year: [count, going]
variation: { going: { adult: { sd: 0.12 } }, between-patches: 0 }`,
    patches: 'position: plane\nunit: km\npatches: [{ name: A, at: [0, 0] }, { name: B, at: [1, 0] }]',
    column: 2,
    mean: n * 0.25,
    variance: share(0.25, 0.12),
  },
  // Binomial litters up to 4 given the year: m (1 − m/4) for each, so n (m − (m² + s²)/4) + n² s².
  'litters up to 4, whose mean varies': {
    essence: `births: { adult: 1.2 }
offspring: { distribution: binomial, largest-litter: 4 }
oldest: open-ended
year: [count, breeding]
variation: { births: { adult: { sd: 0.3, shape: lognormal } } }`,
    mean: n + n * 1.2,
    variance: n * (1.2 - (1.44 + 0.09) / 4) + n * n * 0.09,
  },
  // Negative binomial litters of size k given the year: m + m²/k for each, so n (m + (m² + s²)/k) + n² s².
  'negative binomial litters, whose mean varies': {
    essence: `births: { adult: 1.6 }
offspring: { distribution: negative binomial, size: 0.8 }
oldest: open-ended
year: [count, breeding]
variation: { births: { adult: { sd: 0.4, shape: gamma } } }`,
    mean: n + n * 1.6,
    variance: n * (1.6 + (2.56 + 0.16) / 0.8) + n * n * 0.16,
  },
  // Litters with mean 1.1 and variance 1.9 − 1.21 of those S that survive: E S · 0.69 + 2.1² Var S.
  'a table of litters, of survivors that vary': {
    essence: `survival: { adult: 0.6 }
births: {}
offspring: { distribution: table of chances, chances: { adult: [0.3, 0.3, 0.4] } }
oldest: open-ended
year: [count, survival, breeding]
variation: { survival: { adult: { sd: 0.12 } } }`,
    mean: n * 0.6 * 2.1,
    variance: n * 0.6 * 0.69 + 2.1 ** 2 * share(0.6, 0.12),
  },
  // Given that years give s times the young of the table: whole copies and a share f of them, so that each litter of mean m and
  // variance v becomes one of s m and s² v + f (1 − f) m.
  'a table of litters, whose mean varies': {
    essence: `births: {}
offspring: { distribution: table of chances, chances: { adult: [0.3, 0.3, 0.4] } }
oldest: open-ended
year: [count, breeding]
variation: { births: { adult: { sd: 0.44, shape: lognormal } } }`,
    mean: n + n * 1.1,
    variance:
      n * overLognormal(0.4, (s) => s * s * 0.69 + (s - Math.floor(s)) * (1 - (s - Math.floor(s))) * 1.1) +
      n * n * 0.44 ** 2,
  },
  // All others die: Poisson given the year, of which a share f are females, so n m f + n² f² s².
  'the females among the young of two sexes': {
    animals: horses,
    essence: `survival: { filly: 1, mare: 0, colt: 0, stallion: 0 }
births: { mare: 1.4, female-share: 0.4 }
oldest: open-ended
mating: { form: female-dominant }
year: [count, breeding, survival]
variation: { births: { mare: { sd: 0.5, shape: lognormal } } }`,
    mean: n * 1.4 * 0.4,
    variance: n * 1.4 * 0.4 + n * n * 0.16 * 0.25,
  },
  'two sexes, where the survival of males varies and each mates with so many females at most': {
    animals: horses,
    essence: mating('minimum'),
    ...mares((stallions) => Math.min(1, (5 * stallions) / n)),
  },
  'two sexes, where the survival of males varies, by the harmonic mean': {
    animals: horses,
    essence: mating('harmonic mean'),
    ...mares((stallions) => (2 * 5 * stallions) / (n + 5 * stallions)),
  },
};

test.each(Object.entries(cases))('%s', (_, one) => {
  expectYear(one);
});

test.each([
  ['births that vary by themselves', 'births: { adult: 1.2 }', 'births: { adult: { sd: 0.6, shape: lognormal } }'],
  [
    'births made from a parameter',
    'parameters: { litter: 1.2 }\nbirths: { adult: litter }',
    'litter: { sd: 0.6, shape: lognormal }',
  ],
])('%s may not exceed the largest litter in a rare year', (_, births, variation) => {
  const told = errorsOf(`skein: 1
study: { title: Litters }
years: 1
patches: [{ name: A }]
counts: females
classes: [adult]
${births}
offspring: { distribution: binomial, largest-litter: 3 }
oldest: open-ended
year: [count, breeding]
variation: { ${variation} }
start: { table: { A: { adult: 5 } } }
`);
  expect(told).toEqual(['impossible-variation']);
});

test('raising a survival or a count never lowers the survivors of a draw within one sampler', () => {
  const survivors = (count: number, rate: number): Float64Array => {
    const { image } = compileText(`skein: 1
study: { title: Common random numbers }
years: 1
patches: [{ name: A }]
counts: females
classes: [adult]
oldest: open-ended
survival: { adult: ${rate} }
year: [count, survival]
start: { table: { A: { adult: ${count} } } }
`);
    const { counts, columns } = runReplicates(image, { replicates: 2000, steps: 1, seed: 6 });
    return counts.slice(columns * 2000, (columns + 1) * 2000);
  };
  // Up to 128 animals are drawn bit by bit.
  for (const count of [1, 17, 63, 64, 65, 128]) {
    let before = survivors(count, 0.05);
    for (const rate of [0.2, 0.21, 0.5, 0.83, 0.999]) {
      const after = survivors(count, rate);
      expect(after.every((value, r) => value >= before[r]!)).toBe(true);
      expect(after.some((value, r) => value > before[r]!)).toBe(true);
      before = after;
    }
  }
  for (const rate of [0.1, 0.6, 0.95]) {
    let before = survivors(1, rate);
    for (const count of [2, 40, 64, 65, 100, 128]) {
      const after = survivors(count, rate);
      expect(after.every((value, r) => value >= before[r]!)).toBe(true);
      before = after;
    }
  }
});
