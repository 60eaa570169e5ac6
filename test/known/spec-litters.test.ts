// Distributions of litters, from a spec to chances of dying out and to the spread of young.
import { describe, expect, test } from 'vitest';
import { findRoot } from '../../src/numeric/root.ts';
import { runModel } from '../../src/pipeline.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { largestDifference, pathOf } from '../pipeline/measure.ts';

/** Parents die when they have bred; the young are the parents of the next year. */
const family = (births: string, { start = 1, years = 12 } = {}) =>
  framed(
    `classes: [young, adult]
oldest: open-ended
survival: { young: 1, adult: 0 }
${births}
year: [count, breeding, survival, ageing]
start: { table: { Meadow: { adult: ${String(start)} } } }
outcomes: { gone: { of: [adult], below: 1 } }
`,
    { years },
  );

/** Shares of runs that have died out by each year, and the number of runs. */
function goneBy(text: string, replicates = 20_000): readonly number[] {
  return runModel(compileText(text, { replicates })).outcomes[0]!.byYear.map(({ ever }) => ever);
}

/** Within 5 standard errors of a share. */
function expectShare(found: number, wanted: number, runs = 20_000): void {
  expect(Math.abs(found - wanted)).toBeLessThan(5 * Math.sqrt((wanted * (1 - wanted)) / runs));
}

describe('families die out with the chance q = f(q) (branching process, derived)', () => {
  // Watson & Galton 1874, example (1/3, 1/3, 1/3): the printed values from the fourth generation on are wrong; recomputed.
  test('none, one or two young, each with a third, by generation', () => {
    const chances = 'births: {}\noffspring: { distribution: table of chances, chances: { adult: [1/3, 1/3, 1/3] } }';
    const wanted = [0.33333, 0.48148, 0.5711, 0.63242, 0.67746, 0.71214, 0.73976, 0.76233, 0.78116, 0.79713];
    goneBy(family(chances))
      .slice(0, 10)
      .forEach((found, t) => expectShare(found, wanted[t]!));
  });

  // Watson & Galton 1874, f = ((3 + x)/4)^5, recomputed: five chances of a quarter.
  test('a binomial litter of at most five', () => {
    const births = 'births: { adult: 1.25 }\noffspring: { distribution: binomial, largest-litter: 5 }';
    const wanted = [0.2373, 0.3472, 0.4103, 0.4505, 0.4776, 0.4967, 0.5105, 0.5207, 0.5282, 0.5339];
    goneBy(family(births, { years: 10 })).forEach((found, t) => expectShare(found, wanted[t]!));
  });

  test('Poisson litters of 1.2 on average', () => {
    const gone = goneBy(family('births: { adult: 1.2 }', { years: 10 }));
    for (const [year, wanted] of [
      [1, 0.3011942],
      [2, 0.4323296],
      [5, 0.584697],
      [10, 0.6546898],
    ] as const) {
      expectShare(gone[year - 1]!, wanted);
    }
  });

  test('Poisson litters of 1.5, in the end', () => {
    const gone = goneBy(family('births: { adult: 1.5 }', { years: 35 }), 8000);
    expectShare(gone.at(-1)!, 0.4171883561, 8000);
  });

  test('two young with chance 2/3, else none, in the end', () => {
    const births = 'births: {}\noffspring: { distribution: table of chances, chances: { adult: [1/3, 0, 2/3] } }';
    expectShare(goneBy(family(births, { years: 35 }), 8000).at(-1)!, 0.5, 8000);
  });

  test('ten founders with Poisson litters of 1.1 all fail as often as one to the tenth power', () => {
    const gone = goneBy(family('births: { adult: 1.1 }', { start: 10, years: 150 }), 4000);
    const root = findRoot((q) => q - Math.exp(1.1 * (q - 1)), { low: 0.1, high: 0.95 })!;
    expect(root).toBeCloseTo(0.8238658564, 10);
    expect(root ** 10).toBeCloseTo(0.1440672, 7);
    expectShare(gone.at(-1)!, 0.1440672, 4000);
  });
});

describe('litters in numbers', () => {
  const one = (births: string) => family(births, { start: 40, years: 1 });

  // derived: variance of one animal's young m (1 − m/L), m + m²/k, and of a table; shared out to females by chance.
  test.each([
    ['births: { adult: 0.7 }\noffspring: { distribution: bernoulli }', 0.7, 0.7 * 0.3],
    ['births: { adult: 2.4 }\noffspring: { distribution: binomial, largest-litter: 6 }', 2.4, 2.4 * 0.6],
    ['births: { adult: 2, female-share: 0.5 }\noffspring: { distribution: binomial, largest-litter: 4 }', 1, 0.75],
    ['births: { adult: 2 }\noffspring: { distribution: negative binomial, size: 0.5 }', 2, 2 + 8],
    ['births: { adult: 1.5 }\noffspring: { distribution: negative binomial, size: 3 }', 1.5, 1.5 + 0.75],
    ['births: {}\noffspring: { distribution: table of chances, chances: { adult: [0.5, 0, 0, 0.5] } }', 1.5, 2.25],
    // Thinned by half: variance 0.25 · 2.25 + 0.25 · 1.5.
    [
      'births: { female-share: 0.5 }\noffspring: { distribution: table of chances, chances: { adult: [0.5, 0, 0, 0.5] } }',
      0.75,
      0.9375,
    ],
  ])('%s', (births, mean, variance) => {
    const compiled = compileText(one(births), { replicates: 20_000 });
    const found = runModel(compiled).abundance.whole[1]!;
    expect(Math.abs(found.mean - 40 * mean)).toBeLessThan(5 * Math.sqrt((40 * variance) / 20_000));
    // The standard error of a variance is near variance × √(2 / n).
    expect(Math.abs(found.sd ** 2 / (40 * variance) - 1)).toBeLessThan(5.5 * Math.sqrt(2.4 / 20_000));
    expect(largestDifference(pathOf(compiled)[1]!, [0, 40 * mean])).toBeLessThan(1e-12);
  });

  test('cannot hold more young than they have room for, nor chances that do not add up', () => {
    const told = [
      'births: { adult: 1.2 }\noffspring: { distribution: bernoulli }',
      'births: { adult: 1.2 }\noffspring: { distribution: binomial }',
      'births: { adult: 1.2 }\noffspring: { distribution: poisson, size: 2 }',
      'births: {}\noffspring: { distribution: table of chances, chances: { adult: [0.5, 0.4] } }',
      'births: { adult: 1 }\noffspring: { distribution: table of chances, chances: { adult: [0.5, 0.5] } }',
    ].map((births) => errorsOf(one(births)));
    expect(told).toEqual(told.map(() => ['offspring-shape']));
  });
});
