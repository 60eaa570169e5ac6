// Long-run growth when years differ, from the matrix of an average year and how much its numbers vary together.
import { log } from '../machine/pinned.ts';
import type { DenseMatrix } from '../numeric/sparse.ts';

export interface SmallNoise {
  /** Mean yearly change of the logarithm of numbers, ln λ_s. */
  readonly logGrowth: number;
  /** What chance takes away from the logarithm of the growth of an average year. */
  readonly lost: number;
  /** Variance that each year adds to the logarithm of numbers. */
  readonly yearlyVariance: number;
}

/**
 * Tuljapurkar's approximation (1982) for independent years: ln λ_s ≈ ln λ − τ²/(2λ²), τ² = Σ Cov(a, b) ∂λ/∂a ∂λ/∂b.
 * `sensitivities` belong to the numbers whose covariances are given: entries of the matrix, or rates that stand in it
 * linearly and are means of what varies. Holds for small noise; its error grows with the fourth power of the noise.
 */
export function smallNoiseGrowth(growthRate: number, sensitivities: Float64Array, covariance: DenseMatrix): SmallNoise {
  const yearlyVariance = quadratic(sensitivities, covariance) / (growthRate * growthRate);
  return { logGrowth: log(growthRate) - yearlyVariance / 2, lost: yearlyVariance / 2, yearlyVariance };
}

/** Σ g_a C_ab g_b. */
export function quadratic(g: Float64Array, covariance: DenseMatrix): number {
  let sum = 0;
  g.forEach((left, a) => {
    g.forEach((right, b) => (sum += left * right * (covariance.values[a * covariance.columns + b] ?? 0)));
  });
  return sum;
}
