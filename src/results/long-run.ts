// Growth in the long run: near zero, where years differ by chance, beside the growth of an average year.
import { stretch, yearsThatPay, type LongRun, type LongRunRequest } from '../kernel/long-run.ts';
import { pinned } from '../machine/pinned.ts';
import { seedOf } from '../machine/random.ts';
import { keyOfName } from '../compile/image/keys.ts';
import type { Model } from '../model/model.ts';
import type { LongRunGrowth } from './results.ts';

const ofSeed = keyOfName('growth in the long run');
const settling = 200;

/** Whether years differ by chance at all. */
export function yearsDiffer({ variation, catastrophes }: Model): boolean {
  return variation !== null || catastrophes.length > 0;
}

/** As many years as pay, by the size of the model alone. */
export function longRunRequest({ seed, phases }: Model, image: ArrayBuffer): LongRunRequest {
  const years = yearsThatPay(image, { phases: phases.length, settling });
  return { settling, years, seed: seedOf({ seed, words: [0, 0, ofSeed] }) };
}

/**
 * From several independent courses: their mean, its standard error from how far they lie apart, and the variance that a year
 * adds in the long run, from how far sums over stretches of years lie apart. Null where some year left nobody.
 */
export function longRunGrowth({ courses, stretches }: LongRun, years: number): LongRunGrowth | null {
  const n = courses.length;
  const mean = courses.reduce((a, b) => a + b, 0) / n;
  if (!Number.isFinite(mean)) return null;
  return {
    growthRate: pinned.exp(mean),
    logGrowth: mean,
    standardError: Math.sqrt(varianceOf(courses) / n),
    yearlyVariance: varianceOf(stretches) / stretch,
    years: years * n,
  };
}

function varianceOf(values: Float64Array): number {
  const mean = values.reduce((a, b) => a + b, 0) / values.length;
  return values.reduce((sum, one) => sum + (one - mean) * (one - mean), 0) / (values.length - 1);
}
