// How much the growth rate changes with each entry of each phase of the year: the chain rule through the product.
import { dot } from '../numeric/dot.ts';
import { multiply, multiplyTransposed } from '../numeric/sparse-product.ts';
import { entryAt, forEachEntry, type SparseMatrix } from '../numeric/sparse.ts';
import type { Vectors } from './sensitivity.ts';

export interface PhaseMap {
  readonly phase: string;
  readonly map: SparseMatrix;
}

/** What a phase finds and what its results are worth: ∂λ/∂m_ij = after[i] · before[j] / scale. */
export interface PhaseSensitivity {
  readonly phase: string;
  readonly map: SparseMatrix;
  /** The stable distribution as it stands when the phase begins. */
  readonly before: Float64Array;
  /** The reproductive value at the year's end of one animal in each state when the phase is over. */
  readonly after: Float64Array;
  readonly scale: number;
}

/**
 * With A = M_k … M_2 M_1 (the first acts first), ∂λ/∂M_i = (M_k … M_{i+1})ᵀ v (M_{i−1} … M_1 w)ᵀ / ⟨v, w⟩, which for
 * demography before dispersal is the chain rule of Hunter & Caswell (2005). `places[s]` is the place of state s of the
 * matrix among all states of the maps. Elasticities of each phase sum to 1.
 */
export function phaseSensitivities(
  maps: readonly PhaseMap[],
  places: ArrayLike<number>,
  vectors: Vectors,
): PhaseSensitivity[] {
  const size = maps[0]?.map.columns ?? 0;
  const scale = dot(vectors.left, vectors.right);
  let before = spreadOut(vectors.right, places, size);
  const befores = maps.map(({ map }) => {
    const here = before;
    before = multiply(map, before);
    return here;
  });
  let after = spreadOut(vectors.left, places, size);
  after = withUnplaced({ maps, places, growthRate: vectors.growthRate }, after);
  const afters = [...maps].reverse().map(({ map }) => {
    const here = after;
    after = multiplyTransposed(map, after);
    return here;
  });
  return maps.map(({ phase, map }, i) => ({
    phase,
    map,
    before: befores[i] ?? before,
    after: afters[maps.length - 1 - i] ?? after,
    scale,
  }));
}

function spreadOut(values: Float64Array, places: ArrayLike<number>, size: number): Float64Array {
  const all = new Float64Array(size);
  values.forEach((value, s) => (all[places[s] ?? 0] = value));
  return all;
}

interface Year {
  readonly maps: readonly PhaseMap[];
  readonly places: ArrayLike<number>;
  readonly growthRate: number;
}

/** The values of states that are empty at the count too: what one animal there would be worth, Mᵀv / λ. */
function withUnplaced({ maps, places, growthRate }: Year, worth: Float64Array): Float64Array {
  const back = [...maps].reverse().reduce((value, { map }) => multiplyTransposed(map, value), worth);
  const all = back.map((value) => value / growthRate);
  for (let s = 0; s < places.length; s++) all[places[s] ?? 0] = worth[places[s] ?? 0] ?? 0;
  return all;
}

/** ∂λ/∂m for the entry (row, column) of the phase, stored or not. */
export function phaseEntrySensitivity(phase: PhaseSensitivity, row: number, column: number): number {
  return ((phase.after[row] ?? 0) * (phase.before[column] ?? 0)) / phase.scale;
}

/** Σ over the stored entries of the phase of (m/λ) ∂λ/∂m: 1 for every phase. */
export function phaseElasticitySum(phase: PhaseSensitivity, growthRate: number): number {
  let sum = 0;
  forEachEntry(phase.map, (row, column, value) => (sum += value * phaseEntrySensitivity(phase, row, column)));
  return sum / growthRate;
}

/** A difference of two sensitivities that is a smaller share of them is what rounding leaves of none. */
const rounding = 1e-12;

/**
 * Along the constraint that animals which go cannot also stay: what λ gains per share moved from staying in `column` to
 * going to `row`. Exactly 0 where both places are worth the same within rounding.
 */
export function movedInsteadOfStaying(phase: PhaseSensitivity, row: number, column: number): number {
  const [going, staying] = [phaseEntrySensitivity(phase, row, column), phaseEntrySensitivity(phase, column, column)];
  const gain = going - staying;
  return Math.abs(gain) <= rounding * Math.max(going, staying) ? 0 : gain;
}

/** What λ loses to first order when nobody arrives over this entry and those who would have come are lost. */
export function firstOrderLoss(phase: PhaseSensitivity, row: number, column: number): number {
  return entryAt(phase.map, row, column) * phaseEntrySensitivity(phase, row, column);
}
