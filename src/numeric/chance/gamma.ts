// The gamma distribution on the scale y = ln x, exact in both tails.
import { exp, log } from '../../machine/pinned.ts';
import { logGamma } from '../../machine/gamma.ts';
import type { Tails } from './tail.ts';

export interface GammaShape {
  readonly shape: number;
  readonly scale: number;
}

/** shape = m²/v, scale = v/m. */
export function gammaOf(mean: number, sd: number): GammaShape {
  return { shape: (mean * mean) / (sd * sd), scale: (sd * sd) / mean };
}

export function gammaTails({ shape, scale }: GammaShape): Tails {
  const constant = logGamma(shape);
  const logScale = log(scale);
  const logDensity = (y: number): number => shape * (y - logScale) - exp(y - logScale) - constant;
  const isLow = (y: number): boolean => exp(y - logScale) < shape + 1;
  const below = (y: number): number => logDensity(y) - log(shape) + log(lowerSeries(shape, exp(y - logScale)));
  const above = (y: number): number => logDensity(y) - log(upperFraction(shape, exp(y - logScale)));
  return {
    logDensity,
    logBelow: (y) => (isLow(y) ? below(y) : log(1 - exp(above(y)))),
    logAbove: (y) => (isLow(y) ? log(1 - exp(below(y))) : above(y)),
  };
}

/** 1 + x/(k+1) + x²/((k+1)(k+2)) + … */
function lowerSeries(shape: number, x: number): number {
  let [term, sum] = [1, 1];
  for (let n = 1; term > 1e-17 * sum && n < 100_000; n++) {
    term *= x / (shape + n);
    sum += term;
  }
  return sum;
}

/** x + 1 − k − 1(1−k)/(x + 3 − k − 2(2−k)/(x + 5 − k − …)), by Lentz's method. */
function upperFraction(shape: number, x: number): number {
  let b = x + 1 - shape;
  let [c, d] = [b, 0];
  let fraction = b;
  for (let n = 1; n < 100_000; n++) {
    const a = -n * (n - shape);
    b += 2;
    d = 1 / (a * d + b);
    c = b + a / c;
    fraction *= c * d;
    if (Math.abs(c * d - 1) < 1e-15) break;
  }
  return fraction;
}
