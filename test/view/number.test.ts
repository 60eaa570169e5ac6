// Numbers as readers meet them.
import { describe, expect, it } from 'vitest';
import { of100, percent, roundDown, roundUp, whole } from '../../src/view/number.ts';

describe('numbers for readers', () => {
  it('shows no fractions of animals, and never calls some animals none', () => {
    expect([0, 0.2, 0.6, 41.5, 1234.4].map(whole)).toEqual(['0', 'fewer than 1', '1', '42', '1,234']);
  });

  it('never rounds a chance to none or to all', () => {
    expect([0, 0.0005, 0.004, 0.117, 0.9951, 1].map(of100)).toEqual([
      'none',
      'fewer than 1',
      'fewer than 1',
      '12',
      'more than 99',
      'all',
    ]);
    expect([0, 0.0005, 0.117, 0.9995, 1].map(percent)).toEqual([
      '0\u00a0%',
      '0.05\u00a0%',
      '11.7\u00a0%',
      '99.95\u00a0%',
      '100\u00a0%',
    ]);
  });

  it('still tells chances apart from none and all that are very small or very large', () => {
    expect(percent(1e-6)).toBe('under 0.01\u00a0%');
    expect(percent(1 - 1e-6)).toBe('over 99.99\u00a0%');
  });

  it('rounds to 1, 2 and 5', () => {
    expect([0.03, 1, 1.1, 3, 7, 1000, 1001].map(roundUp)).toEqual([0.05, 1, 2, 5, 10, 1000, 2000]);
    expect([0.03, 1, 1.9, 3, 7, 999].map((value) => Number(roundDown(value).toPrecision(3)))).toEqual([
      0.02, 1, 1, 2, 5, 500,
    ]);
  });
});
