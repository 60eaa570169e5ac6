// Student's t distribution: how far a mean of few numbers may lie from the truth.
import { exp, log } from '../machine/pinned.ts';
import { betaTails } from './chance/beta.ts';
import { findRoot } from './root.ts';
import { z975 as z } from './normal-quantile.ts';

/** From here on the expansion around the normal curve is exact to about 1e-10. */
const manyDegrees = 2000;

/**
 * t with a chance of 0.95 to lie within ±t, for a whole number of degrees of freedom ν of at least 1. With
 * x = ν/(ν + t²) the chance beyond is the incomplete beta function Iₓ(ν/2, 1/2), solved for ln(x/(1 − x)) = ln(ν/t²); for
 * many degrees t = z + (z³ + z)/4ν + (5z⁵ + 16z³ + 3z)/96ν² (Abramowitz & Stegun 1964, 26.7.5, from memory).
 */
export function student95(degrees: number): number {
  if (!(degrees >= 1)) throw new RangeError(`Student's t is asked for ${degrees} degrees of freedom.`);
  if (degrees >= manyDegrees) {
    const z3 = z * z * z;
    const second = (5 * z3 * z * z + 16 * z3 + 3 * z) / (96 * degrees * degrees);
    return z + (z3 + z) / (4 * degrees) + second;
  }
  const tails = betaTails({ a: degrees / 2, b: 0.5 });
  const wanted = log(0.05);
  const y = findRoot((at) => tails.logBelow(at) - wanted, { low: -20, high: 40 }) ?? NaN;
  return Math.sqrt(degrees * exp(-y));
}
