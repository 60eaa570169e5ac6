import { describe, expect, test } from 'vitest';
import { fixedDurationAdvance } from '../../src/numeric/stage-duration.ts';

describe('stages of fixed duration', () => {
  test('survival 0.8 over five steps, standing still and declining (derived)', () => {
    const still = fixedDurationAdvance({ survival: 0.8, duration: 5, growthRate: 1 });
    expect(still).toBeCloseTo(0.1218467, 7);
    expect(0.8 * (1 - still)).toBeCloseTo(0.7025226, 7);
    expect(0.8 * still).toBeCloseTo(0.0974774, 7);
    const declining = fixedDurationAdvance({ survival: 0.8, duration: 5, growthRate: 0.95 });
    expect(declining).toBeCloseTo(0.1377267, 7);
    expect(0.8 * (1 - declining)).toBeCloseTo(0.6898187, 7);
  });

  test('loggerhead stages (Crouse, Crowder & Caswell 1987; inputs from memory, entries as published to 1.5e-4)', () => {
    const published = [
      [0.7857, 7, 0.737, 0.0486, 0.737107, 0.048593],
      [0.6758, 8, 0.661, 0.0147, 0.661054, 0.014746],
      [0.7425, 6, 0.6907, 0.0518, 0.690667, 0.051833],
    ] as const;
    for (const [survival, duration, stay, on, exactStay, exactOn] of published) {
      const advance = fixedDurationAdvance({ survival, duration, growthRate: 1 });
      expect(Math.abs(survival * (1 - advance) - stay)).toBeLessThan(1.5e-4);
      expect(Math.abs(survival * advance - on)).toBeLessThan(1.5e-4);
      expect(survival * (1 - advance)).toBeCloseTo(exactStay, 6);
      expect(survival * advance).toBeCloseTo(exactOn, 6);
    }
    const adult = fixedDurationAdvance({ survival: 0.8091, duration: 31, growthRate: 1 });
    expect(0.8091 * (1 - adult)).toBeCloseTo(0.808831, 6);
  });

  test('is 1/T where survival equals growth, and smooth around it', () => {
    const bySum = (x: number): number => x ** 5 / (1 + x + x ** 2 + x ** 3 + x ** 4 + x ** 5);
    for (const x of [1, 1 + 0.9e-5, 1 - 0.9e-5, 1 + 1.1e-5, 1 - 1.1e-5]) {
      const found = fixedDurationAdvance({ survival: 0.9 * x, duration: 6, growthRate: 0.9 });
      expect(found).toBeCloseTo(bySum(x), 9);
    }
  });
});
