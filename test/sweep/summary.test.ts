// What a sweep says where a measure is missing under one scenario, and what a scenario's name may hold.
import { expect, test } from 'vitest';
import type { Manifest } from '../../src/sweep/manifest.ts';
import { sweepText } from '../../src/report/sweep/sweep-text.ts';
import { summariseSweep } from '../../src/sweep/summary/summarise.ts';
import type { Swept } from '../../src/sweep/summary/swept.ts';

const scenarios = ['as now', 'mow less often'];

/** A grid over one number, with one measure under both scenarios; `told` by point the sign of their difference, 0 where it is not known. */
function sweptOf(
  name: string,
  [now, plan]: readonly [readonly number[], readonly number[]],
  told?: readonly number[],
): Swept {
  const levels = now.map((_, i) => i + 1);
  const manifest: Manifest = {
    format: 'skein-sweep/1',
    tool: { name: 'skein', version: '0.1.0', kernel: '1' },
    model: 'Two ponds',
    hash: '0'.repeat(64),
    design: { design: 'grid', factors: [{ name: 'brood', base: 1, range: { by: 'values', values: levels } }] },
    measures: ['growth'],
    scenarios,
    quantities: scenarios.map((scenario) => ({ name, scenario, better: 'more' })),
    points: levels.length,
    pointsInPart: levels.length,
    parts: 1,
    runs: null,
    columns: scenarios.map((scenario) => ({ name: `${name} [${scenario}]`, type: 'number', unit: '', meaning: '' })),
    spec: {},
  };
  const numbers = new Map([
    [`${name} [as now]`, Float64Array.from(now)],
    [`${name} [mow less often]`, Float64Array.from(plan)],
  ]);
  const whole = { manifest, values: [Float64Array.from(levels)], numbers, failures: new Map<string, number>() };
  if (told === undefined) return { ...whole, told: new Map(), perhapsBest: new Map() };
  const perhaps = (sign: number) => Int8Array.from(told, (own) => (own === sign || own === 0 ? 1 : 0));
  return {
    ...whole,
    told: new Map([[`${name} [mow less often]`, Int8Array.from(told)]]),
    perhapsBest: new Map([
      [`${name} [as now]`, perhaps(-1)],
      [`${name} [mow less often]`, perhaps(1)],
    ]),
  };
}

test('points at which a measure is missing under any scenario rank none', () => {
  const { rankings } = summariseSweep(
    sweptOf('standing', [
      [10, 10, 10, 10],
      [NaN, 8, 12, 14],
    ]),
  );
  const [ranking] = rankings;
  expect(ranking!.scenarios.map(({ best }) => best)).toEqual([1 / 3, 2 / 3]);
  expect(ranking!.factors[0]!.groups.map(({ from, preferred }) => [from, preferred])).toEqual([
    [2, 'as now'],
    [3, 'mow less often'],
    [4, 'mow less often'],
  ]);
  expect(ranking!.factors[0]!.switches).toEqual([{ at: 2.5, from: 'as now', to: 'mow less often', untold: null }]);
});

test('where runs do not tell two plans apart, neither counts as told best, and a change is known no closer', () => {
  const swept = sweptOf(
    'animals',
    [
      [10, 10, 10, 10, 10, 10],
      [7, 9, 9.5, 10.5, 13, 10.1],
    ],
    [-1, -1, 0, 0, 1, 0],
  );
  const { rankings, quantities } = summariseSweep(swept);
  const [ranking] = rankings;
  expect(ranking).toMatchObject({ points: 6, told: 3 });
  expect(ranking!.scenarios).toEqual([
    { name: 'as now', best: 0.5, toldBest: 2 / 6 },
    { name: 'mow less often', best: 0.5, toldBest: 1 / 6 },
  ]);
  const [brood] = ranking!.factors;
  expect(brood!.groups.map(({ told }) => told)).toEqual([1, 1, 0, 0, 1, 0]);
  expect(brood!.switches).toEqual([{ at: 3.5, from: 'as now', to: 'mow less often', untold: { from: 3, to: 4 } }]);
  const difference = quantities.find(({ name }) => name.endsWith('less as now]'))!;
  expect(difference.told).toEqual({ above: 1, below: 2, not: 3 });
  expect(difference.factors[0]!.response.groups.map(({ told }) => told)).toEqual([1, 1, 0, 0, 1, 0]);
  const text = sweepText(summariseSweep(swept), { colour: false, width: 80, details: false });
  expect(text.replaceAll('\n', ' ')).toContain(
    '“as now” and “mow less often” each at 50.0 % of 6 points; at 3 of them the best is told apart',
  );
  expect(text.replaceAll('\n', ' ')).toContain(
    'first “as now”; from 3.5 “mow less often” (not told apart from 3 to 4)',
  );
  expect(text.split('\n').filter((line) => line.length > 80)).toEqual([]);
});

test('growth goes through 1 under a scenario of any name, and a difference of growths does not', () => {
  const { quantities } = summariseSweep(
    sweptOf('growth', [
      [0.9, 0.95, 1.05, 1.1],
      [0.8, 0.9, 0.95, 1.05],
    ]),
  );
  expect(
    quantities.map(({ name, factors }) => [name, factors[0]!.throughOne?.map((at) => at.toFixed(6)) ?? null]),
  ).toEqual([
    ['growth [as now]', ['2.500000']],
    ['growth [mow less often]', ['3.500000']],
    ['growth [mow less often less as now]', null],
  ]);
});

test('plans that come to the same are equal, though the halves of their replicates differ and are not of one size', () => {
  // Derived: 5 of 51 futures each, 1 and 4 of them in the halves, or 2 and 3; of 25 and 26 futures.
  const name = 'chance: few';
  const swept = sweptOf(name, [
    [5 / 51, 5 / 51],
    [5 / 51, 6 / 51],
  ]);
  const numbers = new Map([
    ...swept.numbers,
    [`${name} [as now] (first half)`, Float64Array.of(1 / 25, 1 / 25)],
    [`${name} [as now] (second half)`, Float64Array.of(4 / 26, 4 / 26)],
    [`${name} [mow less often] (first half)`, Float64Array.of(2 / 25, 2 / 25)],
    [`${name} [mow less often] (second half)`, Float64Array.of(3 / 26, 4 / 26)],
  ]);
  const { rankings, quantities } = summariseSweep({ ...swept, numbers });
  expect(rankings[0]!.scenarios.map(({ best }) => best)).toEqual([0.25, 0.75]);
  expect(quantities.find((one) => one.name.includes('less as now'))!.mean).toBeCloseTo(0.5 / 51, 12);
});

test('a measure from one run ranks by that run', () => {
  const name = 'animals';
  const swept = sweptOf(name, [
    [5, 5],
    [6, 7],
  ]);
  const none = Float64Array.of(NaN, NaN);
  const numbers = new Map([
    ...swept.numbers,
    ...scenarios.map((one) => [`${name} [${one}] (first half)`, none] as const),
    ...scenarios.map((one) => [`${name} [${one}] (second half)`, swept.numbers.get(`${name} [${one}]`)!] as const),
  ]);
  const [ranking] = summariseSweep({ ...swept, numbers }).rankings;
  expect(ranking!.scenarios.map(({ best }) => best)).toEqual([0, 1]);
  expect(ranking!.agree).toBeNull();
});
