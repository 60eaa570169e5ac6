// The distribution of a number that varies, from its mean and SD, which are matched exactly.
import { log, exp } from '../../machine/pinned.ts';
import { betaOf, betaTails } from '../../numeric/chance/beta.ts';
import { gammaOf, gammaTails } from '../../numeric/chance/gamma.ts';
import { logitNormalOf, type MeanAndSd } from '../../numeric/chance/logit-normal.ts';
import { quantileAt } from '../../numeric/chance/tail.ts';
import type { VariedShape } from './shape.ts';

export type Distribution =
  | { readonly shape: 'constant'; readonly value: number }
  | { readonly shape: 'beta'; readonly a: number; readonly b: number }
  | { readonly shape: 'gamma'; readonly k: number; readonly scale: number }
  | { readonly shape: 'lognormal' | 'logit-normal'; readonly mu: number; readonly sigma: number };

/** Null where no distribution of this shape has this mean and SD. */
export function distributionOf(shape: VariedShape, { mean, sd }: MeanAndSd): Distribution | null {
  if (sd === 0 || mean === 0) return { shape: 'constant', value: mean };
  switch (shape) {
    case 'beta': {
      const found = betaOf(mean, sd);
      return found === null ? null : { shape, ...found };
    }
    case 'logit-normal': {
      const found = logitNormalOf({ mean, sd });
      return found === null ? null : { shape, ...found };
    }
    case 'gamma': {
      if (!(mean > 0)) return null;
      const { shape: k, scale } = gammaOf(mean, sd);
      return { shape, k, scale };
    }
    case 'lognormal': {
      if (!(mean > 0)) return null;
      const variance = log(1 + (sd / mean) * (sd / mean));
      return { shape, mu: log(mean) - variance / 2, sigma: Math.sqrt(variance) };
    }
  }
}

/** The number that belongs to a normal number z. */
export function numberAt(distribution: Distribution, z: number): number {
  switch (distribution.shape) {
    case 'constant':
      return distribution.value;
    case 'lognormal':
      return exp(distribution.mu + distribution.sigma * z);
    case 'logit-normal':
      return 1 / (1 + exp(-distribution.mu - distribution.sigma * z));
    case 'beta': {
      const start = log(distribution.a / distribution.b);
      return 1 / (1 + exp(-quantileAt(betaTails(distribution), z, start).y));
    }
    case 'gamma': {
      const { k, scale } = distribution;
      return exp(quantileAt(gammaTails({ shape: k, scale }), z, log(k * scale)).y);
    }
  }
}

/** The SD that a share with this mean must stay below. */
export function largestSd(mean: number): number {
  return Math.sqrt(Math.max(0, mean * (1 - mean)));
}
