// Sobol' indices: which share of the variance of a measure each factor makes alone, and in all with the others.
import { drawnAgain, middleOf, type Band } from './again.ts';
import type { Observed } from './observed.ts';

export interface FactorShares {
  /** Share of the variance that would go if the factor were known (Saltelli et al. 2010). */
  readonly first: number;
  readonly firstBand: Band;
  /** The same by the other way of counting (Jansen 1999); the two agree where there are enough rows. */
  readonly firstByDifferences: number;
  /** Share that would stay if all others were known (Jansen 1999). */
  readonly total: number;
  readonly totalBand: Band;
}

export interface SharesOfVariance {
  /** Of the measure over the points, without the noise of replicates. */
  readonly variance: number;
  readonly factors: readonly FactorShares[];
  /** Rows of the design that were used, and those left out since a point of them failed. */
  readonly rows: number;
  readonly failedRows: number;
}

const drawings = 500;

/**
 * With f of a row at A, B, and AB_i (A with the column i of B): variance V of f over A and B; first V_i / V with
 * V_i = mean of f(B) (f(AB_i) − f(A)), or V − ½ mean of (f(B) − f(AB_i))²; total ½ mean of (f(A) − f(AB_i))² / V. Each product is
 * taken of one half of the replicates with the other. Bands: rows drawn again 500 times. Assumes factors that are independent of
 * each other. Points in the order of the design `sobol indices`; null where fewer than 4 rows are whole or nothing varies.
 */
export function sharesOfVariance(observed: Observed, factors: number): SharesOfVariance | null {
  const { terms, rows, failedRows } = termsOf(observed, factors);
  if (rows < 4) return null;
  const whole = estimate(terms, { factors, rows, times: null });
  if (!(whole.variance > 0)) return null;
  const again = Array.from({ length: drawings }, (_, b) =>
    estimate(terms, { factors, rows, times: drawnAgain(rows, b) }),
  );
  return {
    variance: whole.variance,
    rows,
    failedRows,
    factors: Array.from({ length: factors }, (_, i) => ({
      first: whole.first[i] ?? NaN,
      firstBand: middleOf(again.map(({ first }) => first[i] ?? NaN)),
      firstByDifferences: whole.byDifferences[i] ?? NaN,
      total: whole.total[i] ?? NaN,
      totalBand: middleOf(again.map(({ total }) => total[i] ?? NaN)),
    })),
  };
}

/** A row: sums of the halves over A and B, their product, then for each factor the three means' terms. */
const headTerms = 3;
const factorTerms = 3;

interface Terms {
  readonly terms: Float64Array;
  readonly rows: number;
  readonly failedRows: number;
}

function termsOf({ first, second }: Observed, factors: number): Terms {
  const size = factors + 2;
  const all = Math.floor(first.length / size);
  const width = headTerms + factorTerms * factors;
  const terms = new Float64Array(all * width);
  const [middle1, middle2] = [middleValue(first), middleValue(second)];
  let rows = 0;
  for (let row = 0; row < all; row++) {
    const own1 = first.subarray(row * size, (row + 1) * size);
    const own2 = second.subarray(row * size, (row + 1) * size);
    if (own1.some(Number.isNaN) || own2.some(Number.isNaN)) continue;
    const at1 = (i: number): number => (own1[i] ?? 0) - middle1;
    const at2 = (i: number): number => (own2[i] ?? 0) - middle2;
    const out = terms.subarray(rows * width, (rows + 1) * width);
    rows++;
    out[0] = at1(0) + at1(1);
    out[1] = at2(0) + at2(1);
    out[2] = at1(0) * at2(0) + at1(1) * at2(1);
    for (let i = 0; i < factors; i++) {
      const k = headTerms + factorTerms * i;
      out[k] = (at1(1) * (at2(i + 2) - at2(0)) + at2(1) * (at1(i + 2) - at1(0))) / 2;
      out[k + 1] = (at1(1) - at1(i + 2)) * (at2(1) - at2(i + 2));
      out[k + 2] = (at1(0) - at1(i + 2)) * (at2(0) - at2(i + 2));
    }
  }
  return { terms, rows, failedRows: all - rows };
}

/** Taken from all values first: products of numbers far from zero would lose their digits. */
function middleValue(values: Float64Array): number {
  const known = values.filter((value) => !Number.isNaN(value));
  return known.length === 0 ? 0 : known.reduce((sum, value) => sum + value, 0) / known.length;
}

interface Weighted {
  readonly factors: number;
  readonly rows: number;
  /** Null for every row once. */
  readonly times: Uint16Array | null;
}

interface Estimate {
  readonly variance: number;
  readonly first: readonly number[];
  readonly byDifferences: readonly number[];
  readonly total: readonly number[];
}

function estimate(terms: Float64Array, { factors, rows, times }: Weighted): Estimate {
  const width = headTerms + factorTerms * factors;
  const sums = new Float64Array(width);
  for (let row = 0; row < rows; row++) {
    const weight = times === null ? 1 : (times[row] ?? 0);
    if (weight === 0) continue;
    for (let k = 0; k < width; k++) sums[k] = (sums[k] ?? 0) + weight * (terms[row * width + k] ?? 0);
  }
  const [sum1 = 0, sum2 = 0, products = 0] = sums;
  const values = 2 * rows;
  const variance = products / values - (sum1 / values) * (sum2 / values);
  const term = (i: number, k: number): number => (sums[headTerms + factorTerms * i + k] ?? 0) / rows / variance;
  const each = (of: (i: number) => number): number[] => Array.from({ length: factors }, (_, i) => of(i));
  return {
    variance,
    first: each((i) => term(i, 0)),
    byDifferences: each((i) => 1 - term(i, 1) / 2),
    total: each((i) => term(i, 2) / 2),
  };
}
