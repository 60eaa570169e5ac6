// Lifetimes, young in a lifetime, and generation times, from the split of a matrix into fates and births.
import { dot } from '../numeric/dot.ts';
import { log } from '../machine/pinned.ts';
import { fadingSums, type Fading } from '../numeric/fading.ts';
import { leading } from '../numeric/leading.ts';
import { multiply, multiplyTransposed } from '../numeric/sparse-product.ts';
import { sparseFromTriplets, type SparseMatrix } from '../numeric/sparse.ts';
import type { Vectors } from './sensitivity.ts';

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
export function lifetimes(fates: SparseMatrix, fading = fadingSums(fates)): Lifetimes | null {
  if (!fading) return null;
  const expectancy = fading.sumTransposed(new Float64Array(fates.columns).fill(1));
  const twice = fading.sumTransposed(expectancy);
  const variance = expectancy.map((mean, i) => Math.max(0, 2 * (twice[i] ?? 0) - mean - mean * mean));
  return { expectancy, variance };
}

/** From one generation of newborns to the next. */
export interface NextGeneration {
  /** R0: young of a newborn in its life, weighted by what each kind of newborn leaves behind. */
  readonly netRate: number;
  /** Mean age of mothers in one cohort followed to its end; null without births or where kinds of newborns do not mix. */
  readonly cohortAge: number | null;
}

/**
 * R0 = ρ(K) with K = F(I − U)⁻¹ over the states that newborns enter (Cushing & Zhou 1994), and with its vectors u and b the
 * age of mothers uᵀF N² b / uᵀF N b, which for one kind of newborn is Σ i φ_i / R0. Cost: one solve for each such state.
 * Null where somebody never dies.
 */
export function nextGeneration(split: LifeSplit, fading = fadingSums(split.fates)): NextGeneration | null {
  if (!fading) return null;
  const newborn = statesEntered(split.births);
  if (newborn.length === 0) return { netRate: 0, cohortAge: null };
  const found = leading(generationMatrix(split, newborn, fading));
  if (!found.right || !found.left) return { netRate: found.growthRate, cohortAge: null };
  const size = split.fates.columns;
  const lived = fading.sum(spreadOver(newborn, found.right, size));
  const worth = multiplyTransposed(split.births, spreadOver(newborn, found.left, size));
  return { netRate: found.growthRate, cohortAge: dot(worth, fading.sum(lived)) / dot(worth, lived) };
}

/** R0 alone. */
export function netReproductiveRate(split: LifeSplit): number | null {
  return nextGeneration(split)?.netRate ?? null;
}

function statesEntered(births: SparseMatrix): number[] {
  return [...new Set(births.rowIndex)].sort((a, b) => a - b);
}

function generationMatrix({ births }: LifeSplit, newborn: readonly number[], fading: Fading): SparseMatrix {
  const [rowIndex, columnIndex, values]: [number[], number[], number[]] = [[], [], []];
  const unit = new Float64Array(births.columns);
  newborn.forEach((state, column) => {
    unit[state] = 1;
    const young = multiply(births, fading.sum(unit));
    unit[state] = 0;
    newborn.forEach((to, row) => {
      const value = young[to] ?? 0;
      if (value === 0) return;
      rowIndex.push(row);
      columnIndex.push(column);
      values.push(value);
    });
  });
  return sparseFromTriplets({ rows: newborn.length, columns: newborn.length, rowIndex, columnIndex, values });
}

function spreadOver(places: readonly number[], values: Float64Array, size: number): Float64Array {
  const x = new Float64Array(size);
  places.forEach((place, k) => (x[place] = values[k] ?? 0));
  return x;
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
export function generationTimes(split: LifeSplit, vectors: Vectors, next: NextGeneration | null): GenerationTimes {
  const { growthRate, right, left } = vectors;
  const worthOfBirths = dot(left, multiply(split.births, right));
  const stable = worthOfBirths > 0 ? (growthRate * dot(left, right)) / worthOfBirths : null;
  return { cohort: next?.cohortAge ?? null, stable, replacement: replacementTime(growthRate, next, stable) };
}

/** At λ = 1, where both logarithms are 0, it is the mean age of mothers in the stable population. */
function replacementTime(growthRate: number, next: NextGeneration | null, stable: number | null): number | null {
  if (!next || !(next.netRate > 0)) return null;
  return Math.abs(growthRate - 1) < 1e-7 ? stable : log(next.netRate) / log(growthRate);
}
