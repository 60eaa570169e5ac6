// How uncertain the growth rate is when the numbers behind it are.
import type { DenseMatrix } from '../numeric/sparse.ts';
import { quadratic } from './small-noise.ts';

/**
 * Delta method: Var λ ≈ Σ ∂λ/∂a ∂λ/∂b Cov(a, b) with the covariances of the *estimates* (not of the years); the standard
 * error is its root. First order: trust it while the errors are small against the numbers.
 */
export function growthStandardError(sensitivities: Float64Array, covariance: DenseMatrix): number {
  return Math.sqrt(Math.max(0, quadratic(sensitivities, covariance)));
}
