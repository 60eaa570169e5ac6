// Which plan is best, which is beaten in everything, and what a step costs.
import { expect, test } from 'vitest';
import { meansOfUnits, resampledMeans, sharesBeaten, sharesOfBest } from '../../src/compare/best.ts';
import { costPerRisk, notBeaten, stepsUp } from '../../src/compare/worth-the-money.ts';

const rows = (...all: readonly (readonly number[])[]) => all.map((row) => Float64Array.from(row));

/** Without ranges of prices. */
const just = (cost: number) => ({ estimate: cost, lower: cost, upper: cost });

test('plans that are equally best share a draw', () => {
  const shares = sharesOfBest(rows([1, 2, 1], [3, 1, 2], [2, 2, 2]), 'less');
  expect([...shares].map((share) => share.toFixed(6))).toEqual(['0.277778', '0.444444', '0.277778']);
  expect([...sharesOfBest(rows([1, 2], [2, 5]), 'more')]).toEqual([0, 1]);
});

test('a plan is beaten where another is at least as good in everything and better in something', () => {
  const risk = { better: 'less', rows: rows([0.4, 0.2], [0.4, 0.4], [0.4, 0.5]) } as const;
  const animals = { better: 'more', rows: rows([10, 10], [10, 10], [10, 12]) } as const;
  expect([...sharesBeaten([risk, animals])].map((share) => share.toFixed(6))).toEqual(['0.333333', '0.000000']);
});

// 40 units in which the second plan is better by 1 in 20 and worse by 1 in 20 others: even, so about half of the redrawn
// studies prefer each; a clear gain is always preferred.
test('futures drawn again tell how far the order rests on chance', () => {
  const even = Array.from({ length: 40 }, (_, u) => ({
    sums: Float64Array.of(10, u % 2 === 0 ? 9 : 11),
    futures: 100,
  }));
  const [first = 0, second = 0] = sharesOfBest(resampledMeans([even])[0]!, 'less');
  expect(first + second).toBeCloseTo(1, 9);
  expect(Math.abs(first - 0.5)).toBeLessThan(0.06);
  const clear = even.map(({ futures }) => ({ sums: Float64Array.of(10, 4), futures }));
  const both = resampledMeans([even, clear]);
  expect(sharesOfBest(both[1]!, 'less')[1]).toBeCloseTo(1, 9);
  expect(both[0]).toEqual(resampledMeans([even])[0]);
  expect(
    meansOfUnits([
      { sums: Float64Array.of(10, 4), futures: 20 },
      { sums: Float64Array.of(0, 0), futures: 0 },
    ]),
  ).toEqual(rows([0.5, 0.2]));
});

// Derived by hand: corridor is beaten by translocate, big by restore; the others cost 150/0.18, 200/0.10 and 50/0.02 a step.
test('plans that nothing beats in both money and risk, and what each further step costs', () => {
  const plans = [
    { name: 'nothing', cost: 0, risk: 0.4 },
    { name: 'corridor', cost: 200, risk: 0.25 },
    { name: 'translocate', cost: 150, risk: 0.22 },
    { name: 'restore', cost: 400, risk: 0.1 },
    { name: 'both', cost: 350, risk: 0.12 },
    { name: 'big', cost: 600, risk: 0.1 },
  ];
  const free = notBeaten(plans);
  expect(plans.filter((_, i) => free[i]).map(({ name }) => name)).toEqual([
    'nothing',
    'translocate',
    'restore',
    'both',
  ]);
  const steps = stepsUp(plans).map(({ to, costPerRisk }) => [plans[to]?.name, costPerRisk.toFixed(2)]);
  expect(steps).toEqual([
    ['translocate', '833.33'],
    ['both', '2000.00'],
    ['restore', '2500.00'],
  ]);
});

test('a plan that a mix of two others would beat is no step', () => {
  const steps = stepsUp([
    { cost: 0, risk: 0.4 },
    { cost: 100, risk: 0.39 },
    { cost: 200, risk: 0.1 },
  ]);
  expect(steps.map(({ to }) => to)).toEqual([2]);
});

test('plans that are the same in both are all kept, and only one is a step', () => {
  const same = [
    { cost: 0, risk: 0.4 },
    { cost: 5, risk: 0.2 },
    { cost: 5, risk: 0.2 },
  ];
  expect(notBeaten(same)).toEqual([true, true, true]);
  expect(stepsUp(same)).toHaveLength(1);
});

test('risk removed has a price only where it is surely removed', () => {
  expect(costPerRisk(just(1000), { estimate: 0.1, lower: 0.05, upper: 0.2 })).toEqual({
    estimate: 10000,
    lower: 5000,
    upper: 20000,
  });
  expect(costPerRisk(just(1000), { estimate: 0.1, lower: 0, upper: 0.2 })).toBeNull();
  expect(costPerRisk(just(1000), { estimate: -0.1, lower: -0.2, upper: -0.02 })).toBeNull();
  expect(costPerRisk(just(-1000), { estimate: 0.1, lower: 0.05, upper: 0.2 })?.lower).toBe(-20000);
  // Derived: at the least of the price and the most of the gain 800 / 0.2, at the most and the least 1300 / 0.05.
  expect(costPerRisk({ estimate: 1000, lower: 800, upper: 1300 }, { estimate: 0.1, lower: 0.05, upper: 0.2 })).toEqual({
    estimate: 10000,
    lower: 4000,
    upper: 26000,
  });
});
