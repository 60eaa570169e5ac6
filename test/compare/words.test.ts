import { expect, it } from 'vitest';
import { change, seenChance } from '../../src/report/compare/words.ts';

it('never tells a chance of nothing without how far it may still reach', () => {
  // Wilson (1927) for no hit of n: z² / (n + z²), here 3.8415 / 203.8415.
  expect(seenChance(0, 200)).toBe('0\u00a0% (at most 1.9\u00a0%)');
  expect(seenChance(0.15, 200)).toBe('15.0\u00a0%');
});

it('puts no sign before words', () => {
  expect(change({ of: 'animals', estimate: 0.3 })).toBe('more by fewer than 1');
  expect(change({ of: 'animals', estimate: -0.3 })).toBe('less by fewer than 1');
  expect(change({ of: 'animals', estimate: -3 })).toBe('−3');
});
