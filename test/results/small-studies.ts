// Many small studies with a known truth, to see how often intervals hold it.
import { expect } from 'vitest';
import { uniformAt } from '../../src/machine/random.ts';
import { normalQuantile } from '../../src/numeric/normal-quantile.ts';

export const studies = 2000;

/** Of 95 % intervals. */
export function between(share: number): void {
  expect(share).toBeGreaterThan(0.925);
  expect(share).toBeLessThan(0.975);
}

/** For each seed a normal number of its own for each study, draw and purpose. */
export function normals(seed: number): (study: number, draw: number, what: number) => number {
  return (study, draw, what) => normalQuantile(uniformAt({ seed, words: [study, what, 1] }, draw));
}

/** Successes of n, by inversion. */
export function binomial(n: number, p: number, u: number): number {
  let chance = (1 - p) ** n;
  let k = 0;
  let sum = chance;
  while (u > sum && k < n) {
    k++;
    chance *= ((n - k + 1) / k) * (p / (1 - p));
    sum += chance;
  }
  return k;
}
