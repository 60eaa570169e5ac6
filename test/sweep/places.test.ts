// Units of the numbers that a sweep can go over are those of the language.
import { expect, test } from 'vitest';
import type { SweepSpec } from '../../src/spec/schema/spec.ts';
import { placesIn, unitOfPlace } from '../../src/sweep/places.ts';
import { planSweep } from '../../src/sweep/request.ts';
import { compileModel } from '../golden/models.ts';

test('a place has the unit of its key, what multiplies a number has none', () => {
  const { spec } = compileModel('reed-hare');
  const units = {
    'natal.leaving': 'share',
    'natal.kernel.mean': 'km',
    'patches.Saltmarsh.capacity': 'animals',
    'patches.Saltmarsh.area': 'km2',
    'patches.Saltmarsh.at.1': 'km',
    'actions.hedgerow.distance.times': '',
    'actions.hedgerow.crossing-death.set': '',
    'actions.hedgerow.cost.once': 'crowns',
    'money.discount': 'share a year',
    adult_survival: '',
    scenario: '',
  };
  expect(Object.fromEntries(Object.keys(units).map((name) => [name, unitOfPlace(spec, name)]))).toEqual(units);
});

test('words of the language and names are no numbers, though they hold a sign', () => {
  const names = placesIn(compileModel('colony').spec).map(({ name }) => name);
  expect(names).toContain('crowding.shape-number');
  expect(names).not.toContain('crowding.form');
  expect(names).not.toContain('oldest');
});

test.each<[string, SweepSpec, string[]]>([
  ['a count of years below the least', { over: { years: [-8, 5] } }, ['`years` would be -8']],
  ['part of a year', { over: { years: { from: 5, to: 8, steps: 3 } } }, ['`years` would be 6.5']],
  [
    'any part of a year',
    { over: { years: { from: 5, to: 8 } }, design: 'sobol' },
    ['`years` would be anything from 5 to 8'],
  ],
  [
    'fewer than no animals',
    { over: { 'start.counted.Saltmarsh': [-1, 5] } },
    ['`start.counted.Saltmarsh` would be -1'],
  ],
  ['a list with one of these', { list: [{ years: 5 }, { years: 2.5 }] }, ['`years` would be 2.5']],
  ['whole years', { over: { years: { from: 5, to: 9, steps: 5 } } }, []],
  ['what the model looks at itself', { over: { 'natal.leaving': [-1, 2] } }, []],
])('%s', (_, asked, messages) => {
  const { findings } = planSweep(asked, compileModel('reed-hare'));
  expect(findings.map(({ message }) => message)).toEqual(messages);
});
