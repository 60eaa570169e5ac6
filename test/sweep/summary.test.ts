// What a sweep says where a measure is missing under one scenario, and what a scenario's name may hold.
import { expect, test } from 'vitest';
import type { Manifest } from '../../src/sweep/manifest.ts';
import { summariseSweep } from '../../src/sweep/summary/summarise.ts';
import type { Swept } from '../../src/sweep/summary/swept.ts';

const scenarios = ['as now', 'mow less often'];

/** A grid of four points over one number, with one measure under both scenarios. */
function sweptOf(name: string, [now, plan]: readonly [readonly number[], readonly number[]]): Swept {
  const levels = [1, 2, 3, 4];
  const manifest: Manifest = {
    format: 'skein-sweep/1',
    tool: { name: 'skein', version: '0.1.0', kernel: '1' },
    model: 'Two ponds',
    hash: '0'.repeat(64),
    design: { design: 'grid', factors: [{ name: 'brood', base: 1, range: { by: 'values', values: levels } }] },
    measures: ['growth'],
    scenarios,
    quantities: scenarios.map((scenario) => ({ name, scenario, better: 'more' })),
    points: 4,
    pointsInPart: 4,
    parts: 1,
    runs: null,
    columns: scenarios.map((scenario) => ({ name: `${name} [${scenario}]`, type: 'number', unit: '', meaning: '' })),
    spec: {},
  };
  const numbers = new Map([
    [`${name} [as now]`, Float64Array.from(now)],
    [`${name} [mow less often]`, Float64Array.from(plan)],
  ]);
  return { manifest, values: [Float64Array.from(levels)], numbers, failures: new Map() };
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
  expect(ranking!.factors[0]!.switches).toEqual([{ at: 2.5, from: 'as now', to: 'mow less often' }]);
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
