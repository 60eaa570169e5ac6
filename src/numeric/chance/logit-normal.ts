// The logit-normal distribution 1 / (1 + exp(−μ − σ z)) with a given mean and standard deviation.
import { exp, log } from '../../machine/pinned.ts';
import { findRoot } from '../root.ts';

export interface LogitNormal {
  readonly mu: number;
  readonly sigma: number;
}

export interface MeanAndSd {
  readonly mean: number;
  readonly sd: number;
}

/** Beyond this σ nearly everything lies at 0 and 1. */
const widest = 60;

/** Mean and SD by the trapezoidal rule over the normal curve, which is exact to about 1e-13 at these steps. */
export function logitNormalMoments({ mu, sigma }: LogitNormal): MeanAndSd {
  const step = Math.min(0.25, 0.5 / Math.max(sigma, 1e-9));
  const nodes = Math.ceil(9 / step);
  let [weights, sum, squares] = [0, 0, 0];
  for (let i = -nodes; i <= nodes; i++) {
    const z = i * step;
    const weight = exp((-z * z) / 2);
    const x = 1 / (1 + exp(-mu - sigma * z));
    weights += weight;
    sum += weight * x;
    squares += weight * x * x;
  }
  const mean = sum / weights;
  return { mean, sd: Math.sqrt(Math.max(0, squares / weights - mean * mean)) };
}

/** Null where no such distribution has this mean and SD (to within σ of 60). */
export function logitNormalOf({ mean, sd }: MeanAndSd): LogitNormal | null {
  if (!(mean > 0 && mean < 1 && sd > 0 && sd * sd < mean * (1 - mean))) return null;
  const muFor = (sigma: number): number => {
    const centre = log(mean / (1 - mean));
    const reach = 2 + sigma * sigma + Math.abs(centre) * (1 + sigma);
    const range = { low: centre - reach, high: centre + reach };
    return findRoot((mu) => logitNormalMoments({ mu, sigma }).mean - mean, range) ?? NaN;
  };
  const sigma = findRoot((s) => logitNormalMoments({ mu: muFor(s), sigma: s }).sd - sd, { low: 1e-9, high: widest });
  return sigma === null ? null : { mu: muFor(sigma), sigma };
}
