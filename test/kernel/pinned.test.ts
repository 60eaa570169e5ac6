import { describe, expect, it } from 'vitest';
import { loadMachine } from '../../src/machine/machine.ts';
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

  it('give e^x to the last bit the same alone and two by two', () => {
    const machine = loadMachine();
    const at = machine.reserve(16);
    const odd = [
      0,
      -0,
      1e-17,
      -1e-20,
      511.9,
      512,
      -512,
      709.7,
      709.8,
      1000,
      -745,
      -746,
      1e308,
      NaN,
      Infinity,
      -Infinity,
    ];
    const wide = Array.from({ length: 20_000 }, (_, k) => ((k * 7919) % 20_011) / 37 - 270);
    [...odd, ...wide].forEach((x, k, all) => {
      const neighbour = all[(k + 1) % all.length]!;
      new Float64Array(machine.memory.buffer, at, 2).set([x, neighbour]);
      machine.probeExpTwo(at);
      expect([...new Float64Array(machine.memory.buffer, at, 2)]).toEqual([exp(x), exp(neighbour)]);
    });
  });
});
