// The value of a power series from its first terms, also where they grow: by Wynn's epsilon algorithm (1956, from memory).

export interface SeriesValue {
  readonly value: number;
  /** How far it is from the value with two terms less. */
  readonly change: number;
}

/** Σ terms[k] x^k, summed as a quotient of polynomials: exact where few poles make the series. Needs at least four terms. */
export function seriesValue(terms: readonly number[], x: number): SeriesValue {
  const sums: number[] = [];
  let [sum, power] = [0, 1];
  for (const term of terms) {
    sums.push((sum += term * power));
    power *= x;
  }
  const value = accelerated(sums);
  return { value, change: Math.abs(value - accelerated(sums.slice(0, -2))) };
}

/** Falls back to the last sum where two neighbours agree to the last bit. */
function accelerated(sums: readonly number[]): number {
  let before = sums.map(() => 0);
  let here = [...sums];
  let best = sums.at(-1) ?? 0;
  for (let column = 1; here.length > 1; column++) {
    const next: number[] = [];
    for (let i = 0; i + 1 < here.length; i++) {
      const gap = (here[i + 1] ?? 0) - (here[i] ?? 0);
      if (gap === 0 || !Number.isFinite(1 / gap)) return here[i + 1] ?? best;
      next.push((before[i + 1] ?? 0) + 1 / gap);
    }
    [before, here] = [here, next];
    if (column % 2 === 0) best = here.at(-1) ?? best;
  }
  return Number.isFinite(best) ? best : (sums.at(-1) ?? 0);
}
