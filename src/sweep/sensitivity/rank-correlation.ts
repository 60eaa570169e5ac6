// Partial rank correlation: how closely a measure follows one factor up or down, the others taken out.
import { pinned } from '../../machine/pinned.ts';
import { invertDense } from '../../numeric/dense-solve.ts';
import { dot } from '../../numeric/dot.ts';
import { ascendingOrder } from '../../numeric/order.ts';
import type { DenseMatrix } from '../../numeric/sparse.ts';
import type { Band } from './again.ts';
import { z975 } from '../../numeric/normal-quantile.ts';

export interface RankCorrelation {
  /** From −1 to 1. */
  readonly correlation: number;
  /** 95 %, by Fisher's transformation. */
  readonly band: Band;
}

/**
 * By factor, from columns of equal length (rows with NaN left out by the caller). All are turned into ranks (ties share the mean);
 * with R the correlations of the factors' ranks, b = R⁻¹ r and R² = r·b, the partial correlation is b_i / √(b_i² + (1 − R²)
 * (R⁻¹)_ii). Assumes a response that goes only up or only down. Null for a factor that does not vary or follows from others, and
 * everywhere with fewer than k + 4 rows.
 */
export function partialRankCorrelations(
  factors: readonly Float64Array[],
  measure: Float64Array,
  orderOf: (values: Float64Array) => Uint32Array = ascendingOrder,
): readonly (RankCorrelation | null)[] {
  const rows = measure.length;
  const y = standardRanks(measure, orderOf(measure));
  const ranked = factors.map((values) => standardRanks(values, orderOf(values)));
  const used = ranked.flatMap((own, k) => (own === null ? [] : [{ own, k }]));
  const none = factors.map(() => null);
  if (y === null || rows < used.length + 4) return none;
  const n = used.length;
  const r = used.map(({ own }) => dot(own, y));
  const likeness = Float64Array.from({ length: n * n }, (_, e) => {
    const [i, j] = [Math.floor(e / n), e % n];
    const [a, b] = [used[i], used[j]];
    return a && b ? dot(a.own, b.own) : 0;
  });
  const inverse = inverseOf({ rows: n, columns: n, values: likeness })?.values;
  if (inverse === undefined) return none;
  const b = used.map((_, i) => r.reduce((sum, value, j) => sum + value * (inverse[i * n + j] ?? 0), 0));
  const rest = Math.max(0, 1 - b.reduce((sum, value, i) => sum + value * (r[i] ?? 0), 0));
  const found: (RankCorrelation | null)[] = [...none];
  used.forEach(({ k }, i) => {
    const [own, spread] = [b[i] ?? 0, inverse[i * n + i] ?? 0];
    const scale = Math.sqrt(own * own + (rest < 1e-14 ? 0 : rest) * spread);
    const correlation = Math.abs(own) < 1e-12 || scale === 0 ? 0 : Math.max(-1, Math.min(1, own / scale));
    found[k] = { correlation, band: fisherBand(correlation, rows - (n - 1)) };
  });
  return found;
}

/** Ranks with mean 0 and length 1; null where all are equal. */
function standardRanks(values: Float64Array, order: Uint32Array): Float64Array | null {
  const ranks = new Float64Array(values.length);
  const middle = (values.length - 1) / 2;
  let next = values[order[0] ?? 0];
  for (let i = 0; i < order.length;) {
    // Far apart in memory, so that each is looked at once.
    const value = next;
    let end = i + 1;
    for (; end < order.length; end++) {
      next = values[order[end] ?? 0];
      if (next !== value) break;
    }
    for (let k = i; k < end; k++) ranks[order[k] ?? 0] = (i + end - 1) / 2 - middle;
    i = end;
  }
  const length = Math.sqrt(dot(ranks, ranks));
  if (length === 0) return null;
  for (let i = 0; i < ranks.length; i++) ranks[i] = (ranks[i] ?? 0) / length;
  return ranks;
}

/** Null where a row follows from the others, or as good as. */
function inverseOf(matrix: DenseMatrix): DenseMatrix | null {
  const inverse = invertDense(matrix);
  const n = matrix.rows;
  if (inverse === null) return null;
  for (let i = 0; i < n; i++) if (!((inverse.values[i * n + i] ?? NaN) < 1e9)) return null;
  return inverse;
}

/** tanh(artanh r ± 1.96 / √(m − 3)), with m the rows less the other factors. */
function fisherBand(correlation: number, m: number): Band {
  if (Math.abs(correlation) >= 1 - 1e-12) return { lower: correlation, upper: correlation };
  const z = pinned.log((1 + correlation) / (1 - correlation)) / 2;
  const half = z975 / Math.sqrt(Math.max(1, m - 3));
  const back = (x: number): number => {
    const e = pinned.exp(2 * x);
    return (e - 1) / (e + 1);
  };
  return { lower: back(z - half), upper: back(z + half) };
}
