// Very many numbers by digits are in the order that comparing them gives.
import { expect, test } from 'vitest';
import { ascendingOrder } from '../../src/numeric/order.ts';

/** Of both signs and very different sizes, many of them equal. */
function numbers(count: number): Float64Array {
  let state = 7;
  const next = (): number => (state = (state * 48271) % 2147483647) / 2147483647;
  return Float64Array.from({ length: count }, (_, i) => {
    const special = [0, -0, Infinity, -Infinity, NaN, 5e-324, -5e-324, 1, 1][i % 50];
    return special ?? (next() - 0.5) * 10 ** Math.floor(next() * 40 - 20);
  });
}

test.each([0, 1, 100, 4999, 5000, 20_000])('%i of them', (count) => {
  const values = numbers(count);
  const order = [...ascendingOrder(values)];
  expect(order.toSorted((a, b) => a - b)).toEqual([...values.keys()]);
  for (let i = 1; i < count; i++) {
    const [a = 0, b = 0] = [order[i - 1], order[i]];
    const [x = NaN, y = NaN] = [values[a], values[b]];
    if (Number.isNaN(y)) expect(Number.isNaN(x) ? a < b : true).toBe(true);
    else expect(x < y || (x === y && a < b)).toBe(true);
  }
});
