// What a measure came to at the points of a sweep. Where it is from runs, each point was run in two halves of its replicates:
// chance is independent between halves, so that a product of one half with the other holds no noise on average.

export interface Observed {
  /** One a point; NaN where the point failed. */
  readonly first: Float64Array;
  /** The same array where there is no chance. */
  readonly second: Float64Array;
}

/** Mean of the two halves. */
export function wholeAt({ first, second }: Observed, point: number): number {
  return ((first[point] ?? NaN) + (second[point] ?? NaN)) / 2;
}

export function hasNoise({ first, second }: Observed): boolean {
  return first !== second;
}

/** Of the variance over the points, what comes from the number of replicates: 1 − covariance of the halves / variance of their mean. */
export function noiseShare(observed: Observed): number {
  if (!hasNoise(observed)) return 0;
  const { first, second } = observed;
  const whole = first.map((_, i) => wholeAt(observed, i));
  const spread = covariance(whole, whole);
  return spread > 0 ? Math.min(1, Math.max(0, 1 - covariance(first, second) / spread)) : 0;
}

/** Over the points where both are known. */
export function covariance(a: Float64Array, b: Float64Array): number {
  let [n, meanA, meanB, sum] = [0, 0, 0, 0];
  for (let i = 0; i < a.length; i++) {
    const [x, y] = [a[i] ?? NaN, b[i] ?? NaN];
    if (Number.isNaN(x) || Number.isNaN(y)) continue;
    n++;
    const off = x - meanA;
    meanA += off / n;
    meanB += (y - meanB) / n;
    sum += off * (y - meanB);
  }
  return n < 2 ? 0 : sum / (n - 1);
}
