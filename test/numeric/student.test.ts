// Student's t against printed tables.
import { expect, test } from 'vitest';
import { student95 } from '../../src/numeric/student.ts';

// Abramowitz & Stegun 1964, table 26.10 (from memory), five digits; for 1 degree it is tan(0.475π).
test.each([
  [1, Math.tan(0.475 * Math.PI), 1e-9],
  [2, 0.95 / Math.sqrt(0.5 * 0.975 * 0.025 * 4), 1e-9],
  [5, 2.570582, 5e-6],
  [10, 2.228139, 5e-6],
  [30, 2.042272, 5e-6],
  [120, 1.97993, 5e-5],
])('t for %i degrees of freedom', (degrees, wanted, within) => {
  expect(Math.abs(student95(degrees) - wanted)).toBeLessThan(within);
});

test('both ways of working it out meet', () => {
  const [below, above] = [student95(1999), student95(2000)];
  expect(below - above).toBeGreaterThan(0);
  expect(below - above).toBeLessThan(1e-6);
  expect(student95(1e9)).toBeCloseTo(1.959963984540054, 8);
});

test('nothing is known from a single number', () => {
  expect(() => student95(0)).toThrow(RangeError);
});
