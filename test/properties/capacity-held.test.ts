// The strength of crowding is solved once, from the base model, and held: a plan that raises survival raises the population.
import { expect, test } from 'vitest';
import { runYear, type Compiled } from '../../src/compile/year-map.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { crowdingCount, isolatedText } from './isolated-patch.ts';

const text = isolatedText({
  year: ['count', 'breeding', 'survival', 'ageing'],
  form: 'beverton-holt',
  changes: '{ survival: [young] }',
  capacity: 200,
  alleeHalf: 0,
  young: 0.4,
  adult: 0.7,
  births: 1.6,
});
const base = compileText(text);
const raised = compileText(text, { set: [{ name: 'adult_survival', value: '0.8' }] });

function settled(compiled: Compiled): Float64Array {
  let animals: Float64Array = Float64Array.from(base.startAnimals);
  for (let t = 0; t < 3000; t++) animals = runYear(compiled, animals).after;
  return animals;
}

test('the base model settles where crowding counts its capacity', () => {
  expect(crowdingCount(base, settled(base))).toBeCloseTo(200, 8);
});

test('higher adult survival with the coefficients of the base settles higher', () => {
  const held: Compiled = { ...raised, coefficients: base.coefficients };
  const animals = settled(held);
  // 1 = s + m s₀ g with g = 1 / (1 + a (n + m n / 2)); the base has g = 0.3 / (0.7 · 1.6 · 0.4 / 0.7) at 200 (derived).
  const g = (adult: number): number => (1 - adult) / (0.4 * 1.6);
  const a = (1 / g(0.7) - 1) / 200;
  expect(base.coefficients[0]!.coefficient[0]).toBeCloseTo(a, 12);
  expect(crowdingCount(held, animals)).toBeCloseTo((1 / g(0.8) - 1) / a, 8);
  expect(crowdingCount(held, animals)).toBeGreaterThan(350);
});

test('solved anew, the raised model would be held at the old capacity', () => {
  expect(crowdingCount(raised, settled(raised))).toBeCloseTo(200, 8);
});
