// Numbers that change with the calendar year: schedules, drivers, and what may not change.
import { expect, test } from 'vitest';
import type { Model } from '../../src/model/model.ts';
import { errorsOf, tryText } from '../pipeline/compile-text.ts';

function model(lines: Readonly<Record<string, string>>): string {
  const all = {
    study: '{ title: Two fens }',
    'first-year': '2027',
    years: '8',
    patches: '[{ name: Holm, capacity: 40 }]',
    counts: 'females',
    classes: '[newborn, adult]',
    oldest: 'open-ended',
    survival: '{ newborn: 0.4, adult: 0.7 }',
    births: '{ adult: 1.2 }',
    year: '[count, breeding, survival, ageing]',
    start: '{ total: 80 }',
    ...lines,
  };
  return `skein: 1\n${Object.entries(all)
    .map(([key, value]) => `${key}: ${value}\n`)
    .join('')}`;
}

/** Survival of adults in each year of a model. */
function adults({ phases, steps }: Model): readonly number[] {
  const phase = phases.find((one) => one.kind === 'survival');
  if (phase?.kind !== 'survival') throw new Error('There is no survival.');
  const { epochs, epochOf } = phase.survival;
  return Array.from({ length: steps }, (_, t) => epochs[epochOf[t] ?? 0]?.[1] ?? NaN);
}

function survivalOf(lines: Readonly<Record<string, string>>): readonly number[] {
  const { compiled, diagnostics } = tryText(model(lines));
  if (compiled === null) throw new Error(diagnostics.map((one) => one.message).join('\n'));
  return adults(compiled.model);
}

test('in steps: before the first year the first number, then each until the next', () => {
  const survival = '{ newborn: 0.4, adult: { 2029: 0.5, 2032: 0.6, 2033: 70 %, between: steps } }';
  expect(survivalOf({ survival })).toEqual([0.5, 0.5, 0.5, 0.5, 0.5, 0.6, 0.7, 0.7]);
});

test('in a straight line: level before and after', () => {
  const survival = '{ newborn: 0.4, adult: { 2029: 0.5, 2033: 0.7, between: straight line } }';
  const [...found] = survivalOf({ survival });
  [0.5, 0.5, 0.5, 0.55, 0.6, 0.65, 0.7, 0.7].forEach((share, t) => expect(found[t]).toBeCloseTo(share, 12));
});

test('the order of the years in the text changes nothing, and a schedule may hold expressions', () => {
  const parameters = '{ base: 0.5, s: { value: { 2031: base + 0.2, 2029: base, between: steps } } }';
  expect(survivalOf({ parameters, survival: '{ newborn: 0.4, adult: s }' })).toEqual([
    0.5, 0.5, 0.5, 0.5, 0.7, 0.7, 0.7, 0.7,
  ]);
});

test('a hundred years of numbers are no deep expression', () => {
  const numbers = Array.from({ length: 100 }, (_, i) => `${String(2027 + i)}: ${String(i % 2 === 0 ? 0.5 : 0.6)}`);
  const survival = `{ newborn: 0.4, adult: { ${numbers.join(', ')}, between: steps } }`;
  expect(survivalOf({ survival })).toEqual([0.5, 0.6, 0.5, 0.6, 0.5, 0.6, 0.5, 0.6]);
});

test.each([
  ['no word on what is between', '{ 2027: 0.5, 2030: 0.6 }', ['missing-key']],
  ['a year that is none', '{ 2027: 0.5, next: 0.6, between: steps }', ['not-a-year']],
  ['a unit that does not fit', '{ 2027: 4 km, 2030: 0.6, between: steps }', ['wrong-unit']],
  ['a share above one from some year on', '{ 2027: 0.5, 2030: 1.6, between: steps }', ['share-out-of-range']],
])('%s', (_, adult, expected) => {
  expect(errorsOf(model({ survival: `{ newborn: 0.4, adult: ${adult} }` }))).toEqual(expected);
});

test('drivers by their own years, or again and again from the first year of the model on', () => {
  const survival = '{ newborn: 0.4, adult: 0.5 + rain }';
  const values = '{ rain: { 2020: 0.1, 2021: 0.2, 2022: 0.3 } }';
  const again = [0.6, 0.7, 0.8, 0.6, 0.7, 0.8, 0.6, 0.7];
  expect(survivalOf({ survival, drivers: `{ values: ${values}, future: repeat }` })).toEqual(again);
  const dated = Array.from({ length: 8 }, (_, t) => `${String(2027 + t)}: ${String(t / 100)}`).join(', ');
  const found = survivalOf({ survival, drivers: `{ values: { rain: { ${dated} } }, future: as-dated }` });
  found.forEach((share, t) => expect(share).toBeCloseTo(0.5 + t / 100, 12));
  expect(errorsOf(model({ survival, drivers: `{ values: ${values}, future: as-dated }` }))).toEqual(['driver-years']);
});

test('a driver must not share its name with anything else', () => {
  const drivers = '{ values: { capacity: { 2020: 1 }, base: { 2020: 1 } }, future: repeat }';
  expect(errorsOf(model({ drivers, parameters: '{ base: 1 }' }))).toEqual(['ambiguous-name', 'ambiguous-name']);
});

test('what is read once must not change with the year, not even through a named number', () => {
  const crowding =
    '{ form: ricker, changes: { survival: [newborn] }, counted: [adult], capacity: 40, allee-half: few }';
  expect(errorsOf(model({ crowding, parameters: '{ few: 4 + year / 1000 }' }))).toEqual(['fixed-in-time']);
  expect(errorsOf(model({ crowding, parameters: '{ few: 4 }' }))).toEqual([]);
});
