// The nearest name is the one that was probably meant, or none.
import { expect, test } from 'vitest';
import { nearestName } from '../../src/diagnostic/nearest.ts';

const known = ['survival', 'births', 'years', 'year', 'unit', 'classes', 'first-year'];

const pairs: readonly (readonly [string, string | undefined])[] = [
  ['survial', 'survival'],
  ['suvrival', 'survival'],
  ['Survival', 'survival'],
  ['birth', 'births'],
  ['yera', 'year'],
  ['years', 'years'],
  ['class', 'classes'],
  ['firstyear', 'first-year'],
  ['frist-yaer', 'first-year'],
  ['unti', 'unit'],
  ['hare', undefined],
  ['', undefined],
  ['x', undefined],
  ['s'.repeat(100_000), undefined],
];

test.each(pairs)('%s: %s', (name, nearest) => {
  expect(nearestName(name, known)).toBe(nearest);
});

test('nothing is near where nothing is known', () => {
  expect(nearestName('survival', [])).toBeUndefined();
});
