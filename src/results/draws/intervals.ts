// Intervals over draws. The draw is the unit: runs of one draw share its values, so that they are no independent evidence of
// what is not known.
import type { FromUnknown, Interval } from '../results.ts';
import { wilson } from '../wilson.ts';

/** Of fewer draws the middle 95 % cannot be told from all of them: each end leaves out one in forty. */
export const enoughDraws = 39;

export interface Drawn {
  readonly draws: number;
  /** Whether any number that is not exactly known enters what was run. */
  readonly enters: boolean;
}

/** What may be told of an interval over draws, or why nothing of it. */
export function fromUnknown(interval: Interval | null, { draws, enters }: Drawn): FromUnknown {
  if (draws > 1 && !enters) return { intervalFromUnknown: null, noUnknown: 'nothing unknown' };
  if (draws < enoughDraws) return { intervalFromUnknown: null, noUnknown: 'too few draws' };
  if (interval === null || !(interval.lower < interval.upper))
    return { intervalFromUnknown: null, noUnknown: 'within the noise' };
  return { intervalFromUnknown: interval };
}

/** Hits and finished runs of one draw. */
export interface DrawCount {
  readonly hits: number;
  readonly runs: number;
}

/**
 * The middle 95 % of the chances of the draws. Each chance is known from a number of runs only: the part of the spread that
 * comes from that, mean p(1 − p)/(n − 1), is taken out by drawing all towards their mean. Ends are order statistics at
 * 0.025 (D + 1) and 0.975 (D + 1), between which a further draw falls with 95 %.
 */
export function intervalFromUnknown(draws: readonly DrawCount[]): Interval | null {
  const known = draws.filter(({ runs }) => runs > 1);
  const chances = known.map(({ hits, runs }) => hits / runs);
  const noises = known.map(({ runs }, i) => ((chances[i] ?? 0) * (1 - (chances[i] ?? 0))) / (runs - 1));
  const middle = middleOfDraws(chances, noises);
  if (middle === null) return null;
  return { lower: Math.max(0, middle.lower), upper: Math.min(1, middle.upper), ...ofDraws(known.length) };
}

/** The words of an interval over draws. */
export function ofDraws(draws: number): Pick<Interval, 'level' | 'method' | 'from'> {
  return {
    level: 0.95,
    method: `middle of ${draws} draws, without the part of their spread that comes from the number of runs`,
    from: 'what is not known',
  };
}

/**
 * The middle 95 % of numbers that each draw knows from a number of runs only: with the variance that this alone gives each
 * (`noises`), all are drawn towards their mean until that part of their spread is gone. So many draws know their spread only
 * so well: `above` takes it so many of its standard errors above what was seen, never wider than that. Null for fewer than two.
 */
export function middleOfDraws(
  values: readonly number[],
  noises: readonly number[],
  above = 0,
): { readonly lower: number; readonly upper: number } | null {
  if (values.length < 2) return null;
  const mean = average(values);
  const spread = values.reduce((sum, p) => sum + (p - mean) * (p - mean), 0) / (values.length - 1);
  const wide = spread * (1 + above * Math.sqrt(2 / (values.length - 1)));
  const kept = spread > 0 ? Math.sqrt(Math.min(1, Math.max(0, wide - average(noises)) / spread)) : 0;
  const sorted = values.map((p) => mean + kept * (p - mean)).sort((a, b) => a - b);
  return { lower: ranked(sorted, 0.025), upper: ranked(sorted, 0.975) };
}

/** Between the order statistics around share · (n + 1). */
function ranked(sorted: readonly number[], share: number): number {
  const place = Math.max(0, Math.min(sorted.length - 1, share * (sorted.length + 1) - 1));
  const below = Math.floor(place);
  const [low = 0, high = low] = [sorted[below], sorted[below + 1]];
  return low + (place - below) * (high - low);
}

function average(values: readonly number[]): number {
  return values.reduce((a, b) => a + b, 0) / values.length;
}

export const resamples = 2000;

/** How often each of the draws comes when they are drawn again with replacement; the same for every b and number. */
export function resampled(draws: number, b: number): Float64Array {
  const weights = new Float64Array(draws);
  // Scrambled, so that one resampling is not the other moved on by a place.
  let state = scrambled(Math.imul(b + 1, 0x85ebca77));
  for (let i = 0; i < draws; i++) {
    state = (state + 0x9e3779b9) | 0;
    const chosen = Math.floor((scrambled(state) / 4294967296) * draws);
    weights[chosen] = (weights[chosen] ?? 0) + 1;
  }
  return weights;
}

/** The 32-bit finaliser of MurmurHash3. */
function scrambled(x: number): number {
  const once = Math.imul(x ^ (x >>> 16), 0x85ebca6b);
  const twice = Math.imul(once ^ (once >>> 13), 0xc2b2ae35);
  return (twice ^ (twice >>> 16)) >>> 0;
}

/** How far the mean chance over draws can be off because of the number of draws and runs: bootstrap over whole draws. */
export function intervalFromRuns(draws: readonly DrawCount[]): Interval {
  const hits = draws.reduce((sum, one) => sum + one.hits, 0);
  const runs = draws.reduce((sum, one) => sum + one.runs, 0);
  if (hits === 0 || hits === runs) {
    const { lower, upper } = wilson(hits === 0 ? 0 : draws.length, draws.length);
    return { lower, upper, level: 0.95, method: 'Wilson 1927, with the draw as its unit', from: 'the number of runs' };
  }
  const means = Array.from({ length: resamples }, (_, b) => {
    const weights = resampled(draws.length, b);
    let [sum, all] = [0, 0];
    draws.forEach((one, i) => {
      sum += one.hits * (weights[i] ?? 0);
      all += one.runs * (weights[i] ?? 0);
    });
    return sum / all;
  }).sort((a, b) => a - b);
  const method = `bootstrap over ${draws.length} draws`;
  return { lower: ranked(means, 0.025), upper: ranked(means, 0.975), level: 0.95, method, from: 'the number of runs' };
}

/** Half-width of a band that holds a whole curve at once with 95 %: the largest distance of resampled curves from it. */
export function bandOverDraws(curves: readonly Float64Array[]): number {
  const length = curves[0]?.length ?? 0;
  const whole = meanCurve(curves, new Float64Array(curves.length).fill(1), length);
  const largest = Array.from({ length: 500 }, (_, b) => {
    const curve = meanCurve(curves, resampled(curves.length, b), length);
    return curve.reduce((most, value, t) => Math.max(most, Math.abs(value - (whole[t] ?? 0))), 0);
  }).sort((a, b) => a - b);
  return ranked(largest, 0.95);
}

function meanCurve(curves: readonly Float64Array[], weights: Float64Array, length: number): Float64Array {
  const sum = new Float64Array(length);
  const all = weights.reduce((a, b) => a + b, 0);
  curves.forEach((curve, i) => {
    const weight = (weights[i] ?? 0) / all;
    if (weight > 0) curve.forEach((value, t) => (sum[t] = (sum[t] ?? 0) + weight * value));
  });
  return sum;
}
