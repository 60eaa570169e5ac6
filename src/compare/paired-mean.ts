// The difference between two means over the same futures, or over the same draws of what is not known.
import { student95 } from '../numeric/student.ts';
import type { Estimate } from './paired-share.ts';

export const pairedMeanMethod = "paired differences, Student's t";

/**
 * Mean of the differences d with its 95 % interval d̄ ± t s/√n, s with n − 1 and t with n − 1 degrees of freedom. No
 * interval from fewer than two.
 */
export function meanDifference(differences: Float64Array): Estimate {
  const n = differences.length;
  const mean = meanOf(differences);
  if (n < 2) return { estimate: mean, lower: -Infinity, upper: Infinity };
  const half = student95(n - 1) * Math.sqrt(varianceOf(differences, mean) / n);
  return { estimate: mean, lower: mean - half, upper: mean + half };
}

export function meanOf(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/** With n − 1. */
export function varianceOf(values: Float64Array, mean = meanOf(values)): number {
  return values.reduce((sum, value) => sum + (value - mean) * (value - mean), 0) / (values.length - 1);
}
