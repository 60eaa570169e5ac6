import { describe, expect, it } from 'vitest';
import { exp, log, pow } from '../../src/machine/pinned.ts';

describe('the pinned functions', () => {
  // exact: by definition.
  it('give exact values where these are exact', () => {
    expect(exp(0)).toBe(1);
    expect(log(1)).toBe(0);
    expect(pow(2, 10)).toBe(1024);
    expect(exp(-Infinity)).toBe(0);
    expect(log(0)).toBe(-Infinity);
  });

  // derived: decimal expansions of e, ln 10 and the square root of 2.
  it('agree with known constants to the last bit', () => {
    expect(exp(1)).toBe(2.718281828459045);
    expect(log(10)).toBe(2.302585092994046);
    expect(pow(2, 0.5)).toBe(1.4142135623730951);
  });

  it('stay within two units in the last place of the host over a wide range', () => {
    for (let i = -2000; i <= 2000; i++) {
      const x = i / 37;
      expect(Math.abs(exp(x) / Math.exp(x) - 1)).toBeLessThan(4.5e-16);
      expect(Math.abs(log(exp(x)) - x)).toBeLessThan(1e-15 + 4.5e-16 * Math.abs(x));
    }
  });
});
