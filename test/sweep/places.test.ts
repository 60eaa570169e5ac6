// Units of the numbers that a sweep can go over are those of the language.
import { expect, test } from 'vitest';
import { unitOfPlace } from '../../src/sweep/places.ts';
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
