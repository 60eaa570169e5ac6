// Years in which catastrophes strike, and patches whose years go together: means and variances by the law of total variance.
import { test } from 'vitest';
import { expectYear, mixedShare, n, type Case } from './one-year.ts';

const cases: Readonly<Record<string, Case>> = {
  // In 3 of 10 years half of the survivors: E p(1 − p) n + n² Var p over both kinds of years.
  'survivors, of which a catastrophe leaves half': {
    essence: `survival: { adult: 0.7 }
oldest: open-ended
year: [count, survival]
flood: { kind: catastrophe, chance: 0.3 per landscape, reach: everywhere, multiplies: { survival: { adult: 0.5 } } }`,
    mean: n * 0.7 * 0.85,
    variance: n * (0.7 * 0.21 + 0.3 * 0.35 * 0.65) + n * n * 0.7 * 0.3 * 0.35 ** 2,
  },
  // Both act by independent factors, E p² = E B² E X².
  'survivors that vary, in years of which some are struck': {
    essence: `survival: { adult: 0.7 }
oldest: open-ended
year: [count, survival]
variation: { survival: { adult: { sd: 0.15 } } }
flood: { kind: catastrophe, chance: 0.3 per patch, reach: one patch, multiplies: { survival: { adult: 0.5 } } }`,
    mean: n * 0.7 * 0.85,
    variance: mixedShare(0.7 * 0.85, (0.7 + 0.3 * 0.25) * (0.49 + 0.0225)),
  },
  'those that a catastrophe leaves at its place in the year': {
    essence: `survival: { adult: 0.8 }
oldest: open-ended
year: [count, survival, fire]
fire: { kind: catastrophe, chance: 0.2 per landscape, reach: everywhere, takes: { adult: 0.6 } }`,
    mean: n * 0.8 * (0.8 + 0.2 * 0.4),
    variance: mixedShare(0.8 * 0.88, 0.64 * (0.8 + 0.2 * 0.16)),
  },
  // Good years by the same means: Poisson given the year.
  'young, twice as many in some years': {
    essence: `demography: { fates: [[0]], births: [[1.1]] }
year: [count, demography]
mast: { kind: catastrophe, chance: 0.25 per landscape, reach: everywhere, multiplies: { births: { adult: 2 } } }`,
    mean: n * 1.1 * 1.25,
    variance: n * 1.1 * 1.25 + n * n * 1.1 ** 2 * 0.25 * 0.75,
  },
  // 30 or 12 of 40 stay.
  'a ceiling whose room a catastrophe lowers': {
    essence: `survival: { adult: 1 }
oldest: open-ended
year: [count, survival, room]
room: { kind: ceiling, counted: [adult], capacity: 30, takes: at random }
fire: { kind: catastrophe, chance: 0.3 per landscape, reach: everywhere, capacity: { times: 0.4, for: 2 years } }`,
    mean: 0.7 * 30 + 0.3 * 12,
    variance: 0.7 * 0.3 * 18 ** 2,
  },
  // Normals of both patches go together by 0.5: Cov of two lognormals m² (e^(0.5 σ²) − 1), σ² = ln(1 + s²/m²).
  'young of two patches whose years are alike by half': {
    essence: `demography: { fates: [[0]], births: [[1.4]] }
year: [count, demography]
variation: { births: { adult: { sd: 0.7, shape: lognormal } }, between-patches: 0.5 }`,
    patches: 'patches: [{ name: A }, { name: B }]',
    alsoInB: true,
    mean: 2 * n * 1.4,
    variance: 2 * (n * 1.4 + n * n * 0.49) + 2 * n * n * 1.96 * (Math.sqrt(1.25) - 1),
  },
  // One strike hits both patches or neither.
  'survivors of two patches that are struck together': {
    essence: `survival: { adult: 0.7 }
oldest: open-ended
year: [count, survival]
flood: { kind: catastrophe, chance: 0.3 per landscape, reach: everywhere, multiplies: { survival: { adult: 0.5 } } }`,
    patches: 'patches: [{ name: A }, { name: B }]',
    alsoInB: true,
    mean: 2 * n * 0.7 * 0.85,
    variance: 2 * n * (0.7 * 0.21 + 0.3 * 0.35 * 0.65) + 4 * n * n * 0.7 * 0.3 * 0.35 ** 2,
  },
};

test.each(Object.entries(cases))('%s', (_, one) => {
  expectYear(one);
});
