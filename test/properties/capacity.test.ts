// Capacity is the crowding count at which a patch alone stands still: whatever the order of the year, whatever crowding
// changes, in both forms, with and without an Allee factor.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { runYear } from '../../src/compile/year-map.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { heldAt, isolatedText, type Isolated } from './isolated-patch.ts';

const inPhases = ['{ survival: [young] }', '{ births: [adult] }', '{ survival: all, births: [adult] }'];
const inOneMatrix = ['{ births: [adult] }', '{ fates: [young] }', '{ fates: all, births: all }'];

const orders = fc
  .shuffledSubarray(['count', 'breeding', 'survival', 'ageing'], { minLength: 4 })
  // Young that are born after survival and age before it are adults at once: no young are ever there to be crowded.
  .filter((year) => youngMeetSurvival(year));

const years = fc.oneof(
  fc.record({ year: orders, changes: fc.constantFrom(...inPhases) }),
  fc.record({
    year: fc.constantFrom(['count', 'demography'], ['demography', 'count']),
    changes: fc.constantFrom(...inOneMatrix),
  }),
);

const cases: fc.Arbitrary<Isolated> = fc
  .record({
    at: years,
    form: fc.constantFrom('beverton-holt' as const, 'ricker' as const),
    capacity: fc.integer({ min: 5, max: 5000 }),
    alleeShare: fc.constantFrom(0, 0, 0.01, 0.1),
    young: fc.integer({ min: 30, max: 70 }).map((percent) => percent / 100),
    adult: fc.integer({ min: 30, max: 85 }).map((percent) => percent / 100),
    // Young raised by an adult in its life, from a population that just grows to one that quadruples.
    raised: fc.integer({ min: 16, max: 60 }).map((tenths) => tenths / 10),
  })
  .map(({ at, form, capacity, alleeShare, young, adult, raised }) => ({
    ...at,
    form,
    capacity,
    alleeHalf: alleeShare * capacity,
    young,
    adult,
    births: Number(((raised * (1 - adult)) / (young * adult)).toFixed(4)),
  }));

/** In the circle of the year survival comes between breeding and ageing. */
function youngMeetSurvival(year: readonly string[]): boolean {
  const turned = [...year, ...year].slice(year.indexOf('breeding'));
  return turned.indexOf('survival') < turned.indexOf('ageing');
}

test('the year gives back what it began with, at the capacity and nowhere near it', () => {
  fc.assert(
    fc.property(cases, (isolated) => {
      const compiled = compileText(isolatedText(isolated));
      expect(compiled.coefficients[0]?.form).toEqual([isolated.form]);
      const growthAt = (count: number): number => {
        const animals = heldAt(compiled, count);
        return sum(runYear(compiled, animals).after) / sum(animals);
      };
      expect(Math.abs(growthAt(isolated.capacity) - 1)).toBeLessThan(1e-9);
      expect(growthAt(1.3 * isolated.capacity)).toBeLessThan(1 - 1e-4);
      expect(growthAt(0.9 * isolated.capacity)).toBeGreaterThan(1 + 1e-4);
    }),
    { seed: 4, numRuns: 50 },
  );
});

test('a year after which the young are adults at once has nobody to crowd, and that is told', () => {
  const isolated: Isolated = {
    year: ['count', 'survival', 'breeding', 'ageing'],
    form: 'ricker',
    changes: '{ survival: [young] }',
    capacity: 100,
    alleeHalf: 0,
    young: 0.5,
    adult: 0.7,
    births: 1,
  };
  expect(errorsOf(isolatedText(isolated))).toEqual(['capacity-unreachable']);
});

test('an Allee factor that alone holds a patch below its capacity is told', () => {
  const isolated: Isolated = {
    year: ['count', 'breeding', 'survival', 'ageing'],
    form: 'beverton-holt',
    changes: '{ births: [adult] }',
    capacity: 10,
    alleeHalf: 40,
    young: 0.5,
    adult: 0.7,
    births: 2,
  };
  expect(errorsOf(isolatedText(isolated))).toEqual(['capacity-unreachable']);
  expect(errorsOf(isolatedText({ ...isolated, alleeHalf: 4 }))).toEqual([]);
});

function sum(animals: Float64Array): number {
  return animals.reduce((total, value) => total + value, 0);
}
