// A patch taken out of a landscape lives through the same year as it does within it.
import { expect, test } from 'vitest';
import { onePatch } from '../../src/analysis/apart.ts';
import { wholeYear } from '../../src/compile/year-map.ts';
import { compileText } from '../pipeline/compile-text.ts';

const text = (limit: string) => `skein: 1
study: { title: Two springs, invented: true }
first-year: 2030
years: 5
patches:
  - { name: A, capacity: { 2030: 40, 2032: 60, between: steps } }
  - { name: B, capacity: { 2030: 90, 2032: 70, between: steps } }
counts: females
classes: [young, adult]
oldest: open-ended
survival: { young: 0.5, adult: 0.8 }
births: { adult: 1.2 }
year: [count, breeding, survival, ageing${limit.startsWith('room') ? ', room' : ''}]
${limit}
start: { table: { A: { adult: 50 }, B: { adult: 80 } } }
`;

test.each([
  ['crowding: { form: beverton-holt, changes: { births: [adult] }, counted: [adult], capacity: capacity }'],
  ['room: { kind: ceiling, takes: at random, counted: [adult], capacity: capacity }'],
])('where capacities change with the years: %s', (limit) => {
  const compiled = compileText(text(limit));
  const animals = Float64Array.of(30, 50, 40, 150);
  const together = wholeYear(compiled).apply(animals);
  [0, 1].forEach((p) => {
    const own = wholeYear(onePatch(compiled, p)).apply(animals.slice(2 * p, 2 * p + 2));
    expect(own).toEqual(together.slice(2 * p, 2 * p + 2));
  });
});
