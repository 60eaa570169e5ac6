import { describe, expect, test } from 'vitest';
import { chanceEverFallen, chanceFallenBy, meanLowestShare, meanYearsToFall } from '../../src/analysis/diffusion.ts';
import { smallNoiseGrowth } from '../../src/analysis/small-noise.ts';
import { normalBelow } from '../../src/numeric/normal.ts';
import { leading } from '../../src/numeric/leading.ts';
import { sparseFromRows } from '../../src/numeric/sparse.ts';
import { twoStage } from '../numeric/published.ts';

test('the normal distribution (values as printed in any statistical table; tails from their continued fraction)', () => {
  expect(normalBelow(0)).toBe(0.5);
  expect(normalBelow(1)).toBeCloseTo(0.8413447460685429, 14);
  expect(normalBelow(-1.959963984540054)).toBeCloseTo(0.025, 14);
  expect(normalBelow(2.999999999999)).toBeCloseTo(normalBelow(3.000000000001), 13);
  expect(normalBelow(-10) / 7.619853024160527e-24).toBeCloseTo(1, 12);
  expect(normalBelow(-3) / 1.3498980316300946e-3).toBeCloseTo(1, 12);
  expect([normalBelow(-60), normalBelow(60)]).toEqual([0, 1]);
});

describe('falling from 100 to 10 within 50 years with variance 0.04 (derived)', () => {
  const distance = Math.log(10);
  const drifts = [-0.02, 0, 0.02];

  test('watched all the time', () => {
    [0.2761517, 0.1034881, 0.0276152].forEach((value, k) =>
      expect(chanceFallenBy(50, distance, { drift: drifts[k]!, variance: 0.04 }, 'all the time')).toBeCloseTo(value, 7),
    );
  });

  test('counted once a year', () => {
    [0.24557, 0.08716, 0.02186].forEach((value, k) =>
      expect(chanceFallenBy(50, distance, { drift: drifts[k]!, variance: 0.04 }, 'once a year')).toBeCloseTo(value, 5),
    );
  });

  test('the correction is near the truth of yearly counts, by numerical convolution', () => {
    [0.24761, 0.087965, 0.02205].forEach((value, k) => {
      const found = chanceFallenBy(50, distance, { drift: drifts[k]!, variance: 0.04 }, 'once a year');
      expect(Math.abs(found - value)).toBeLessThan(0.0025);
    });
  });

  test('ever, and how long it takes', () => {
    expect(chanceEverFallen(distance, { drift: -0.02, variance: 0.04 })).toBe(1);
    expect(chanceEverFallen(distance, { drift: 0.02, variance: 0.04 })).toBeCloseTo(0.1, 12);
    expect(meanYearsToFall(distance, { drift: -0.02, variance: 0.04 })).toBeCloseTo(115.129, 3);
    expect(meanYearsToFall(distance, { drift: 0.02, variance: 0.04 })).toBeNull();
  });
});

test('bear counts: fallen from 99 to 20 within 50 years (drift and variance from memory of Morris & Doak 2002)', () => {
  const given = { drift: 0.02134, variance: 0.01305 };
  const distance = Math.log(99 / 20);
  expect(chanceFallenBy(50, distance, given, 'all the time')).toBeCloseTo(0.0018455, 7);
  expect(chanceEverFallen(distance, given)).toBeCloseTo(0.0053493, 7);
});

test('mean lowest share within 50 years, variance 0.04 (derived; the idea McCarthy & Thompson 2001)', () => {
  const expected = [
    [0.02, 0.5679632],
    [0, 0.4275836],
    [-0.02, 0.2798589],
    [-0.03, 0.2138014],
  ] as const;
  expected.forEach(([drift, value]) => expect(meanLowestShare(50, { drift, variance: 0.04 })).toBeCloseTo(value, 7));
});

test('two stages with noisy births and survival (Tuljapurkar 1982 from memory; simulated over 3.2 million steps)', () => {
  const { growthRate, right, left } = leading(sparseFromRows(twoStage));
  const scale = left!.reduce((sum, value, i) => sum + value * right![i]!, 0);
  const sensitivities = Float64Array.of((left![0]! * right![1]!) / scale, (left![1]! * right![1]!) / scale);
  const expected = [
    [0, 0.1121694, 0.112246],
    [0.5, 0.1112045, 0.111284],
    [-0.5, 0.1131343, 0.113092],
  ] as const;
  for (const [correlation, approximate, simulated] of expected) {
    const both = correlation * 0.3 * 0.05;
    const covariance = { rows: 2, columns: 2, values: Float64Array.of(0.09, both, both, 0.0025) };
    const found = smallNoiseGrowth(growthRate, sensitivities, covariance);
    expect(found.logGrowth).toBeCloseTo(approximate, 7);
    expect(Math.abs(found.logGrowth - simulated)).toBeLessThan(1e-4);
    expect(found.lost).toBeCloseTo(Math.log(growthRate) - found.logGrowth, 12);
  }
});
