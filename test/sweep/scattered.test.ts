// Few points of a sampled design: what one number does is told from what the others did at the same points, and changes of the
// preferred scenario are told in lines that a terminal holds.
import { expect, test } from 'vitest';
import { sweepPage } from '../../src/report/sweep/sweep-page.ts';
import { sweepText } from '../../src/report/sweep/sweep-text.ts';
import { openDesign, type DesignPlan } from '../../src/sweep/design/design.ts';
import type { Factor } from '../../src/sweep/design/factor.ts';
import type { Manifest } from '../../src/sweep/manifest.ts';
import { summariseSweep } from '../../src/sweep/summary/summarise.ts';
import type { Swept } from '../../src/sweep/summary/swept.ts';
import { preferredMaps } from '../../src/sweep/summary/heat.ts';

const points = 40;
const unit = { by: 'from to', from: 0, to: 1, scale: 'even', steps: 11 } as const;
const factors: readonly Factor[] = ['survival', 'idle'].map((name) => ({ name, base: 0.5, range: unit }));
const design: DesignPlan = { design: 'sobol', factors, points, seed: 3, scrambled: true };
const scenarios = ['as now', 'hedges, moves and mowing'];

/** Growth rises with the survival alone; the plan is better where survival is high. */
function swept(plan: (survival: number) => number): Swept {
  const opened = openDesign(design);
  const rows = Array.from({ length: points }, (_, i) => opened.at(i).map(Number));
  const values = factors.map((_, k) => Float64Array.from(rows, (row) => row[k] ?? NaN));
  const now = Float64Array.from(rows, ([survival = NaN]) => 0.9 + 0.2 * survival);
  const manifest: Manifest = {
    format: 'skein-sweep/1',
    tool: { name: 'skein', version: '0.1.0', kernel: '1' },
    model: 'Two ponds',
    hash: '0'.repeat(64),
    design,
    measures: ['growth'],
    scenarios,
    quantities: scenarios.map((scenario) => ({ name: 'growth', scenario, better: 'more' })),
    points,
    pointsInPart: points,
    parts: 1,
    runs: null,
    columns: scenarios.map((scenario) => ({ name: `growth [${scenario}]`, type: 'number', unit: '', meaning: '' })),
    spec: {},
  };
  const numbers = new Map([
    ['growth [as now]', now],
    ['growth [hedges, moves and mowing]', Float64Array.from(rows, ([survival = NaN]) => plan(survival))],
  ]);
  return { manifest, values, numbers, told: new Map(), perhapsBest: new Map(), failures: new Map() };
}

test('a number that does nothing decides next to nothing, and one that does all decides most', () => {
  const { rankings, quantities } = summariseSweep(swept((survival) => 0.8 + 0.4 * survival));
  const decides = new Map(rankings[0]!.factors.map((one) => [one.name, one.decides]));
  expect(decides.get('survival')).toBeGreaterThan(0.7);
  expect(decides.get('idle')).toBeLessThan(0.2);
  expect(rankings[0]!.factors.map(({ name }) => name)).toEqual(['survival', 'idle']);
  const growth = quantities[0]!.factors;
  expect(growth.map(({ name }) => name)).toEqual(['survival', 'idle']);
  expect(growth[0]!.response.explained).toBeGreaterThan(0.9);
  expect(growth[1]!.response.explained).toBeLessThan(0.1);
  for (const { response } of growth) for (const group of response.groups) expect(group.points).toBe(5);
});

test('cells of a map hold points', () => {
  const scattered = swept((survival) => 0.8 + 0.4 * survival);
  const [map] = preferredMaps(scattered, summariseSweep(scattered));
  expect(map!.cells).toHaveLength(64);
});

test('the page writes the middle of a slice beside its cells, and draws no map where no plan differs', () => {
  const page = (plan: (survival: number) => number): string => {
    const scattered = swept(plan);
    return sweepPage(scattered, summariseSweep(scattered));
  };
  const drawn = page((survival) => 0.8 + 0.4 * survival);
  expect(drawn).toContain('survival (middles of slices)');
  expect(drawn).not.toMatch(/>0\.\d+ to[^<]*…</u);
  expect(page((survival) => 0.9 + 0.2 * survival)).toContain('No plan differs from another by it.');
});

test('what changes the preferred scenario is told in lines of the width', () => {
  const back = (survival: number): number => 0.9 + 0.2 * survival + 0.01 * Math.sin(18 * survival);
  const text = sweepText(summariseSweep(swept(back)), { colour: false, width: 80, details: false });
  expect(text.split('\n').filter((line) => line.length > 80)).toEqual([]);
  expect(text).toContain('over idle: it decides nothing by itself');
  expect(text).toMatch(
    /^over survival, which decides [\d.]+ % of it: first “hedges, moves and mowing”;\sfrom 0\.\d+ “as now”;/mu,
  );
});

test('scenarios that are equal everywhere are said to be so, without shares of being best', () => {
  const text = sweepText(summariseSweep(swept((survival) => 0.9 + 0.2 * survival)), {
    colour: false,
    width: 80,
    details: false,
  });
  expect(text).toContain('best by growth (more is better)\nno scenario differs from another by it');
  expect(text).not.toContain('best at');
});

test('what stands out on a terminal with colour is no broken code', () => {
  const summary = summariseSweep(swept((survival) => 0.8 + 0.4 * survival));
  for (const details of [true, false])
    expect(sweepText(summary, { colour: true, width: 80, details })).not.toContain('\uFFFD');
});
