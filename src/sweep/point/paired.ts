// Plans against each other at one point, in the same futures: by what a comparison tells them apart.
import { excludesZero } from '../../compare/difference.ts';
import { meanDifference, meanOf, varianceOf } from '../../compare/paired-mean.ts';
import { countPairs, pairedShareDifference, type Estimate } from '../../compare/paired-share.ts';
import type { Quantity } from '../measures.ts';

/** A quantity under one plan. */
export interface Futures {
  /** By future; NaN for those that were stopped. */
  readonly values: Float64Array;
  /** Over its own finished futures. */
  readonly mean: number;
}

/** In the order of `pairColumnsOf`: difference, standard error, ends of the 95 % interval; NaN where no future ended under both. */
export function pairedNumbers(quantity: Quantity, from: Futures, to: Futures): readonly number[] {
  const differences = differencesOf(from, to);
  if (differences.length === 0) return [NaN, NaN, NaN, NaN];
  const mean = meanOf(differences);
  const n = differences.length;
  const variance = varianceOf(differences, mean);
  // Of shares as of each share by itself, with n; of means as their interval has it.
  const spread = quantity.outcome === undefined ? variance : (variance * (n - 1)) / n;
  const { lower, upper } = pairedInterval(quantity, from, to);
  return [mean, Math.sqrt(spread / n), lower, upper];
}

/** By plan 1 where it is the best one or cannot be told from it, else 0; NaN where no future ended. The first of equals is the best. */
export function perhapsBest(quantity: Quantity, plans: readonly Futures[]): readonly number[] {
  const sign = quantity.better === 'less' ? 1 : -1;
  const order = plans.filter(({ mean }) => !Number.isNaN(mean)).toSorted((a, b) => sign * (a.mean - b.mean));
  const [best] = order;
  return plans.map((plan) => {
    if (best === undefined || Number.isNaN(plan.mean)) return NaN;
    return plan === best || !excludesZero(pairedInterval(quantity, best, plan)) ? 1 : 0;
  });
}

function pairedInterval(quantity: Quantity, from: Futures, to: Futures): Estimate {
  if (quantity.outcome === undefined) return meanDifference(differencesOf(from, to));
  const hits = ({ values }: Futures): Uint8Array => Uint8Array.from(values, (value) => (value === 1 ? 1 : 0));
  const ended = Uint8Array.from(from.values, (value, i) => (Number.isNaN(value - (to.values[i] ?? NaN)) ? 0 : 1));
  return pairedShareDifference(countPairs(hits(from), hits(to), ended));
}

function differencesOf(from: Futures, to: Futures): Float64Array {
  return to.values.map((value, i) => value - (from.values[i] ?? NaN)).filter((value) => !Number.isNaN(value));
}
