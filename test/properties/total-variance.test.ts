// Phases whose rate differs between years: means and variances by the law of total variance, E Var + Var E. Bounds are 5.5
// standard errors, with the standard error of the variance from the draws themselves.
import { expect, test } from 'vitest';
import { runReplicates } from '../kernel/collect.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';

const replicates = 40_000;
const n = 40;

interface Case {
  readonly essence: string;
  /** Column of the count after one year: 0 for all, then each patch. */
  readonly column?: number;
  readonly patches?: string;
  readonly mean: number;
  readonly variance: number;
}

/** p varies with mean p and SD s: n p (1 − p) − n s² + n² s². */
const share = (p: number, s: number): number => n * p * (1 - p) - n * s * s + n * n * s * s;

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
};

test.each(Object.entries(cases))('%s', (_, { essence, patches, column = 0, mean, variance }) => {
  const { image } = compileText(`skein: 1
study: { title: Total variance }
years: 1
${patches ?? 'patches: [{ name: A }]'}
counts: females
classes: [adult]
${essence}
start: { table: { A: { adult: ${n} } } }
`);
  const { counts, columns } = runReplicates(image, { replicates, steps: 1, seed: 31 });
  const at = (columns + column) * replicates;
  const values = counts.slice(at, at + replicates);
  const found = values.reduce((a, b) => a + b, 0) / replicates;
  expect(Math.abs(found - mean)).toBeLessThan(5.5 * Math.sqrt(variance / replicates));
  const squares = values.map((value) => (value - mean) ** 2);
  const spread = squares.reduce((a, b) => a + b, 0) / replicates;
  const error = Math.sqrt(squares.reduce((sum, one) => sum + (one - spread) ** 2, 0) / replicates / replicates);
  expect(Math.abs(spread - variance)).toBeLessThan(5.5 * error);
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
