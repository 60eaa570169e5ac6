// What actions make of populations with known answers: published matrices, two sinks, and a stage that is followed year by year.
import { describe, expect, test } from 'vitest';
import { followPath } from '../../src/pipeline.ts';
import { killerWhale, loggerhead } from '../numeric/published.ts';
import { framed } from '../pipeline/frame.ts';
import { leadingOf, pathOf } from '../pipeline/measure.ts';
import { errorsOf } from '../pipeline/compile-text.ts';
import { compiledOf } from '../plans/landscape.ts';

type Rows = readonly (readonly (number | string)[])[];

function ofMatrix(rows: Rows, more: string): string {
  const fates = rows.map((row, i) => row.map((entry) => (i === 0 ? 0 : entry)));
  const births = rows.map((row, i) => row.map((entry) => (i === 0 ? entry : 0)));
  const text = (all: Rows) => `[${all.map((row) => `[${row.join(', ')}]`).join(', ')}]`;
  const classes = rows.map((_, i) => `stage_${i + 1}`);
  return framed(`classes: [${classes.join(', ')}]
demography: { fates: ${text(fates)}, births: ${text(births)} }
year: [count, demography]
start: { table: { Meadow: { stage_2: 100 } } }
${more}`);
}

describe('published matrices under a plan', () => {
  test('killer whales stand still where 2.48 % are taken (1 - 1/growth; Brault & Caswell 1993)', () => {
    const bag = (share: number) =>
      ofMatrix(
        killerWhale,
        `actions: { bag: { kind: take, classes: all, share: ${share}, after: demography } }
scenarios: { plan: [bag] }
`,
      );
    expect(leadingOf(compiledOf(bag(0.0248101), 'plan')).growthRate).toBeCloseTo(1, 7);
    expect(leadingOf(compiledOf(bag(0.0248101), 'as now')).growthRate).toBeCloseTo(1.025441, 6);
  });

  test('loggerhead turtles stand still where every rate is 5.8 % higher (Crouse, Crowder & Caswell 1987)', () => {
    const text = ofMatrix(
      loggerhead.map((row) => row.map((entry) => (entry === 0 ? 0 : `rise * ${entry}`))),
      `parameters: { rise: 1 }
actions: { care: { kind: change, parameters: { rise: { times: 1.0581664 } } } }
scenarios: { plan: [care] }
`,
    );
    expect(leadingOf(compiledOf(text, 'as now')).growthRate).toBeCloseTo(1 / 1.0581664, 7);
    expect(leadingOf(compiledOf(text, 'plan')).growthRate).toBeCloseTo(1, 7);
  });
});

/**
 * Of n heaths joined by corridors, growth a year over all combinations of good (1.7) and bad (0.5) years, each once: that of a long time
 * in which heaths have their years by themselves, since the mean of the logarithms is the same.
 */
function growthOfHeaths(heaths: number, { scenario, alike }: { scenario: 'as now' | 'plan'; alike: boolean }): number {
  const names = Array.from({ length: heaths }, (_, p) => `P${p}`);
  const years = alike ? 2 : 2 ** heaths;
  const good = (year: number, p: number): boolean => ((year >> (alike ? 0 : p)) & 1) === 1;
  const yearsOf = (p: number) => Array.from({ length: years }, (_, t) => `${t + 1}: ${good(t, p) ? 1.7 : 0.5}`);
  const pairs = names.flatMap((a, p) => names.slice(p + 1).map((b) => [a, b] as const));
  const actions = pairs.map(
    ([a, b]) => `${a}${b}: { kind: link, between: [${a}, ${b}], share: { set: ${1 / heaths} } }`,
  );
  const none = names.map(
    (a) =>
      `${a}: { ${names
        .filter((b) => b !== a)
        .map((b) => `${b}: 0`)
        .join(', ')} }`,
  );
  const text = framed(
    `classes: [fly]
drivers: { values: { ${names.map((_, p) => `g${p}: { ${yearsOf(p).join(', ')} }`).join(', ')} }, future: as-dated }
demography: { births: [[g0]] }
in: { ${names.map((name, p) => `${name}: { demography: { births: [[g${p}]] } }`).join(', ')} }
year: [count, demography, flight]
flight: { kind: dispersal, classes: [fly], shares: { ${none.join(', ')} } }
start: { table: { ${names.map((name) => `${name}: { fly: 1000 }`).join(', ')} } }
actions: { ${actions.join(', ')} }
scenarios: { plan: [${pairs.map((pair) => pair.join('')).join(', ')}] }
`,
    { patches: `[${names.map((name) => `{ name: ${name} }`).join(', ')}]`, years },
  );
  const path = pathOf(compiledOf(text, scenario));
  const sum = (counts: readonly number[]) => counts.reduce((a, b) => a + b, 0);
  return (sum(path.at(-1)!) / sum(path[0]!)) ** (1 / years);
}

// Alone each has √(1.7 · 0.5); mixed wholly, two have the geometric mean of 1.7, 1.1, 1.1 and 0.5 (derived; the idea from memory of
// Jansen & Yoshimura 1998). With corridors between all, each keeps 1/n and gets as much from every other.
describe('corridors between sinks', () => {
  test.each([
    [2, { scenario: 'plan', alike: false }, 1.0070501],
    [4, { scenario: 'plan', alike: false }, 1.055396],
    [2, { scenario: 'plan', alike: true }, 0.9219544],
  ] as const)('%i of them, %j', (heaths, what, wanted) => {
    expect(growthOfHeaths(heaths, what)).toBeCloseTo(wanted, 6);
  });

  test('without them each declines', () => {
    // In a time in which every heath has as many good years as bad ones.
    expect(growthOfHeaths(2, { scenario: 'as now', alike: false })).toBeCloseTo(Math.sqrt(1.7 * 0.5), 9);
  });
});

// Four years of a young stage, each with survival 0.8: who is released in its third year is grown a year before the first-years.
describe('a release by age into a stage that is followed year by year', () => {
  const text = (number: string) =>
    framed(
      `classes: [young, adult]
oldest: open-ended
duration: { young: { years: 4, as: expanded } }
survival: { young: 0.8, adult: 0.9 }
year: [count, survival, ageing]
start: { table: { Meadow: { adult: 10 } } }
actions: { release: { kind: add, in: Meadow, number: ${number}, before: survival, years: [1], first-year-survival: { young 3: 0.5 } } }
scenarios: { plan: [release] }
`,
      { years: 4 },
    );
  const adults = (number: string) =>
    followPath(compiledOf(text(number), 'plan'))
      .abundance.filter((one) => one.class === 'adult')
      .map(({ animals }) => animals);

  test('grows up as many years later as its age lacks', () => {
    const expected = (released: (t: number) => number) => [0, 1, 2, 3, 4].map((t) => 10 * 0.9 ** t + released(t));
    // Half of them die of being new; of 50 left, 0.8² live to be adult at the second count.
    const late = expected((t) => (t < 2 ? 0 : 100 * 0.5 * 0.8 ** 2 * 0.9 ** (t - 2)));
    adults('{ young 3: 100 }').forEach((animals, t) => expect(animals).toBeCloseTo(late[t]!, 10));
    const early = expected((t) => (t < 4 ? 0 : 100 * 0.8 ** 4));
    adults('{ young 1: 100 }').forEach((animals, t) => expect(animals).toBeCloseTo(early[t]!, 10));
  });

  test('says for which year each number is', () => {
    const all = text('{ young: 100 }').replace('years: 4\n', 'years: 4\nrun: { scenario: plan }\n');
    expect(errorsOf(all)).toEqual(['stage-duration']);
  });
});
