// The speed at which the population of a model would spread: moments of kernels in the plane, and speeds from specs.
import { describe, expect, test } from 'vitest';
import { logBessel, planeMoment, steepest, type Ways } from '../../src/analysis/spread/plane-moment.ts';
import { modelSpread } from '../../src/analysis/spread/model-spread.ts';
import type { DispersalKernel } from '../../src/model/kernel-shape.ts';
import { compileText } from '../pipeline/compile-text.ts';

const ways = (kernel: Partial<DispersalKernel>, others: Partial<Ways> = {}): Ways => ({
  kernel: { shape: 'exponential', scaleKm: 2, shapeNumber: 1, reachKm: null, ...kernel },
  hazardPerKm: 0,
  survivalOnTheWay: 1,
  leavers: 'all arrive',
  ...others,
});

// As printed in Abramowitz & Stegun (1964), table 9.8, from memory: e^-x I0(x) at 1, 5 and 20.
test('the Bessel function', () => {
  expect(logBessel(0)).toBe(0);
  for (const [x, value] of [
    [1, 0.46575960759364],
    [5, 0.18354081260933],
    [20, 0.0897803118848],
  ] as const) {
    expect(Math.exp(logBessel(x) - x)).toBeCloseTo(value, 12);
  }
  expect(logBessel(17.999999)).toBeCloseTo(logBessel(18.000001) - 2e-6, 6);
});

describe('moments of kernels in the plane (derived)', () => {
  test.each([0.001, 0.2, 0.45, 0.499])('exponential at %f: (1 − a²θ²)^(−3/2)', (theta) => {
    expect(planeMoment(ways({}), theta) / (1 - 4 * theta ** 2) ** -1.5).toBeCloseTo(1, 9);
  });

  test.each([0.01, 0.5, 3])('Gaussian at %f: e^(a²θ²/4)', (theta) => {
    expect(planeMoment(ways({ shape: 'gaussian' }), theta) / Math.exp(theta ** 2)).toBeCloseTo(1, 9);
  });

  test('dangers of the way make an exponential kernel shorter and fewer arrive', () => {
    const scale = 1 / (1 / 2 + 0.3);
    const found = planeMoment(ways({}, { hazardPerKm: 0.3, survivalOnTheWay: 0.7 }), 0.4);
    expect(found).toBeCloseTo((0.7 * (scale / 2) ** 2) / (1 - (scale * 0.4) ** 2) ** 1.5, 9);
  });

  test('a reach gives every kernel a moment; at 0 it is who arrives', () => {
    const heavy = ways({ shape: '2Dt', shapeNumber: 1.4, reachKm: 5 });
    expect(steepest(ways({ shape: '2Dt', shapeNumber: 1.4 }))).toBe(0);
    expect(steepest(heavy)).toBe(Infinity);
    expect(planeMoment(heavy, 0)).toBeCloseTo(1, 9);
    const within = 1 - (1 + 25 / 4) ** -0.4;
    expect(planeMoment({ ...heavy, leavers: 'may miss' }, 0)).toBeCloseTo(within, 9);
    expect(planeMoment(heavy, 8)).toBeLessThan(Math.exp(8 * 5));
  });
});

const spec = (kernel: string, others = '') => `
skein: 1
study: { title: An edge, invented: true }
years: 10
position: plane
unit: km
patches: [{ name: Fen, at: [0, 0], quality: 1.4 }, { name: Moor, at: [1, 0], quality: 0.9 }]
counts: females
classes: [all]
oldest: open-ended
parameters: { far: 3, alive: 0.5, leave: 1 }
survival: { all: alive }
births: { all: quality / 0.5 - 1 }
roaming: { kind: dispersal, classes: [all], leaving: leave, kernel: ${kernel}, leavers: all arrive${others} }
year: [count, survival, breeding, roaming]
start: { table: { Fen: { all: 10 } } }
`;
const speeds = (kernel: string, others = '') => modelSpread(compileText(spec(kernel, others)));

describe('speeds of specs', () => {
  test('everybody moves by a Gaussian kernel: a √(ln λ) (Kot, Lewis & van den Driessche 1996, from memory)', () => {
    const { value } = speeds('{ shape: gaussian, scale: 3 km }');
    expect(value!.map(({ patch }) => patch)).toEqual(['Fen']);
    expect(value![0]!.speedKm).toBeCloseTo(3 * Math.sqrt(Math.log(1.4)), 9);
  });

  test('slopes agree with differences', () => {
    const text = (far: number, alive: number, leave: number) =>
      spec('{ shape: exponential, scale: far }', ', hazard: 0.05 per km')
        .replace('far: 3', `far: ${far}`)
        .replace('alive: 0.5', `alive: ${alive}`)
        .replace('leave: 1', `leave: ${leave}`);
    const speed = (...at: readonly [number, number, number]): number =>
      modelSpread(compileText(text(...at))).value![0]!.speedKm;
    const found = modelSpread(compileText(text(3, 0.5, 0.6))).value![0]!;
    const h = 1e-4;
    const differences = {
      far: (speed(3 + h, 0.5, 0.6) - speed(3 - h, 0.5, 0.6)) / (2 * h),
      alive: (speed(3, 0.5 + h, 0.6) - speed(3, 0.5 - h, 0.6)) / (2 * h),
      leave: (speed(3, 0.5, 0.6 + h) - speed(3, 0.5, 0.6 - h)) / (2 * h),
    };
    expect(found.parameters.map(({ name }) => name).sort()).toEqual(['alive', 'far', 'leave']);
    for (const { name, sensitivity } of found.parameters) {
      expect(sensitivity).toBeCloseTo(differences[name as keyof typeof differences], 5);
    }
  });

  test('a heavy tail has no speed without a reach', () => {
    expect(speeds('{ shape: 2Dt, scale: 3 km, shape-number: 2 }').value).toBeNull();
    const { value } = speeds('{ shape: 2Dt, scale: 3 km, shape-number: 2, reach: 20 km }');
    expect(value![0]!.speedKm).toBeGreaterThan(1);
    expect(value![0]!.speedKm).toBeLessThan(20);
  });
});
