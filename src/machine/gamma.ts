// The gamma function and its incomplete form, from pinned exp and log: the same bits on every machine.
import { exp, log } from './pinned.ts';

const halfLogTwoPi = 0.9189385332046727;
/** Coefficients of Stirling's series, B_2k / (2k (2k − 1)). */
const stirling = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156];
/** From here on the series is exact to the last digits. */
const seriesFrom = 10;

/** ln Γ(x) for x > 0: Stirling's series at x + n ≥ 10, less ln x(x + 1)…(x + n − 1). Error about 1e-14. */
export function logGamma(x: number): number {
  if (!(x > 0)) throw new RangeError(`ln Γ is asked for ${x}.`);
  let [shifted, product] = [x, 1];
  while (shifted < seriesFrom) product *= shifted++;
  let power = shifted;
  let sum = (shifted - 0.5) * log(shifted) - shifted + halfLogTwoPi;
  for (const coefficient of stirling) {
    sum += coefficient / power;
    power *= shifted * shifted;
  }
  return product === 1 ? sum : sum - log(product);
}

/** B_2k / (2k), with which Stirling's series for the derivative of ln Γ goes on. */
const digammaSeries = [1 / 12, -1 / 120, 1 / 252, -1 / 240, 1 / 132, -691 / 32760, 1 / 12];

/** ψ(x) = d ln Γ(x) / dx for x > 0: ln x − 1/(2x) − Σ B_2k / (2k x^2k) at x + n ≥ 10, less Σ 1/(x + i). Error about 1e-14. */
export function digamma(x: number): number {
  if (!(x > 0)) throw new RangeError(`ψ is asked for ${x}.`);
  let shifted = x;
  let less = 0;
  while (shifted < seriesFrom) less += 1 / shifted++;
  let power = shifted * shifted;
  let sum = log(shifted) - 1 / (2 * shifted);
  for (const coefficient of digammaSeries) {
    sum -= coefficient / power;
    power *= shifted * shifted;
  }
  return sum - less;
}

const longest = 10_000;

/**
 * Q(a, x) = Γ(a, x) / Γ(a) for a > 0, x ≥ 0: the chance that a gamma variable of shape a exceeds x. By the series of 1 − Q
 * below a + 1, by the continued fraction (modified Lentz) above. Absolute error about 1e-14.
 */
export function upperGammaShare(a: number, x: number): number {
  if (x <= 0) return 1;
  if (x === Infinity) return 0;
  const front = exp(a * log(x) - x - logGamma(a));
  return x < a + 1 ? 1 - front * lowerSeries(a, x) : front * upperFraction(a, x);
}

function lowerSeries(a: number, x: number): number {
  let term = 1 / a;
  let sum = term;
  for (let k = 1; k < longest && term > 1e-17 * sum; k++) {
    term *= x / (a + k);
    sum += term;
  }
  return sum;
}

function upperFraction(a: number, x: number): number {
  let b = x + 1 - a;
  let c = 1e300;
  let d = 1 / b;
  let fraction = d;
  for (let k = 1; k < longest; k++) {
    const numerator = -k * (k - a);
    b += 2;
    d = 1 / notZero(numerator * d + b);
    c = notZero(b + numerator / c);
    const step = c * d;
    fraction *= step;
    if (Math.abs(step - 1) < 1e-16) break;
  }
  return fraction;
}

function notZero(x: number): number {
  return Math.abs(x) < 1e-300 ? 1e-300 : x;
}
