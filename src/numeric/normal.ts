// The normal distribution, with the same bits everywhere.
import { exp } from '../machine/pinned.ts';

/**
 * Chance that a standard normal number is below x. Near the middle φ(x) · Σ x^(2k+1) / (1·3·5…(2k+1)), in the tails
 * the continued fraction φ(x) / (x + 1/(x + 2/(x + …))). Relative accuracy about 1e-14, far tails included.
 */
export function normalBelow(x: number): number {
  if (Number.isNaN(x)) return NaN;
  const size = Math.abs(x);
  const density = exp((-x * x) / 2) / Math.sqrt(2 * Math.PI);
  if (size < 3) return 0.5 + Math.sign(x) * density * middleSum(size);
  const tail = density === 0 ? 0 : density / tailFraction(size);
  return x < 0 ? tail : 1 - tail;
}

function middleSum(x: number): number {
  let term = x;
  let sum = x;
  for (let k = 1; term > 1e-18 * sum; k++) {
    term *= (x * x) / (2 * k + 1);
    sum += term;
  }
  return sum;
}

function tailFraction(x: number): number {
  let fraction = x;
  for (let k = 200; k >= 1; k--) fraction = x + k / fraction;
  return fraction;
}
