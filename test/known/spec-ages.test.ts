// Ages without deaths: closed forms through the whole pipeline.
import { describe, expect, test } from 'vitest';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { blockRows, largestDifference, leadingOf, pathOf } from '../pipeline/measure.ts';

describe('Fibonacci (analytic)', () => {
  const compiled = compileText(
    framed(`classes: [young, old]
demography: { fates: [[0, 0], [1, 0]], births: [[1, 1], [0, 0]] }
year: [count, demography]
start: { table: { Meadow: { young: 1 } } }
`),
  );
  const golden = (1 + Math.sqrt(5)) / 2;

  test('grows by the golden ratio', () => {
    const { growthRate, right, left } = leadingOf(compiled);
    expect(growthRate).toBeCloseTo(golden, 12);
    expect(largestDifference(right!, [golden - 1, 2 - golden])).toBeLessThan(1e-12);
    expect(largestDifference(left!, [1, golden - 1])).toBeLessThan(1e-12);
  });

  test('its path is the series, exactly', () => {
    const young = pathOf(compiled).map((row) => row[0]);
    expect(young.slice(0, 11)).toEqual([1, 1, 2, 3, 5, 8, 13, 21, 34, 55, 89]);
    expect(young[20]).toBe(10946);
  });
});

describe('annual and perennial (from memory of Cole 1954; exact)', () => {
  const growthOf = (essence: string): number => {
    return leadingOf(compileText(framed(`${essence}\nstart: { total: 10 }\n`))).growthRate;
  };

  test.each([1, 2.5, 7])('an annual with b + 1 = %f + 1 young grows like an immortal with b', (b) => {
    const annual = `classes: [plant]
parameters: { b: ${b} }
demography: { fates: [[0]], births: [[b + 1]] }
year: [count, demography]`;
    const immortal = `classes: [plant]
parameters: { b: ${b} }
births: { plant: b }
year: [count, breeding]`;
    expect(growthOf(annual)).toBeCloseTo(b + 1, 12);
    expect(growthOf(immortal)).toBeCloseTo(b + 1, 12);
  });

  test.each([
    { age: 2, classes: ['one', 'two'], b: 2 },
    { age: 3, classes: ['one', 'two', 'three'], b: 4 },
  ])('first young at age $age, immortal, $b young a year: λ = 2', ({ classes, b }) => {
    const survival = classes.map(() => 1);
    const fecundity = classes.map((_, i) => (i === classes.length - 1 ? b : 0));
    const text = `classes: [${classes.join(', ')}]
oldest: open-ended
demography: { survival: [${survival.join(', ')}], fecundity: [${fecundity.join(', ')}] }
year: [count, demography]`;
    expect(growthOf(text)).toBeCloseTo(2, 12);
  });
});

describe('only ageing (derived)', () => {
  const compiled = compileText(
    framed(`classes: [one, two, three, four]
oldest: terminal
year: [count, ageing]
start: { table: { Meadow: { one: 4, two: 3, three: 2, four: 1 } } }
`),
  );

  test('the matrix is nilpotent and has no growth', () => {
    expect(blockRows(compiled)).toEqual([
      [0, 0, 0, 0],
      [1, 0, 0, 0],
      [0, 1, 0, 0],
      [0, 0, 1, 0],
    ]);
    expect(leadingOf(compiled)).toMatchObject({ growthRate: 0, right: null });
  });

  test('everybody goes on a class a year and is gone after as many years as there are classes', () => {
    expect(pathOf(compiled).slice(0, 6)).toEqual([
      [4, 3, 2, 1],
      [0, 4, 3, 2],
      [0, 0, 4, 3],
      [0, 0, 0, 4],
      [0, 0, 0, 0],
      [0, 0, 0, 0],
    ]);
  });
});
