// What the growth loses without many things one by one, each a small part of the whole: exact, from one inverse for all.
import { dot } from '../numeric/dot.ts';
import { solveDense } from '../numeric/dense-solve.ts';
import { applyResolvent, resolventAt, type Resolvent } from '../numeric/resolvent.ts';
import { seriesValue } from '../numeric/series.ts';
import type { SparseMatrix } from '../numeric/sparse.ts';
import type { Vectors } from './sensitivity.ts';

/** How far above the growth the inverse is taken, as a share of it. */
const above = 1e-6;
/** Terms of the series from there downwards: few first, since each costs a multiplication by the inverse; then more. */
const terms = [5, 8] as const;
/** States left after folding; the inverse grows with the cube. */
const mostKept = 1000;
/** A loss is told where the last two terms move it by no more than this share. */
const trusted = 1e-7;

/** R(σ) = (σI − A)⁻¹ just above the growth. */
export interface Around {
  readonly vectors: Vectors;
  readonly resolvent: Resolvent;
  /** Place of each state among the kept ones; −1 for the folded. */
  readonly keptPlace: Int32Array;
  /** Responses to one animal in a kept state: patches ask again for what links asked. Only entries over kept states are held. */
  readonly known: Map<number, readonly Float64Array[]>;
}

/** Null where the matrix is too large, or its vectors are not positive everywhere. */
export function aroundGrowth(matrix: SparseMatrix, vectors: Vectors): Around | null {
  const { growthRate, right, left } = vectors;
  if (!right.every((share) => share > 0) || !left.every((value) => value > 0)) return null;
  const resolvent = resolventAt(matrix, growthRate * (1 + above), mostKept);
  if (resolvent === null) return null;
  const keptPlace = new Int32Array(matrix.columns).fill(-1);
  resolvent.folding.kept.forEach((state, place) => (keptPlace[state] = place));
  return { vectors, resolvent, keptPlace, known: new Map() };
}

/** What a vector leads to: its part along the stable distribution, and S u, S²u, … for the rest. */
export interface Response {
  /** vᵀu. */
  readonly worth: number;
  /** So many of them; worked out when first asked for. */
  readonly powers: (count: number) => readonly Float64Array[];
}

/** S(σ) = R(σ) − w vᵀ/(⟨v, w⟩(σ − λ)) has no pole at λ: R applied to what is left without the part along w. */
export function responseTo(around: Around, u: Float64Array): Response {
  const { vectors, resolvent } = around;
  const { right, left } = vectors;
  const scale = dot(left, right);
  const withoutGrowth = (x: Float64Array): Float64Array => {
    const along = dot(left, x) / scale;
    for (let i = 0; i < x.length; i++) x[i] = (x[i] ?? 0) - along * (right[i] ?? 0);
    return x;
  };
  const made: Float64Array[] = [];
  const only = onlyKept(around, u);
  return {
    worth: dot(left, u),
    powers: (count) => {
      while (made.length < count) {
        const last = made.at(-1) ?? withoutGrowth(u.slice());
        made.push(withoutGrowth(applyResolvent(resolvent, last)));
      }
      if (only !== null && made.length > (around.known.get(only)?.length ?? 0)) {
        remember(around, only, { powers: made, animals: u[only] ?? 1 });
      }
      return made;
    },
  };
}

/** The kept state that is the only one of which there is something; null where there is none. */
function onlyKept({ keptPlace }: Around, u: Float64Array): number | null {
  const first = u.findIndex((value) => value !== 0);
  const alone = first >= 0 && u.findLastIndex((value) => value !== 0) === first;
  return alone && (keptPlace[first] ?? -1) >= 0 ? first : null;
}

interface Remembered {
  readonly powers: readonly Float64Array[];
  readonly animals: number;
}

function remember({ resolvent, known }: Around, state: number, { powers, animals }: Remembered): void {
  const { kept } = resolvent.folding;
  known.set(
    state,
    powers.map((power) => Float64Array.from(kept, (one) => (power[one] ?? 0) / animals)),
  );
}

/** Over the kept states, of one animal in one of them. */
function powersFrom(around: Around, state: number, count: number): readonly Float64Array[] {
  const known = around.known.get(state);
  if (known !== undefined && known.length >= count) return known;
  const u = new Float64Array(around.keptPlace.length);
  u[state] = 1;
  responseTo(around, u).powers(count);
  return around.known.get(state) ?? [];
}

/** A few entries of a vector. */
export interface FewEntries {
  readonly places: ArrayLike<number>;
  readonly values: ArrayLike<number>;
}

/**
 * λ less the growth of A − m u bᵀ. With λ − δ for σ, 1 + m bᵀR(σ)u = 0 becomes δ = m ρ / (1 + m s), ρ = (bᵀw)(vᵀu)/⟨v, w⟩, s = bᵀS(λ − δ)u
 * = Σ bᵀS^(k+1)u (σ − λ + δ)^k. Null where the series does not settle it.
 */
export function lossWithout({ vectors }: Around, { worth, powers }: Response, b: FewEntries, m: number): number | null {
  const { growthRate, right, left } = vectors;
  const rho = (over(b, right) * worth) / dot(left, right);
  return firstOf(terms, (count) => {
    const series = powers(count).map((power) => over(b, power));
    return settled(growthRate, (from) => {
      const { value, change } = seriesValue(series, from);
      const delta = (m * rho) / (1 + m * value);
      return { delta, change: Math.abs((delta * m * change) / (1 + m * value)) };
    });
  });
}

function firstOf(counts: readonly number[], attempt: (count: number) => number | null): number | null {
  for (const count of counts) {
    const found = attempt(count);
    if (found !== null) return found;
  }
  return null;
}

/**
 * λ less the growth of A without some states: R(λ − δ) over them is singular, so δ = v_Kᵀ S_KK(λ − δ)⁻¹ w_K / ⟨v, w⟩ over those of them
 * that the folding keeps, if the folded ones are entered from their own alone.
 */
export function lossWithoutStates(around: Around, kept: readonly number[]): number | null {
  if (kept.length === 0) return 0;
  return firstOf(terms, (count) => lossOfStates(around, kept, count));
}

function lossOfStates(around: Around, kept: readonly number[], count: number): number | null {
  const { growthRate, right, left } = around.vectors;
  const scale = dot(left, right);
  const size = kept.length;
  const [w, v] = [Float64Array.from(kept, (s) => right[s] ?? 0), Float64Array.from(kept, (s) => left[s] ?? 0)];
  const series = kept.map((column) => {
    const powers = powersFrom(around, column, count);
    return kept.map((row) => powers.map((power) => power[around.keptPlace[row] ?? 0] ?? 0));
  });
  const lossFrom = (entries: Float64Array): number => {
    const solved = solveDense({ rows: size, columns: size, values: entries }, w);
    return solved === null ? NaN : dot(v, solved) / scale;
  };
  return settled(growthRate, (from) => {
    const [values, shaken] = [new Float64Array(size * size), new Float64Array(size * size)];
    kept.forEach((_, i) => {
      kept.forEach((_column, j) => {
        const { value, change } = seriesValue(series[j]?.[i] ?? [], from);
        values[i * size + j] = value;
        shaken[i * size + j] = value + change;
      });
    });
    const delta = lossFrom(values);
    return { delta, change: Math.abs(lossFrom(shaken) - delta) };
  });
}

interface Step {
  readonly delta: number;
  readonly change: number;
}

/** The δ that leads to itself. */
function settled(growthRate: number, next: (from: number) => Step): number | null {
  let delta = 0;
  for (let round = 0; round < 200; round++) {
    const step = next(above * growthRate + delta);
    if (!(step.delta >= 0 && step.delta < Infinity)) return null;
    const moved = Math.abs(step.delta - delta);
    delta = step.delta;
    if (moved <= 1e-13 * growthRate) {
      return step.change <= trusted * delta + 1e-14 * growthRate ? delta : null;
    }
  }
  return null;
}

function over({ places, values }: FewEntries, x: Float64Array): number {
  let sum = 0;
  for (let k = 0; k < places.length; k++) sum += (values[k] ?? 0) * (x[places[k] ?? 0] ?? 0);
  return sum;
}
