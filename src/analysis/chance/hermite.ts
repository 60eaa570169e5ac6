// A number that is a function of a normal number, as a series: what its covariance with others needs.
import { exp } from '../../machine/pinned.ts';

/** Terms of the series. The rest of the variance is below a millionth for all shapes whose SD is less than their mean. */
export const terms = 16;

/**
 * a_n = E[f(Z) He_n(Z)] / √n! for n = 1 … 16 at place n − 1, with Z standard normal, by the trapezoidal rule. Over two numbers whose
 * normals have the correlation r, Cov = Σ a_n b_n rⁿ (Mehler 1866, from memory).
 */
export function hermiteSeries(at: (z: number) => number): Float64Array {
  const series = new Float64Array(terms);
  const middle = at(0);
  let weights = 0;
  for (let i = -288; i <= 288; i++) {
    const z = i / 32;
    const weight = exp((-z * z) / 2);
    const value = weight * (at(z) - middle);
    weights += weight;
    let [before, here] = [0, 1];
    for (let n = 1; n <= terms; n++) {
      const next = (z * here - Math.sqrt(n - 1) * before) / Math.sqrt(n);
      [before, here] = [here, next];
      series[n - 1] = (series[n - 1] ?? 0) + value * here;
    }
  }
  return series.map((sum) => sum / weights);
}

/** Σ a_n b_n rⁿ. */
export function covarianceOf(a: Float64Array, b: Float64Array, correlation: number): number {
  let [sum, power] = [0, 1];
  for (let n = 0; n < a.length && power !== 0; n++) {
    power *= correlation;
    sum += (a[n] ?? 0) * (b[n] ?? 0) * power;
  }
  return sum;
}

/** Scaled to a variance that is known better than its series. */
export function withVariance(series: Float64Array, variance: number): Float64Array {
  const own = covarianceOf(series, series, 1);
  return own > 0 ? series.map((term) => term * Math.sqrt(variance / own)) : series;
}
