// One life table and two censuses: what comes first in `year` decides the matrix, never its growth.
import { describe, expect, test } from 'vitest';
import { buildBlock } from '../../src/compile/block.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { blockRows, largestDifference, leadingOf } from '../pipeline/measure.ts';

/** Survival 0.25, 0.6, then 0.85; 0.4, 1.5, then 2.4 daughters at ages 1, 2, and later (derived). */
function lifeTable(year: string): string {
  return framed(`classes: [age 0, age 1, age 2, older]
oldest: open-ended
survival: { age 0: 0.25, age 1: 0.6, age 2: 0.85, older: 0.85 }
births: { age 1: 0.4, age 2: 1.5, older: 2.4 }
year: ${year}
start: { total: 50 }
`);
}

const before = lifeTable('[count, breeding, survival, ageing]');
const after = lifeTable('[breeding, count, survival, ageing]');

describe('counted before and after breeding (derived)', () => {
  test('before: first-year survival is in the births, and nobody newborn is counted', () => {
    const compiled = compileText(before);
    const wanted = [
      [0.1, 0.375, 0.6],
      [0.6, 0, 0],
      [0, 0.85, 0.85],
    ];
    expect(largestDifference(blockRows(compiled).flat(), wanted.flat())).toBeLessThan(1e-15);
    expect(buildBlock(compiled, 'zero').states.map((state) => state.class)).toEqual([1, 2, 3]);
  });

  test('after: the survival of the parents is in the births, and each class breeds at its next age', () => {
    const wanted = [
      [0.1, 0.9, 2.04, 2.04],
      [0.25, 0, 0, 0],
      [0, 0.6, 0, 0],
      [0, 0, 0.85, 0.85],
    ];
    expect(largestDifference(blockRows(compileText(after)).flat(), wanted.flat())).toBeLessThan(1e-15);
  });

  test('both grow by 15.7 % a year, to ten digits', () => {
    const rates = [before, after].map((text) => leadingOf(compileText(text)).growthRate);
    for (const rate of rates) expect(Math.abs(rate - 1.1567791752841)).toBeLessThan(1e-10);
    expect(Math.abs(rates[0]! - rates[1]!)).toBeLessThan(1e-10);
  });

  test('the count may stand anywhere: the growth is the same', () => {
    const phases = ['breeding', 'survival', 'ageing'];
    for (let i = 1; i <= phases.length; i++) {
      const year = [...phases.slice(0, i), 'count', ...phases.slice(i)];
      const { growthRate } = leadingOf(compileText(lifeTable(`[${year.join(', ')}]`)));
      expect(Math.abs(growthRate - 1.1567791752841)).toBeLessThan(1e-10);
    }
  });
});

describe('a life table with l = 1, 0.6, 0.4, 0.2, 0 and m = 1, 2, 1 at ages 1, 2, 3 (derived)', () => {
  const pulse = (year: string) =>
    compileText(
      framed(`classes: [age 0, age 1, age 2, age 3]
oldest: terminal
survival: { age 0: 0.6, age 1: 0.4 / 0.6, age 2: 0.2 / 0.4, age 3: 0 }
births: { age 1: 1, age 2: 2, age 3: 1 }
year: ${year}
start: { total: 50 }
`),
    );
  const [pre, post] = [pulse('[count, breeding, survival, ageing]'), pulse('[breeding, count, survival, ageing]')];

  test('counted before breeding', () => {
    const wanted = [
      [0.6, 1.2, 0.6],
      [2 / 3, 0, 0],
      [0, 0.5, 0],
    ];
    expect(largestDifference(blockRows(pre).flat(), wanted.flat())).toBeLessThan(1e-15);
  });

  test('counted after breeding', () => {
    const wanted = [
      [0.6, 4 / 3, 0.5, 0],
      [0.6, 0, 0, 0],
      [0, 2 / 3, 0, 0],
      [0, 0, 0.5, 0],
    ];
    expect(largestDifference(blockRows(post).flat(), wanted.flat())).toBeLessThan(1e-15);
  });

  test('both grow by 1.3205174101', () => {
    for (const compiled of [pre, post])
      expect(Math.abs(leadingOf(compiled).growthRate - 1.3205174101)).toBeLessThan(1e-10);
  });
});

describe('the usual mistakes of construction cannot be written by leaving something out', () => {
  test('young without their first-year survival (would give 1.7278)', () => {
    expect(errorsOf(before.replace('age 0: 0.25, ', ''))).toEqual(['missing-rate']);
  });

  test('an oldest class that silently leaves (would give 0.8239)', () => {
    expect(errorsOf(after.replace('oldest: open-ended\n', ''))).toEqual(['missing-oldest']);
  });

  test('a class that leaves on purpose has no young after it has left', () => {
    const text = framed(`classes: [age 0, age 1, age 2]
oldest: terminal
survival: { age 0: 0.25, age 1: 0.6, age 2: 0.85 }
births: { age 1: 0.4, age 2: 1.5 }
year: [breeding, count, survival, ageing]
start: { total: 50 }
`);
    const wanted = [
      [0.1, 0.9, 0],
      [0.25, 0, 0],
      [0, 0.6, 0],
    ];
    expect(largestDifference(blockRows(compileText(text)).flat(), wanted.flat())).toBeLessThan(1e-15);
  });
});

describe('northern spotted owl (rates from memory of Lande 1988; digits recomputed)', () => {
  const owl = framed(`classes: [newborn, first year, second year, adult]
oldest: open-ended
parameters: { in_the_nest: 0.6, on_the_way: 0.18, subadult: 0.71, adult_survival: 0.942, daughters: 0.24 }
survival: { newborn: in_the_nest * on_the_way, first year: subadult, second year: adult_survival, adult: adult_survival }
births: { adult: daughters }
year: [count, breeding, survival, ageing]
start: { total: 200 }
`);

  test('λ³ (1 − s/λ) = l₃ b with breeding from age 3', () => {
    const { growthRate } = leadingOf(compileText(owl));
    expect(Math.abs(growthRate - 0.96078003)).toBeLessThan(1e-7);
    const left = growthRate ** 3 * (1 - 0.942 / growthRate);
    expect(left).toBeCloseTo(0.6 * 0.18 * 0.71 * 0.942 * 0.24, 12);
  });

  test('adult survival weighs most: ∂λ/∂s is 0.98, of the survival on the way 0.10', () => {
    const slope = (name: string, value: number): number => {
      const [up, down] = [value + 1e-5, value - 1e-5].map((changed) => {
        return leadingOf(compileText(owl, { set: [{ name, value: String(changed) }] })).growthRate;
      });
      return (up! - down!) / 2e-5;
    };
    expect(slope('adult_survival', 0.942)).toBeCloseTo(0.981564, 5);
    expect(slope('subadult', 0.71)).toBeCloseTo(0.025456, 5);
    expect(slope('daughters', 0.24)).toBeCloseTo(0.075306, 5);
    expect(slope('in_the_nest', 0.6)).toBeCloseTo(0.030122, 5);
    expect(slope('on_the_way', 0.18)).toBeCloseTo(0.100408, 5);
  });
});
