// Long-run growth when years differ a little, from the rates that vary and how they go together: within a year, between patches and
// from year to year.
import { dot } from '../../numeric/dot.ts';
import { log } from '../../machine/pinned.ts';
import { multiply, multiplyTransposed } from '../../numeric/sparse-product.ts';
import type { SparseMatrix } from '../../numeric/sparse.ts';
import { phaseSensitivities, type PhaseSensitivity } from '../phase-sensitivity.ts';
import type { Vectors } from '../sensitivity.ts';
import type { SmallNoise } from '../small-noise.ts';
import type { RateColumn } from './rate-columns.ts';

export interface MixedYears {
  /** At mean rates. */
  readonly maps: readonly SparseMatrix[];
  /** The product of the maps over the states of the count. */
  readonly matrix: SparseMatrix;
  readonly columns: readonly RateColumn[];
  /** Of the matrix. */
  readonly vectors: Vectors;
  /** Place of each state of the count among all patches and classes. */
  readonly places: readonly number[];
  /** Of rates a and b, b so many years after a. */
  readonly covariance: (a: number, b: number, later: number) => number;
  /** Of the normal numbers from one year to the next. */
  readonly autocorrelation: number;
}

/** Correlation with the past below which it is left out. */
const leastCarried = 1e-9;

/** About how many multiplications it takes. */
export function workOf({ columns, matrix, maps, autocorrelation }: Omit<MixedYears, 'covariance' | 'vectors'>): number {
  const inYear = maps.reduce((sum, map) => sum + map.values.length, 0);
  const pairs = columns.length * columns.length * 16;
  return columns.length * inYear * 2 + (1 + lagsOf(autocorrelation)) * (columns.length * matrix.values.length + pairs);
}

/**
 * Tuljapurkar (1982, from memory), second order in the noise. With D_a = ∂A/∂a / λ, g_a = vᵀD_a w, ⟨v, w⟩ = 1, B = A/λ and C_m the
 * covariance of rates m years apart: ln λ_s ≈ ln λ + Σ C₀ vᵀD_ab w − ½ Σ C₀ g_a g_b + Σ_m Σ C_m vᵀD_b (B^(m−1) − w vᵀ) D_a w. The first
 * sum is over rates that act one after the other in one year, whose product has a mean of its own. Each year adds
 * Σ C₀ g_a g_b + 2 Σ_m Σ C_m g_a g_b to the variance of ln N in the long run.
 */
export function mixedYears(request: MixedYears): SmallNoise {
  const { vectors, covariance } = request;
  const acts = actsOf(request);
  let direct = 0;
  acts.forEach(({ effect: left }, a) => {
    acts.forEach(({ effect: right }, b) => (direct += left * right * covariance(a, b, 0)));
  });
  const carried = carriedOver(request, acts);
  const gained = withinYears(request, acts) + carried.growth;
  const steady = log(vectors.growthRate);
  const logGrowth = steady + gained - direct / 2;
  return { logGrowth, lost: steady - logGrowth, yearlyVariance: direct + 2 * carried.variance };
}

interface Act {
  readonly column: RateColumn;
  /** vᵀ times the column after its phase. */
  readonly worth: number;
  /** Animals of the stable distribution that the column acts on, over λ. */
  readonly there: number;
  /** g. */
  readonly effect: number;
}

function actsOf({ maps, places, vectors, columns }: MixedYears): readonly Act[] {
  const named = maps.map((map, i) => ({ phase: String(i), map }));
  const phases = phaseSensitivities(named, places, vectors);
  return columns.map((column) => {
    const phase = phases[column.phase];
    const worth = worthOf(column, phase);
    const there = (phase?.before[column.place] ?? 0) / vectors.growthRate;
    return { column, worth, there, effect: worth * there };
  });
}

function worthOf({ rows, values }: RateColumn, phase: PhaseSensitivity | undefined): number {
  const sum = values.reduce((all, value, k) => all + value * (phase?.after[rows[k] ?? 0] ?? 0), 0);
  return sum / (phase?.scale ?? 1);
}

/** Column · there, as it stands right after its phase. */
function moved({ column: { rows, values }, there }: Act, size: number): Float64Array<ArrayBuffer> {
  const x = new Float64Array(size);
  values.forEach((value, k) => (x[rows[k] ?? 0] = value * there));
  return x;
}

/** Σ C₀ vᵀD_ab w, each pair in the order of the year. */
function withinYears({ maps, covariance }: MixedYears, acts: readonly Act[]): number {
  let sum = 0;
  acts.forEach((first, a) => {
    let ahead: Float64Array = moved(first, maps[0]?.rows ?? 0);
    for (let phase = first.column.phase + 1; phase < maps.length; phase++) {
      acts.forEach(({ column, worth }, b) => {
        if (column.phase !== phase) return;
        const there = ahead[column.place] ?? 0;
        if (there !== 0) sum += covariance(a, b, 0) * worth * there;
      });
      const map = maps[phase];
      if (map !== undefined) ahead = multiply(map, ahead);
    }
  });
  return sum;
}

interface Carried {
  readonly growth: number;
  readonly variance: number;
}

function carriedOver(request: MixedYears, acts: readonly Act[]): Carried {
  const { matrix, vectors, covariance, autocorrelation } = request;
  const lags = lagsOf(autocorrelation);
  if (lags === 0) return { growth: 0, variance: 0 };
  const asked = acts.map((act) => askedBefore(request, act));
  let states = acts.map((act) => leftAfter(request, act));
  let [growth, variance] = [0, 0];
  for (let later = 1; later <= lags; later++) {
    states.forEach((state, a) => {
      acts.forEach(({ effect }, b) => {
        const together = covariance(a, b, later);
        const both = effect * (acts[a]?.effect ?? 0);
        growth += together * (dot(asked[b] ?? state, state) - both);
        variance += together * both;
      });
    });
    states = states.map((state) => multiply(matrix, state).map((value) => value / vectors.growthRate));
  }
  return { growth, variance };
}

/** Years until a normal number has forgotten. */
function lagsOf(autocorrelation: number): number {
  let lags = 0;
  for (let left = Math.abs(autocorrelation); left > leastCarried; left *= Math.abs(autocorrelation)) lags++;
  return lags;
}

/** D w over the states of the count. */
function leftAfter({ maps, places }: MixedYears, act: Act): Float64Array {
  let x: Float64Array = moved(act, maps[0]?.rows ?? 0);
  for (const map of maps.slice(act.column.phase + 1)) x = multiply(map, x);
  return Float64Array.from(places, (place) => x[place] ?? 0);
}

/** vᵀD over the states of the count. */
function askedBefore({ maps, places, vectors }: MixedYears, { column, worth }: Act): Float64Array {
  let x: Float64Array = new Float64Array(maps[0]?.rows ?? 0);
  x[column.place] = worth / vectors.growthRate;
  for (const map of maps.slice(0, column.phase).reverse()) x = multiplyTransposed(map, x);
  return Float64Array.from(places, (place) => x[place] ?? 0);
}
