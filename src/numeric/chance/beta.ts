// The beta distribution on the logit scale y = ln(x / (1 − x)), exact in both tails.
import { exp, log } from '../../machine/pinned.ts';
import { logGamma } from '../../machine/gamma.ts';
import type { Tails } from './tail.ts';

export interface BetaShape {
  readonly a: number;
  readonly b: number;
}

/** a = m (m(1 − m)/v − 1), b = a (1 − m)/m; null where v is not below m(1 − m). */
export function betaOf(mean: number, sd: number): BetaShape | null {
  const strength = (mean * (1 - mean)) / (sd * sd) - 1;
  return strength > 0 && mean > 0 && mean < 1 ? { a: mean * strength, b: (1 - mean) * strength } : null;
}

export function betaTails({ a, b }: BetaShape): Tails {
  const logBeta = logGamma(a) + logGamma(b) - logGamma(a + b);
  const logDensity = (y: number): number => -a * logOnePlusExp(-y) - b * logOnePlusExp(y) - logBeta;
  const below = (y: number): number => logLowerTail(y, { a, b }, logDensity(y));
  const above = (y: number): number => logLowerTail(-y, { a: b, b: a }, logDensity(y));
  const turn = log(a + 1) - log(b + 1);
  return {
    logDensity,
    logBelow: (y) => (y <= turn ? below(y) : log(1 - exp(above(y)))),
    logAbove: (y) => (y <= turn ? log(1 - exp(below(y))) : above(y)),
  };
}

/** ln(1 + e^y) without overflow. */
export function logOnePlusExp(y: number): number {
  return y > 0 ? y + log(1 + exp(-y)) : log(1 + exp(y));
}

/**
 * ln of x^a (1−x)^b / (a B(a,b)) · 1/(1 + d₁/(1 + d₂/(1 + …))), the continued fraction of the incomplete beta function, by
 * Lentz's method. Converges fast for x below (a+1)/(a+b+2).
 */
function logLowerTail(y: number, { a, b }: BetaShape, logDensity: number): number {
  const x = 1 / (1 + exp(-y));
  const tiny = 1e-300;
  let [c, d] = [1, 1 - ((a + b) * x) / (a + 1)];
  d = 1 / (Math.abs(d) < tiny ? tiny : d);
  let fraction = d;
  for (let m = 1; m < 20_000; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / nonZero(1 + even * d);
    c = nonZero(1 + even / c);
    fraction *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / nonZero(1 + odd * d);
    c = nonZero(1 + odd / c);
    const change = d * c;
    fraction *= change;
    if (Math.abs(change - 1) < 1e-15) break;
  }
  return logDensity - log(a) + log(fraction);
}

function nonZero(value: number): number {
  return Math.abs(value) < 1e-300 ? 1e-300 : value;
}
