// Growth with years that differ, by approximation, from specs: against closed forms, and against simulation where there are none.
import { describe, expect, test } from 'vitest';
import { modelYears } from '../../src/analysis/chance/model-years.ts';
import { compileText } from '../pipeline/compile-text.ts';

interface Written {
  readonly classes: string;
  readonly rates: string;
  readonly variation: string;
  readonly year: string;
  readonly patches?: string;
}

function growth({ classes, rates, variation, year, patches = '[{ name: Fen }]' }: Written) {
  const { value } = modelYears(
    compileText(`
skein: 1
study: { title: Years that differ, invented: true }
years: 10
patches: ${patches}
counts: females
classes: ${classes}
oldest: open-ended
year: ${year}
start: { total: 50 }
${rates}
variation: ${variation}
`),
  );
  return value!;
}

// Tuljapurkar (1982) from memory; the approximate values derived; the others simulated over 3.2 million years outside this project.
test.each([
  [0, 0.1121694, 0.112246],
  [0.5, 0.1112045, 0.111284],
])('two stages, births lognormal and survival beta, correlation %f', (correlation, approximate, simulated) => {
  const { logGrowth } = growth({
    classes: '[young, adult]',
    rates: 'demography: { fates: [[0, 0], [0.3, 0.8]], births: [[0, 1.2], [0, 0]] }',
    year: '[count, demography]',
    variation: `{ births: { adult: { sd: 0.3, shape: lognormal } }, fates: { adult: { sd: 0.05, shape: beta } }, between-rates: ${correlation} }`,
  });
  // The given correlation is that of the normal numbers; that of the rates is a little less.
  expect(logGrowth).toBeCloseTo(approximate, correlation === 0 ? 7 : 4);
  expect(Math.abs(logGrowth - simulated)).toBeLessThan(1e-4);
});

describe('one class, whose logarithm of growth is a sum (derived)', () => {
  const year = '[count, survival, breeding]';
  const rates = 'survival: { all: 0.6 }\nbirths: { all: 0.8 }';
  // E ln of a number x with mean m and SD s is ln m − s²/(2m²) to second order.
  const exact = Math.log(0.6) - 0.02 ** 2 / (2 * 0.6 ** 2) + Math.log(1.8) - 0.05 ** 2 / (2 * 1.8 ** 2);

  test.each([0, 0.4, 0.9])('rates that go together by %f within a year do not change it', (correlation) => {
    const variation = `{ survival: { all: { sd: 0.02 } }, births: { all: { sd: 0.05 } }, between-rates: ${correlation} }`;
    expect(growth({ classes: '[all]', rates, year, variation }).logGrowth).toBeCloseTo(exact, 9);
  });

  test.each([0.3, 0.8])(
    'nor do years that are like the last by %f, but the spread grows by (1 + φ)/(1 − φ)',
    (carried) => {
      const variation = `{ survival: { all: { sd: 0.02 } }, births: { all: { sd: 0.05 } }, between-rates: 0, autocorrelation: ${carried} }`;
      const found = growth({ classes: '[all]', rates, year, variation });
      expect(found.logGrowth).toBeCloseTo(exact, 9);
      const yearly = 0.02 ** 2 / 0.6 ** 2 + 0.05 ** 2 / 1.8 ** 2;
      expect(found.yearlyVariance / ((yearly * (1 + carried)) / (1 - carried))).toBeCloseTo(1, 2);
    },
  );

  test('a parameter in two rates, one of them curved', () => {
    const found = growth({
      classes: '[all]',
      rates: 'parameters: { rain: 2 }\nsurvival: { all: 0.2 * rain }\nbirths: { all: rain ^ 3 / 10 }',
      year,
      variation: '{ rain: { sd: 0.02, shape: lognormal } }',
    });
    // The second derivative of ln 0.2x + ln(1 + x³/10) at 2, by hand.
    const curve = -1 / 4 + (6 * 2) / 10 / 1.8 - (1.2 / 1.8) ** 2;
    expect(found.logGrowth).toBeCloseTo(Math.log(0.4) + Math.log(1.8) + (curve * 0.02 ** 2) / 2, 6);
  });

  test('leavers that vary and all die', () => {
    const found = growth({
      classes: '[all]',
      patches: '[{ name: Fen, at: [0, 0], good: 1 }, { name: Moor, at: [1, 0], good: 0.01 }]',
      rates: `
position: plane
unit: km
survival: { all: "min(0.9, good)" }
births: { all: 0.4 }
roaming: { kind: dispersal, classes: [all], leaving: 0.25, kernel: { shape: exponential, mean: 1 km }, leavers: all arrive, survival-on-the-way: 0 }`,
      year: '[count, survival, breeding, roaming]',
      variation: '{ roaming: { all: { sd: 0.01 } }, between-patches: 0 }',
    });
    expect(found.logGrowth).toBeCloseTo(Math.log(0.9 * 1.4 * 0.75) - 0.01 ** 2 / (2 * 0.75 ** 2), 9);
  });
});

// Derived: over two years numbers of either class change by f s, so ln λ_s = (E ln f + E ln s)/2 = ln λ − (s_f² + s_s²)/4, twice what the
// approximation would say of independent rates.
test('two classes that alternate for ever have none', () => {
  const compiled = compileText(`
skein: 1
study: { title: Years that differ, invented: true }
years: 10
patches: [{ name: Fen }]
counts: females
classes: [young, adult]
oldest: open-ended
demography: { fates: [[0, 0], [0.5, 0]], births: [[0, 3], [0, 0]] }
year: [count, demography]
start: { total: 50 }
variation: { births: { adult: { sd: 0.06 } } }
`);
  expect(modelYears(compiled)).toEqual({ value: null, reason: expect.stringMatching(/swing for ever/) });
});

test('two stages whose years are alike by 0.7, against a simulation of 400 000 years beside the same luck without noise in its growth', () => {
  const [carried, sd] = [0.7, 0.2];
  const { logGrowth, lost } = growth({
    classes: '[young, adult]',
    rates: 'demography: { fates: [[0, 0], [0.3, 0.8]], births: [[0, 1.2], [0, 0]] }',
    year: '[count, demography]',
    variation: `{ births: { adult: { sd: ${sd}, shape: lognormal } }, autocorrelation: ${carried} }`,
  });
  const sigma = Math.sqrt(Math.log(1 + (sd / 1.2) ** 2));
  const { mean, error } = simulated({ carried, sigma, years: 400_000 });
  expect(error).toBeLessThan(lost / 20);
  expect(Math.abs(logGrowth - mean)).toBeLessThan(5 * error + 3e-5);
});

interface Simulated {
  readonly carried: number;
  readonly sigma: number;
  readonly years: number;
}

/** The growth of numbers less the part of it that is linear in the normal number, whose mean is known to be 0. */
function simulated({ carried, sigma, years }: Simulated): { mean: number; error: number } {
  const normal = normals(7);
  let [young, adult, z] = [1, 1, normal()];
  const batches: number[] = [];
  const slope = 1.2 * 0.1855419 * sigma;
  for (let batch = 0; batch < 100; batch++) {
    let sum = 0;
    for (let t = 0; t < years / 100; t++) {
      z = carried * z + Math.sqrt(1 - carried ** 2) * normal();
      const births = 1.2 * Math.exp(sigma * z - (sigma * sigma) / 2);
      const next = [births * adult, 0.3 * young + 0.8 * adult] as const;
      const total = next[0] + next[1];
      sum += Math.log(total / (young + adult)) - slope * z;
      [young, adult] = [next[0] / total, next[1] / total];
    }
    if (batch > 0) batches.push(sum / (years / 100));
  }
  const mean = batches.reduce((all, one) => all + one, 0) / batches.length;
  const variance = batches.reduce((all, one) => all + (one - mean) ** 2, 0) / (batches.length - 1);
  return { mean, error: Math.sqrt(variance / batches.length) };
}

/** Box-Muller over a small generator. */
function normals(seed: number): () => number {
  let state = seed;
  const uniform = (): number => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return (state + 0.5) / 4294967296;
  };
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}
