// The models of plans show what their first lines say.
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { followPath, runModel } from '../../src/pipeline.ts';
import { totalCost } from '../../src/results/costs.ts';
import { scenariosOf } from '../../src/spec/plans/scenarios.ts';
import { compiledOf, specOf } from './landscape.ts';

const textOf = (name: string) => readFileSync(new URL(`../../models/${name}.yaml`, import.meta.url), 'utf8');

/** By scenario and outcome, the chance of having held by the end. */
function chancesOf(name: string, replicates: number): (scenario: string, outcome: string) => number {
  const text = textOf(name).replace(/replicates: \d+/u, `replicates: ${String(replicates)}`);
  return (scenario, outcome) => {
    const { outcomes } = runModel(compiledOf(text, scenario));
    return outcomes.find((one) => one.name === outcome)!.ever.probability;
  };
}

test('a corridor that helps only because bad years do not come everywhere at once', () => {
  const text = textOf('two-sinks');
  const path = (scenario: string) => followPath(compiledOf(text, scenario)).abundance.map(({ animals }) => animals);
  const apart = path('as now').map((animals, i) => Math.abs(animals - path('corridor')[i]!));
  expect(Math.max(...apart)).toBeLessThan(1e-9);
  const chance = chancesOf('two-sinks', 480);
  expect(chance('corridor', 'few flies')).toBeLessThan(chance('as now', 'few flies') - 0.15);
  const alike = text
    .replace('between-patches: 0 ', 'between-patches: 1 ')
    .replace('replicates: 1000', 'replicates: 480');
  const few = (scenario: string) => runModel(compiledOf(alike, scenario)).outcomes[0]!.ever.probability;
  expect(Math.abs(few('corridor') - few('as now'))).toBeLessThan(0.05);
});

test('a move that harms the pond it takes from', () => {
  const chance = chancesOf('borrowed-newts', 320);
  const source = (scenario: string) => chance(scenario, 'Mill pond thin');
  expect(source('many for long')).toBeGreaterThan(source('as now') + 0.5);
  expect(source('few and short')).toBeLessThan(source('as now') + 0.15);
  expect(chance('few and short', 'New pond holds')).toBeGreaterThan(0.4);
  expect(chance('as now', 'New pond holds')).toBe(0);
});

test('three rules that take alike and endanger a stock differently', () => {
  const chance = chancesOf('three-bags', 320);
  const [number, share, excess] = ['a fixed number', 'a share', 'what exceeds a level'].map((rule) =>
    chance(rule, 'thin stock'),
  );
  expect(number).toBeGreaterThan(share! + 0.2);
  expect(share).toBeGreaterThanOrEqual(excess!);
  expect(excess).toBeLessThan(0.02);
});

test('the flagship: four plans within its budget, risks of 5 to 20 %, two of them 3 to 8 points apart', () => {
  const text = textOf('reed-hare');
  const names = scenariosOf(specOf(text)).map(({ name }) => name);
  expect(names).toEqual(['as now', 'rewet the wash', 'mow later', 'hedge and moves', 'hedge, moves and mowing']);
  const chance = chancesOf('reed-hare', 1600);
  const [now, , mowing, hedge] = names.map((name) => chance(name, 'few adults'));
  for (const risk of [now, mowing, hedge]) expect(Math.abs(risk! - 0.125)).toBeLessThan(0.075);
  expect(Math.abs(hedge! - mowing! - 0.055)).toBeLessThan(0.025);
  for (const name of names) {
    const { presentValue } = totalCost(compiledOf(text, name).cost, () => 6);
    expect(presentValue.most).toBeLessThan(400_000);
  }
});
