// Chances by splitting, against exact ones and against plain runs. Seeds are fixed; bounds are 4.5 standard errors.
import { afterAll, describe, expect, test } from 'vitest';
import { Trials } from '../../src/kernel/trials.ts';
import { runModel, runModelWith } from '../../src/pipeline.ts';
import { assigned } from '../../src/results/rare/assign.ts';
import { oneRepeat } from '../../src/results/rare/splitting.ts';
import type { RareResult } from '../../src/results/results.ts';
import { alone } from '../../src/threads/alone.ts';
import { openThreads } from '../../src/threads/threads.ts';
import { compileModel } from '../golden/models.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';

const crews = [alone, openThreads({ threads: 2 })];
afterAll(() => Promise.all(crews.map((crew) => crew.close())));

function splitOf(text: string, seed = 1): RareResult {
  return runModel(compileText(text, { seed })).rare![0]!;
}

/** Every animal has a Poisson number of young of mean 1.5 and dies: ten families at first. */
const families = (run: string): string =>
  framed(
    `classes: [animal]
demography: { fates: [[0]], births: [[1.5]] }
year: [count, demography]
start: { table: { Meadow: { animal: 10 } } }
outcomes: { lost: { of: all, below: 1 } }
run: { ${run} }
`,
    { years: 12 },
  );

// Derived (Galton & Watson): one family is gone by generation t with q_t = exp(1.5 (q_{t−1} − 1)), ten of them with q_t¹⁰; the
// limit of q_t is 0.4171883561.
describe('ten families of a branching process, which are all lost once in 6600', () => {
  let q = 0;
  for (let t = 0; t < 12; t++) q = Math.exp(1.5 * (q - 1));
  const exact = q ** 10;

  test('the chance is that of the exact recursion', () => {
    expect(exact).toBeGreaterThan(1.4e-4);
    expect(exact).toBeLessThan(1.6e-4);
    const found = splitOf(families('replicates: 1000, seed: 3, rare: true'), 3);
    expect(Math.abs(found.probability! - exact)).toBeLessThan(4.5 * found.standardError!);
    expect(found.interval!.lower).toBeLessThan(found.probability!);
    expect(found.levels.at(-1)!.below).toBe(1);
    const product = found.levels.reduce((all, { passed }) => all * passed, 1);
    expect(product / exact).toBeGreaterThan(0.6);
    expect(product / exact).toBeLessThan(1.6);
  });

  test('many small repeats average to it, whatever the levels, and their own error tells how far they are off', () => {
    const { image } = compileText(families('replicates: 100, seed: 1, rare: true'));
    const runner = new Trials(image);
    for (const levels of [
      [7, 4, 2, 1],
      [6, 3, 1],
      // Levels that are passed by a jump, or hardly apart.
      [9, 8, 7, 5, 4, 3, 2, 1],
    ]) {
      const estimates = Array.from({ length: 400 }, (_, seed) => {
        const { shares } = oneRepeat(runner, { levels, outcome: 0, steps: 12, seed, trials: 80 });
        return shares.length < levels.length ? 0 : shares.reduce((all, share) => all * share, 1);
      });
      const mean = estimates.reduce((a, b) => a + b, 0) / 400;
      const error = Math.sqrt(estimates.reduce((sum, one) => sum + (one - mean) ** 2, 0) / 399 / 400);
      expect(Math.abs(mean - exact), String(levels)).toBeLessThan(4.5 * error);
      expect(error / exact).toBeLessThan(0.12);
    }
  });

  test('its 95 % intervals hold the chance about as often as they say', () => {
    const held = Array.from({ length: 60 }, (_, seed) =>
      splitOf(families('replicates: 150, seed: 1, rare: true'), seed),
    ).filter(({ interval }) => interval!.lower <= exact && exact <= interval!.upper).length;
    // Of 60, fewer than 49 with a chance below 1e-5 where each holds it with 95 %.
    expect(held).toBeGreaterThanOrEqual(49);
  });
});

// Derived in the same way: 46 families of mean 1.1 over 30 generations.
test('a chance of 1 in 11,000 is known to a tenth of itself from at least twenty times fewer years than plain runs need', () => {
  let q = 0;
  for (let t = 0; t < 30; t++) q = Math.exp(1.1 * (q - 1));
  const exact = q ** 46;
  expect(exact).toBeGreaterThan(8e-5);
  expect(exact).toBeLessThan(1.1e-4);
  const text = families('replicates: 130, rare: true')
    .replace('[[1.5]]', '[[1.1]]')
    .replace('animal: 10 }', 'animal: 46 }')
    .replace('years: 12', 'years: 30');
  const found = splitOf(text, 5);
  expect(Math.abs(found.probability! - exact)).toBeLessThan(4.5 * found.standardError!);
  expect(found.standardError! / exact).toBeLessThan(0.1);
  const plainYears = ((1 - exact) / (exact * 0.1 * 0.1)) * 30;
  expect(plainYears / found.replicateYears).toBeGreaterThan(20);
});

test('the rare loss of the model that shows it is known to a tenth of itself from thirty times fewer years', () => {
  const { probability, standardError, replicateYears } = runModel(compileModel('seldom-lost')).rare![0]!;
  const share = standardError! / probability!;
  expect(probability).toBeLessThan(2e-4);
  expect(share).toBeLessThan(0.1);
  expect((25 * (1 - probability!)) / (probability! * share * share) / replicateYears).toBeGreaterThan(30);
});

/** Weather that goes on from year to year, a catastrophe that lasts and waits, crowding, movement: all that a state holds. */
const whole = (run: string, below = 12): string =>
  framed(
    `classes: [young, adult]
oldest: open-ended
survival: { young: 0.5, adult: 0.75 }
births: { adult: 0.9 }
year: [count, breeding, survival, roaming, ageing]
roaming: { kind: dispersal, classes: [young], shares: { A: { B: 0.1 }, B: { A: 0.1 } } }
crowding: { form: beverton-holt, changes: { survival: [young] }, counted: [adult], capacity: capacity, where-declining: none }
variation: { survival: { adult: { sd: 0.12 } }, autocorrelation: 0.6, between-patches: 0.5 }
storm: { kind: catastrophe, chance: 0.1 per patch, reach: one patch, lasts: 2 years, wait: 4 years, multiplies: { survival: { adult: 0.7 } }, capacity: { times: 0.5, for: 3 years } }
start: { table: { A: { adult: 40 }, B: { adult: 30 } } }
outcomes: { few: { of: [adult], below: ${below} } }
run: { ${run} }
`,
    { patches: '[{ name: A, capacity: 50 }, { name: B, capacity: 40 }]', years: 15 },
  );

test('a state holds all that a future depends on: the chance is that of plain runs', () => {
  const found = splitOf(whole('replicates: 1500, seed: 9, rare: true'), 9);
  const plain = runModel(compileText(whole('replicates: 60000, seed: 77'), { seed: 77 })).outcomes[0]!.ever;
  expect(plain.probability).toBeGreaterThan(0.001);
  expect(plain.probability).toBeLessThan(0.05);
  const error = Math.hypot(found.standardError!, Math.sqrt(plain.probability / 60_000));
  expect(Math.abs(found.probability! - plain.probability)).toBeLessThan(4.5 * error);
});

test('gives the same bytes whoever runs the plain replicates, and stands in no other number', async () => {
  const compiled = compileText(whole('replicates: 120, seed: 9, rare: true', 20));
  const results = runModel(compiled);
  for (const crew of crews) {
    const finished = await runModelWith(crew, compiled);
    expect(JSON.stringify(finished.results)).toBe(JSON.stringify(results));
  }
  const { rare: _rare, hash: _hash, ...others } = results;
  const { hash: _other, ...plain } = runModel(compileText(whole('replicates: 120, seed: 9', 20)));
  expect(others).toEqual(plain);
});

test('every entrance has the same expected number of trials', () => {
  const entrances = Array.from({ length: 7 }, (_, step) => ({ step, value: 0, state: null }));
  const counts = new Float64Array(7);
  const rounds = 4000;
  for (let round = 0; round < rounds; round++) {
    const chosen = assigned(entrances, { trials: 17, seed: 3, words: [round, 0] });
    expect(chosen).toHaveLength(17);
    const own = new Float64Array(7);
    for (const { step } of chosen) own[step]!++;
    expect(Math.max(...own)).toBeLessThanOrEqual(3);
    expect(Math.min(...own)).toBeGreaterThanOrEqual(2);
    own.forEach((count, i) => (counts[i]! += count));
  }
  const share = 3 / 7;
  for (const count of counts) {
    expect(Math.abs(count / rounds - 17 / 7)).toBeLessThan(5 * Math.sqrt((share * (1 - share)) / rounds));
  }
});

/** The chance that a branching process with Poisson young of this mean ever comes to a count that is `so`, by the exact chain. */
function everSo(start: number, mean: number, { years, so }: { years: number; so: (n: number) => boolean }): number {
  const most = 400;
  let chances = new Float64Array(most + 1);
  chances[start] = 1;
  let come = 0;
  for (let year = 0; year < years; year++) {
    const next = new Float64Array(most + 1);
    chances.forEach((chance, n) => {
      if (chance === 0) return;
      let term = chance * Math.exp(-mean * n);
      let left = chance;
      for (let young = 0; young <= most; young++) {
        if (young > 0) term *= (mean * n) / young;
        if (so(young)) come += term;
        else next[young] = next[young]! + term;
        left -= term;
      }
      if (left > 0 && so(most + 1)) come += left;
    });
    chances = next;
  }
  return come;
}

// Derived by the exact chain over whole counts, without simulation.
test.each([
  { what: 'a rise', outcome: 'above: 55', mean: 0.9, so: (n: number) => n > 55 },
  { what: 'a fall by a share of the start', outcome: 'fallen-by: 90 %', mean: 1.25, so: (n: number) => n <= 2 },
])('$what is split, too: its chance is that of the exact chain', ({ outcome, mean, so }) => {
  const exact = everSo(20, mean, { years: 12, so });
  expect(exact).toBeGreaterThan(1e-5);
  expect(exact).toBeLessThan(2e-3);
  const text = families('replicates: 800, rare: true')
    .replace('[[1.5]]', `[[${mean}]]`)
    .replace('animal: 10 }', 'animal: 20 }')
    .replace('below: 1', outcome);
  const found = splitOf(text, 4);
  expect(Math.abs(found.probability! - exact)).toBeLessThan(4.5 * found.standardError!);
  expect(found.standardError! / exact).toBeLessThan(0.12);
  const last = found.levels.at(-1)!;
  if (outcome.startsWith('above')) expect(last).toMatchObject({ above: 55 });
  else expect(last.below).toBeCloseTo(2, 6);
});

test('the loss of one sex is split: its chance is that of plain runs', () => {
  const pairs = (run: string): string => `skein: 1
study: { title: Pairs }
years: 12
patches: [{ name: A }]
counts: both sexes
classes: { females: [girl, woman], males: [boy, man] }
oldest: { females: open-ended, males: open-ended }
survival: { girl: 0.6, woman: 0.75, boy: 0.6, man: 0.75 }
births: { woman: 0.9, female-share: 0.5 }
mating: { form: harmonic mean, males: [man], females-per-male: 1 }
year: [count, breeding, survival, ageing]
start: { table: { A: { woman: 14, man: 14 } } }
outcomes: { one sex gone: { of: [woman, man], lacking: one sex } }
run: { ${run} }
`;
  const found = splitOf(pairs('replicates: 1000, rare: true'), 6);
  const plain = runModel(compileText(pairs('replicates: 40000'), { seed: 60 })).outcomes[0]!.ever.probability;
  expect(plain).toBeGreaterThan(1e-3);
  expect(plain).toBeLessThan(0.05);
  const error = Math.hypot(found.standardError!, Math.sqrt(plain / 40_000));
  expect(Math.abs(found.probability! - plain)).toBeLessThan(4.5 * error);
});

describe('where it does not hold it is refused with the reason', () => {
  test('before the run: over draws, and where every outcome asks for several counts', () => {
    expect(errorsOf(families('replicates: 100, rare: true').replace('below: 1', 'below: 1, for: 3'))).toEqual([
      'rare-shape',
    ]);
    expect(errorsOf(families('replicates: 100, rare: true').replace(/outcomes:.*/u, ''))).toEqual(['rare-shape']);
    expect(errorsOf(families('replicates: 100, rare: true, draws: 5'))).toContain('rare-shape');
  });

  test('in the results: several counts beside an outcome that is split', () => {
    const both = families('replicates: 100, rare: true').replace('lost:', 'long: { of: all, below: 3, for: 2 }, lost:');
    const [long, lost] = runModel(compileText(both)).rare!;
    expect(long).toMatchObject({
      probability: null,
      interval: null,
      reason: expect.stringContaining('one after the other'),
    });
    expect(lost!.probability).toBeGreaterThan(0);
  });

  test('in the results: a fall from nobody', () => {
    const young = framed(`classes: [young, adult]
oldest: open-ended
survival: { young: 0.5, adult: 0.5 }
births: { adult: 0.9 }
year: [breeding, count, survival, ageing]
start: { table: { Meadow: { adult: 10 } } }
outcomes: { fewer young: { of: [young], fallen-by: 50 % } }
run: { replicates: 100, rare: true }
`);
    expect(splitOf(young)).toMatchObject({
      probability: null,
      reason: expect.stringContaining('there can be no fall'),
    });
  });

  test('in the results: runs that had to be stopped', () => {
    const many = families('replicates: 100, rare: true')
      .replace('[[1.5]]', '[[40]]')
      .replace('animal: 10 }', 'animal: 1000 }');
    expect(splitOf(many.replace('below: 1', 'below: 900'))).toMatchObject({
      probability: null,
      reason: expect.stringContaining('too many animals'),
    });
  });
});

test('where numbers do not fall level by level it says so', () => {
  const never = framed(`classes: [animal]
oldest: open-ended
survival: { animal: 1 }
year: [count, survival]
start: { table: { Meadow: { animal: 10 } } }
outcomes: { lost: { of: all, below: 1 } }
run: { replicates: 100, rare: true }
`);
  expect(splitOf(never)).toMatchObject({ probability: null, reason: expect.stringContaining('level by level') });
});
