// Dispersal kernels in the plane against closed forms and quadrature.
import { describe, expect, test } from 'vitest';
import { logGamma, upperGammaShare } from '../../src/machine/gamma.ts';
import { densityPerKm2, meanOverScale, shareBeyond, type DispersalKernel } from '../../src/model/kernel-shape.ts';

const kernel = (shape: DispersalKernel['shape'], shapeNumber: number): DispersalKernel => ({
  shape,
  scaleKm: 2,
  shapeNumber,
  reachKm: null,
});

describe('kernels of scale 2', () => {
  // Forms from memory of Nathan et al. 2012 and Clark et al. 1999; means and tails derived, recomputed by quadrature.
  test.each([
    [kernel('exponential', 1), 4, 0.4060058],
    [kernel('gaussian', 1), 1.7724539, 0.0183156],
    [kernel('2Dt', 2.5), 2, 0.0894427],
    [kernel('exponential power', 0.5), 40, 0.9446588],
  ])('%o have their mean distance and the share that goes beyond 4', (one, mean, beyond) => {
    expect(Math.abs(one.scaleKm * meanOverScale(one.shape, one.shapeNumber) - mean)).toBeLessThan(1e-6);
    expect(Math.abs(shareBeyond(one, 4) - beyond)).toBeLessThan(1e-6);
  });

  test.each([
    [kernel('exponential', 1), 80],
    [kernel('gaussian', 1), 14],
    [kernel('2Dt', 2.5), 200],
    [kernel('exponential power', 0.5), 900],
    [kernel('exponential power', 3), 6],
  ])('%o: the density over a disc is the share that stays within it (Simpson)', (one, radius) => {
    const n = 200_000;
    let sum = 0;
    for (let i = 0; i <= n; i++) {
      const r = (radius * i) / n;
      sum += (i === 0 || i === n ? 1 : i % 2 === 1 ? 4 : 2) * 2 * Math.PI * r * densityPerKm2(one, r);
    }
    expect(Math.abs((sum * radius) / n / 3 + shareBeyond(one, radius) - 1)).toBeLessThan(1e-9);
  });

  // derived: the median of the exponential kernel in the plane is 1.6783470 scales; on a line it would be 0.693.
  test('half of the moves by the exponential are longer than 1.678 scales', () => {
    expect(Math.abs(shareBeyond(kernel('exponential', 1), 2 * 1.678347) - 0.5)).toBeLessThan(1e-7);
  });

  test('a 2Dt with a shape number up to 1.5 has no mean', () => {
    expect(meanOverScale('2Dt', 1.5)).toBe(Infinity);
  });
});

describe('the gamma function', () => {
  // exact: Γ(n) = (n − 1)!, Γ(1/2) = √π; Γ(1/3) from memory of Abramowitz & Stegun 1964.
  test.each([
    [1, 0],
    [2, 0],
    [5, Math.log(24)],
    [0.5, Math.log(Math.PI) / 2],
    [11, Math.log(3628800)],
    [1 / 3, Math.log(2.678938534707747)],
  ])('ln Γ(%f)', (x, wanted) => {
    expect(Math.abs(logGamma(x) - wanted)).toBeLessThan(1e-14 * Math.max(1, Math.abs(wanted)));
  });

  // exact: for whole a, Q(a, x) is the Poisson chance of fewer than a at mean x.
  test.each([
    [1, 0.3],
    [4, 1.4142135623730951],
    [4, 12],
    [9, 9],
    [20, 45],
  ])('Q(%f, %f)', (a, x) => {
    let [term, sum] = [Math.exp(-x), 0];
    for (let k = 0; k < a; k++) {
      sum += term;
      term *= x / (k + 1);
    }
    expect(Math.abs(upperGammaShare(a, x) - sum)).toBeLessThan(2e-14);
  });
});
