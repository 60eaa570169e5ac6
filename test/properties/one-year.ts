// One year of a model from whole animals: mean and variance of a count against exact ones. Bounds are 5.5 standard errors, with the
// standard error of the variance from the draws themselves.
import { expect } from 'vitest';
import { runReplicates } from '../kernel/collect.ts';
import { compileText } from '../pipeline/compile-text.ts';

const replicates = 40_000;
export const n = 40;

export interface Case {
  readonly essence: string;
  /** Column of the count after one year: 0 for all, then each patch. */
  readonly column?: number;
  readonly patches?: string;
  /** As many adults in patch B as in A. */
  readonly alsoInB?: true;
  /** Instead of females of one class, all 40 adult. */
  readonly animals?: { readonly sexes: string; readonly start: string };
  readonly mean: number;
  readonly variance: number;
}

/** p varies with mean p and SD s: n p (1 − p) − n s² + n² s². */
export const share = (p: number, s: number): number => n * p * (1 - p) - n * s * s + n * n * s * s;

/** p varies with the mean m and the mean square q: n (m − q) + n² (q − m²). */
export const mixedShare = (m: number, q: number): number => n * (m - q) + n * n * (q - m * m);

export function expectYear({ essence, patches, animals, alsoInB, column = 0, mean, variance }: Case): void {
  const { image } = compileText(`skein: 1
study: { title: Total variance }
years: 1
${patches ?? 'patches: [{ name: A }]'}
${animals?.sexes ?? 'counts: females\nclasses: [adult]'}
${essence}
start: { table: { A: ${animals?.start ?? `{ adult: ${n} }`}${alsoInB === true ? `, B: { adult: ${n} }` : ''} } }
`);
  const { counts, columns } = runReplicates(image, { replicates, steps: 1, seed: 31 });
  const at = (columns + column) * replicates;
  const values = counts.slice(at, at + replicates);
  const found = values.reduce((a, b) => a + b, 0) / replicates;
  expect(Math.abs(found - mean)).toBeLessThan(5.5 * Math.sqrt(variance / replicates));
  const squares = values.map((value) => (value - mean) ** 2);
  const spread = squares.reduce((a, b) => a + b, 0) / replicates;
  const error = Math.sqrt(squares.reduce((sum, one) => sum + (one - spread) ** 2, 0) / replicates / replicates);
  expect(Math.abs(spread - variance)).toBeLessThan(5.5 * error);
}
