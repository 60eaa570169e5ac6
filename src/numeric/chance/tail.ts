// Quantiles of a distribution of numbers from the logarithms of its tails, worked out at the chances of normal numbers.
import { exp, log } from '../../machine/pinned.ts';
import { normalBelow } from '../normal.ts';

/** A distribution over y, a scale without ends on which its density has one peak and a concave logarithm. */
export interface Tails {
  /** ln of the chance to be below y, and above it. */
  readonly logBelow: (y: number) => number;
  readonly logAbove: (y: number) => number;
  /** ln of the density over y. */
  readonly logDensity: (y: number) => number;
}

export interface QuantilePoint {
  readonly y: number;
  /** dy/dz. */
  readonly slope: number;
}

/** The y with as much below it as lies below z under the normal curve. `near` is a guess. Newton on ln of the nearer tail. */
export function quantileAt(tails: Tails, z: number, near: number): QuantilePoint {
  const wanted = log(normalBelow(-Math.abs(z)));
  const logTail = z <= 0 ? tails.logBelow : tails.logAbove;
  const towards = z <= 0 ? 1 : -1;
  let y = near;
  for (let round = 0; round < 200; round++) {
    const tail = logTail(y);
    const step = (wanted - tail) / (towards * exp(tails.logDensity(y) - tail));
    if (!Number.isFinite(step)) {
      y /= 2;
      continue;
    }
    // Where a tail is flat yet, its tangent points far beyond everything.
    const most = 4 + Math.abs(y) / 2;
    y += Math.max(-most, Math.min(most, step));
    if (Math.abs(step) <= 1e-13 * Math.max(1, Math.abs(y))) break;
  }
  const logNormal = (-z * z) / 2 - 0.9189385332046728;
  return { y, slope: exp(logNormal - tails.logDensity(y)) };
}
