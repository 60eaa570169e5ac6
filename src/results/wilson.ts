// Intervals of a chance from a number of runs.
import { pinned } from '../machine/pinned.ts';
import type { Interval } from './results.ts';
import { z975 as z } from '../numeric/normal-quantile.ts';

/** 95 % interval of Wilson (1927) for `hits` of `runs`: within 0 to 1, and of use for no hit and for nothing but hits. */
export function wilson(hits: number, runs: number): Interval {
  const [p, z2] = [hits / runs, z * z];
  const centre = (p + z2 / (2 * runs)) / (1 + z2 / runs);
  const half = (z * Math.sqrt((p * (1 - p)) / runs + z2 / (4 * runs * runs))) / (1 + z2 / runs);
  return {
    lower: hits === 0 ? 0 : Math.max(0, centre - half),
    upper: hits === runs ? 1 : Math.min(1, centre + half),
    level: 0.95,
    method: 'Wilson 1927',
    from: 'the number of runs',
  };
}

/**
 * Half-width of a band that holds a whole curve 'ever by year' at once with 95 %: √(ln(2/0.05) / 2n), the inequality of
 * Dvoretzky, Kiefer & Wolfowitz with the constant of Massart (1990), for n independent runs.
 */
export function simultaneousHalfWidth(runs: number): number {
  return Math.sqrt(pinned.log(2 / 0.05) / (2 * runs));
}
