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

interface Curve {
  readonly step: number;
  /** The normal curve at -nodes * step, …, nodes * step, not scaled. */
  readonly weights: Float64Array;
}

let lastCurve: Curve = { step: 0, weights: new Float64Array(0) };

/** The last one is kept: those who look for a mean ask for the same again and again. */
function curveOf(step: number): Curve {
  if (lastCurve.step === step) return lastCurve;
  const nodes = Math.ceil(9 / step);
  const weights = Float64Array.from({ length: 2 * nodes + 1 }, (_, k) => {
    const z = (k - nodes) * step;
    return exp((-z * z) / 2);
  });
  return (lastCurve = { step, weights });
}

/** Mean and SD by the trapezoidal rule over the normal curve, which is exact to about 1e-13 at these steps. */
export function logitNormalMoments({ mu, sigma }: LogitNormal): MeanAndSd {
  const step = Math.min(0.25, 0.5 / Math.max(sigma, 1e-9));
  const curve = curveOf(step).weights;
  const nodes = (curve.length - 1) / 2;
  let [weights, sum, squares] = [0, 0, 0];
  curve.forEach((weight, k) => {
    const x = 1 / (1 + exp(-mu - sigma * ((k - nodes) * step)));
    weights += weight;
    sum += weight * x;
    squares += weight * x * x;
  });
  const mean = sum / weights;
  return { mean, sd: Math.sqrt(Math.max(0, squares / weights - mean * mean)) };
}

/** What was found, by mean and SD: patches and stages of the work ask for the same numbers, and each takes a long search. */
const known = new Map<string, LogitNormal | null>();
const mostKnown = 10_000;

/** Null where no such distribution has this mean and SD (to within σ of 60). */
export function logitNormalOf(wanted: MeanAndSd): LogitNormal | null {
  const key = `${wanted.mean} ${wanted.sd}`;
  const before = known.get(key);
  if (before !== undefined) return before;
  const found = search(wanted);
  if (known.size >= mostKnown) known.clear();
  known.set(key, found);
  return found;
}

function search({ mean, sd }: MeanAndSd): LogitNormal | null {
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
