// Lifetimes, young in a lifetime, and generation times, from the split of a matrix into fates and births.
import { log } from '../machine/pinned.ts';
import { solveBelow } from '../numeric/downstream.ts';
import { leading } from '../numeric/leading.ts';
import { findRoot } from '../numeric/root.ts';
import { multiply, multiplyTransposed, transpose, weightedSum } from '../numeric/sparse-product.ts';
import type { SparseMatrix } from '../numeric/sparse.ts';
import { dot, type Vectors } from './sensitivity.ts';

/** A = U + F: what becomes of the animals themselves, and their young. */
export interface LifeSplit {
  readonly fates: SparseMatrix;
  readonly births: SparseMatrix;
}

export interface Lifetimes {
  /** Steps from now to death in each state, the current one included. */
  readonly expectancy: Float64Array;
  readonly variance: Float64Array;
}

/**
 * η = 1ᵀN and its variance 1ᵀN(2N − I) − η² with N = (I − U)⁻¹ (Cochran & Ellner 1992), by two solves of (I − Uᵀ)x = b.
 * Null where somebody never dies (the fates alone do not fade).
 */
export function lifetimes(fates: SparseMatrix): Lifetimes | null {
  if (!(leading(fates).growthRate < 1)) return null;
  const turned = transpose(fates);
  const expectancy = solveBelow(turned, 1, new Float64Array(fates.columns).fill(1));
  const twice = solveBelow(turned, 1, expectancy);
  const variance = expectancy.map((mean, i) => Math.max(0, 2 * (twice[i] ?? 0) - mean - mean * mean));
  return { expectancy, variance };
}

/**
 * R0: young of a newborn in its life, weighted by what each kind of newborn leaves behind; ρ(F(I − U)⁻¹) (Cushing & Zhou
 * 1994). Found as the x at which U + F/x stands still, which asks for no inverse. 0 without births; null where
 * somebody never dies.
 */
export function netReproductiveRate({ fates, births }: LifeSplit): number | null {
  const standsAbove = (x: number): number => leading(weightedSum([1, fates], [1 / x, births])).growthRate - 1;
  if (!(leading(fates).growthRate < 1)) return null;
  if (leading(weightedSum([1, fates], [1, births])).growthRate <= leading(fates).growthRate) return 0;
  let [low, high] = [1, 1];
  while (standsAbove(low) < 0 && low > 1e-12) low /= 4;
  while (standsAbove(high) > 0 && high < 1e12) high *= 4;
  return findRoot(standsAbove, { low, high }, 1e-13);
}

export interface GenerationTimes {
  /** Mean age of mothers in one cohort followed to its end, Σ i φ_i / R0. */
  readonly cohort: number | null;
  /** Mean age of mothers in the stable population, λ⟨v, w⟩ / vᵀFw (Bienvenu & Legendre 2015). */
  readonly stable: number | null;
  /** Steps in which the population multiplies by R0, ln R0 / ln λ. */
  readonly replacement: number | null;
}

/** Each under its definition, in steps. Null where it does not exist. */
export function generationTimes(split: LifeSplit, vectors: Vectors, netRate: number | null): GenerationTimes {
  const { growthRate, right, left } = vectors;
  const worthOfBirths = dot(left, multiply(split.births, right));
  const stable = worthOfBirths > 0 ? (growthRate * dot(left, right)) / worthOfBirths : null;
  const standsStill = Math.abs(growthRate - 1) < 1e-7;
  const replacement = netRate && netRate > 0 ? (standsStill ? stable : log(netRate) / log(growthRate)) : null;
  return { cohort: netRate ? cohortAge(split, netRate) : null, stable, replacement };
}

/**
 * At x = R0 the matrix U + F/x stands still; its mean age of mothers there is the cohort's, since then nobody's
 * contribution is discounted by growth.
 */
function cohortAge({ fates, births }: LifeSplit, netRate: number): number | null {
  const still = leading(weightedSum([1, fates], [1 / netRate, births]));
  if (!still.right || !still.left) return null;
  const worth = dot(multiplyTransposed(births, still.left), still.right) / netRate;
  return worth > 0 ? dot(still.left, still.right) / worth : null;
}
