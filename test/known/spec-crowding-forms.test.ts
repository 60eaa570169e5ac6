// Theta and Hassell crowding, several crowdings at once, and ceilings, from a spec to paths without chance.
import { describe, expect, test } from 'vitest';
import { wholeYear } from '../../src/compile/year-map.ts';
import { jacobianOf } from '../../src/analysis/year-map.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { largestDifference, pathOf } from '../pipeline/measure.ts';

const crowded = (births: string, crowding: string, years = 20) =>
  framed(
    `classes: [animal]
demography: { births: [["${births}"]] }
year: [count, demography]
crowding: { changes: { births: [animal] }, counted: [animal], ${crowding} }
start: { table: { Meadow: { animal: 10 } } }
`,
    { years },
  );

describe('the theta form N exp(0.5 (1 − (N/100)²)) (derived)', () => {
  test('the path from 10', () => {
    const path = pathOf(compileText(crowded('exp(0.5)', 'form: theta, shape-number: 2, capacity: 100'))).flat();
    expect(largestDifference(path.slice(1, 4), [16.4049824, 26.6857287, 42.4583041])).toBeLessThan(1.1e-7);
  });
});

describe('Hassell 1975, λ = 5, b = 4 (derived)', () => {
  const compiled = compileText(crowded('5', 'form: hassell, shape-number: 4, capacity: 49.5348781', 200));

  test('a capacity of 49.5348781 means a = 0.01', () => {
    expect(Math.abs(compiled.coefficients[0]!.coefficient[0]! - 0.01)).toBeLessThan(1e-9);
  });

  test('stands still there, with slope −0.3250388', () => {
    expect(Math.abs(pathOf(compiled).at(-1)![0]! - 49.5348781)).toBeLessThan(1e-6);
    const slope = jacobianOf(wholeYear(compiled), Float64Array.of(49.5348781)).values[0]!;
    expect(Math.abs(slope + 0.3250388)).toBeLessThan(1e-6);
  });

  // derived: for b = 4 the standstill is stable up to λ = (b / (b − 2))^b = 16.
  test.each([
    ['15', true],
    ['17', false],
  ])('λ = %s settles: %s', (births, settles) => {
    const path = pathOf(compileText(crowded(births, 'form: hassell, shape-number: 4, capacity: 100', 3000))).flat();
    expect(Math.abs(path.at(-1)! / path.at(-2)! - 1) < 1e-6).toBe(settles);
  });
});

describe('several crowdings', () => {
  const text = framed(
    `classes: [young, adult]
oldest: open-ended
survival: { young: 0.5, adult: 0.7 }
births: { adult: 2 }
year: [count, breeding, survival, ageing]
crowding: { form: ricker, changes: { survival: [young] }, counted: [adult], capacity: 60 }
mates: { kind: crowding, form: allee, changes: { breeding: [adult] }, counted: [adult], allee-half: 5 }
start: { table: { Meadow: { adult: 30 } } }
`,
    { years: 300 },
  );

  test('stand still at the capacity of the one, the Allee factor of the other included', () => {
    expect(Math.abs(pathOf(compileText(text)).at(-1)![1]! - 60)).toBeLessThan(1e-9);
  });

  // derived: 2 × 0.5 × e^(−60 b) × 60/65 = 0.3.
  test('so that the coefficient is that of what the Allee factor leaves', () => {
    const b = -Math.log((0.3 * 65) / 60) / 60;
    expect(Math.abs(compileText(text).coefficients[0]!.coefficient[0]! - b)).toBeLessThan(1e-12);
  });

  test('are refused where one has too much or too little, or stands in the year', () => {
    expect(errorsOf(text.replace('allee-half: 5', 'allee-half: 5, capacity: 3'))).toEqual(['crowding-shape']);
    expect(errorsOf(text.replace(', allee-half: 5', ''))).toEqual(['crowding-shape']);
    expect(errorsOf(text.replace(', capacity: 60', ''))).toEqual(['crowding-shape']);
    expect(errorsOf(text.replace('form: ricker', 'form: theta'))).toEqual(['crowding-shape']);
    expect(errorsOf(text.replace('survival, ageing]', 'survival, mates, ageing]'))).toEqual(['unknown-phase']);
  });
});

describe('a ceiling', () => {
  const ceiling = (takes: string, year = 'count, room, breeding, survival, ageing') =>
    framed(
      `classes: [young, yearling, adult]
oldest: open-ended
survival: { young: 0.5, yearling: 0.5, adult: 1 }
births: { adult: 2 }
year: [${year}]
room: { kind: ceiling, counted: [yearling, adult], capacity: 20, takes: ${takes} }
start: { table: { Meadow: { yearling: 10, adult: 20 } } }
`,
      { years: 1 },
    );

  // derived by hand: of 10 yearlings and 20 adults, 10 are too many; yearlings and adults a year on.
  test.each([
    ['at random', (2 / 3) * 40 * 0.5, (2 / 3) * (10 * 0.5 + 20)],
    ['youngest first', 40 * 0.5, 20],
    ['nobody', (2 / 3) * 40 * 0.5, 10 * 0.5 + 20],
  ])('that takes %s', (takes, yearlings, adults) => {
    const found = pathOf(compileText(ceiling(takes)))[1]!;
    expect(largestDifference(found, [0, yearlings, adults])).toBeLessThan(1e-12);
  });

  test('under which the surplus waits asks for a breeding', () => {
    const text = ceiling('nobody', 'count, room, survival, ageing').replace('births: { adult: 2 }\n', '');
    expect(errorsOf(text)).toEqual(['ceiling-without-breeding']);
  });
});
