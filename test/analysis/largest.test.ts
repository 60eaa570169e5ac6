// The largest of many entries, where those that are equal do not crowd out larger ones that come later.
import { expect, test } from 'vitest';
import { amongLargest } from '../../src/analysis/largest.ts';

test('all larger ones are kept, and of equals as many as there is room for', () => {
  const values = Float64Array.of(0.5, 0.5, 0.5, 0.2, 0.9, 0.7);
  const kept = amongLargest(values, 3);
  expect([...values].filter((value) => kept(value))).toEqual([0.5, 0.9, 0.7]);
});

test('few are all kept, zeros among them', () => {
  const kept = amongLargest(Float64Array.of(0, 1), 2);
  expect([0, 1].map((value) => kept(value))).toEqual([true, true]);
});
