// The distribution of a parameter that is not exactly known.
import { normalBelow } from '../../numeric/normal.ts';
import { exp } from '../../machine/pinned.ts';
import { logitNormalMoments } from '../../numeric/chance/logit-normal.ts';
import { findRoot } from '../../numeric/root.ts';
import { distributionOf, largestSd, numberAt, type Distribution } from '../variation/distribution.ts';
import { z975 } from '../../numeric/normal-quantile.ts';

export type UncertainDistribution =
  | Distribution
  | { readonly shape: 'normal'; readonly mean: number; readonly sd: number }
  | { readonly shape: 'uniform'; readonly low: number; readonly high: number }
  | { readonly shape: 'triangular'; readonly low: number; readonly mode: number; readonly high: number };

export type NumberKind = 'share' | 'positive number' | 'number';

export interface Estimate {
  readonly value: number;
  readonly kind: NumberKind;
}

/** With the value as its mean; null where there is none. */
export function fromStandardError({ value, kind }: Estimate, error: number): UncertainDistribution | null {
  if (kind === 'number') return { shape: 'normal', mean: value, sd: error };
  return distributionOf(kind === 'share' ? 'beta' : 'lognormal', { mean: value, sd: error });
}

/** With the value as its mean and the middle 95 % as wide as the interval; null where there is none. */
export function fromInterval(estimate: Estimate, [low, high]: readonly [number, number]): UncertainDistribution | null {
  const width = high - low;
  if (!(width > 0)) return null;
  if (estimate.kind === 'number') return fromStandardError(estimate, width / (2 * z975));
  const { value, kind } = estimate;
  const most = kind === 'share' ? largestSd(value) * 0.9 : value * 3;
  const miss = (error: number): number => {
    const found = fromStandardError(estimate, error);
    return found === null ? NaN : valueAt(found, z975) - valueAt(found, -z975) - width;
  };
  const error = findRoot(miss, { low: most * 1e-7, high: most }, 1e-10);
  return error === null ? null : fromStandardError(estimate, error);
}

/** The value that belongs to a normal number. */
export function valueAt(distribution: UncertainDistribution, z: number): number {
  switch (distribution.shape) {
    case 'normal':
      return distribution.mean + distribution.sd * z;
    case 'uniform':
      return distribution.low + (distribution.high - distribution.low) * normalBelow(z);
    case 'triangular':
      return triangular(distribution, normalBelow(z));
    default:
      return numberAt(distribution, z);
  }
}

/** In closed form but for the logit-normal. */
export function varianceOf(distribution: UncertainDistribution): number {
  switch (distribution.shape) {
    case 'constant':
      return 0;
    case 'normal':
      return distribution.sd * distribution.sd;
    case 'uniform': {
      const width = distribution.high - distribution.low;
      return (width * width) / 12;
    }
    case 'triangular': {
      const { low, mode, high } = distribution;
      return (low * low + mode * mode + high * high - low * mode - low * high - mode * high) / 18;
    }
    case 'beta': {
      const { a, b } = distribution;
      return (a * b) / ((a + b) * (a + b) * (a + b + 1));
    }
    case 'gamma':
      return distribution.k * distribution.scale * distribution.scale;
    case 'lognormal': {
      const { mu, sigma } = distribution;
      return (exp(sigma * sigma) - 1) * exp(2 * mu + sigma * sigma);
    }
    case 'logit-normal': {
      const { sd } = logitNormalMoments(distribution);
      return sd * sd;
    }
  }
}

function triangular(
  { low, mode, high }: { readonly low: number; readonly mode: number; readonly high: number },
  share: number,
): number {
  const width = high - low;
  const atMode = (mode - low) / width;
  return share < atMode
    ? low + Math.sqrt(share * width * (mode - low))
    : high - Math.sqrt((1 - share) * width * (high - mode));
}
