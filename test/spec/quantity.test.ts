// Quantities come out in km, km², years and shares; another unit is told.
import { expect, test } from 'vitest';
import { readMeasure, readQuantity, type Dimension } from '../../src/spec/quantity.ts';
import { evaluated } from './expression/reading.ts';

const good: readonly (readonly [string | number, Dimension, number])[] = [
  ['140 ha', 'area', 1.4],
  ['140ha', 'area', 1.4],
  ['2 km2', 'area', 2],
  ['2 km²', 'area', 2],
  ['2 km^2', 'area', 2],
  ['250000 m2', 'area', 0.25],
  [3, 'area', 3],
  ['4 km', 'length', 4],
  ['  350 m  ', 'length', 0.35],
  ['-2 km', 'length', -2],
  ['1e3 m', 'length', 1],
  ['3 %', 'share', 0.03],
  ['3%', 'share', 0.03],
  [0.2, 'share', 0.2],
  ['0.03 per km', 'per-length', 0.03],
  ['0.03/km', 'per-length', 0.03],
  ['0.00003 per  m', 'per-length', 0.03],
  ['1 year', 'time', 1],
  ['18 months', 'time', 1.5],
];

test.each(good)('%j as %s is %d', (text, dimension, value) => {
  const read = readQuantity(text, dimension);
  expect(read.ok ? read.value : read.error).toBeCloseTo(value, 15);
});

test('an expression may carry a unit', () => {
  const read = readMeasure('(mean_move + 50) / 2 m', 'length');
  expect(read.ok && evaluated(read.ast, { mean_move: 350 })).toEqual({ ok: true, value: 0.2 });
});

test('a name is not taken for a unit', () => {
  const read = readMeasure('m', 'length');
  expect(read.ok && evaluated(read.ast, { m: 7 })).toEqual({ ok: true, value: 7 });
});

const bad: readonly (readonly [string, Dimension, string, number])[] = [
  ['4 ha', 'length', 'wrong-unit', 2],
  ['4 miles', 'length', 'wrong-unit', 2],
  ['4 km', 'area', 'wrong-unit', 2],
  ['4 %', 'length', 'wrong-unit', 2],
  ['0.03 per ha', 'per-length', 'wrong-unit', 5],
  ['4 5 km', 'length', 'expression-syntax', 2],
  ['', 'length', 'expression-empty', 0],
  ['km', 'length', 'wrong-unit', 0],
  ['2 * x', 'length', 'wrong-unit', 0],
];

test.each(bad)('%j as %s is refused: %s at %d', (text, dimension, code, offset) => {
  const read = readQuantity(text, dimension);
  expect(read.ok ? read : [read.error.code, read.error.span.offset]).toEqual([code, offset]);
});
