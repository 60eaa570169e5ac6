// Chances by splitting, in words: so rare that 'one in so many futures' says more than a percentage.
import type { RareResult, RunResults } from '../results/results.ts';
import { percent, plain } from '../view/number.ts';

/** A sentence or two for each outcome; none where it was not asked for. */
export function rareWords({ rare, years }: Pick<RunResults, 'rare' | 'years'>): readonly string[] {
  return (rare ?? []).map((one) => `${one.outcome}, by splitting: ${ofOne(one, years)}`);
}

function ofOne({ reason, probability, interval, ...one }: RareResult, years: number): string {
  if (probability === null || interval === null) return `no estimate, since ${reason ?? ''}.`;
  const { levels, repeats, trials, replicateYears, standardError } = one;
  const relative = (standardError ?? 0) / probability;
  // Plain runs know a chance p from n runs to √((1 − p) / (n p)) of itself.
  const plainRuns = (1 - probability) / (probability * relative * relative);
  const passed = levels
    .map(({ below, above, passed: share }) => `${level(below ?? above ?? 0)} (${percent(share)})`)
    .join(', ');
  return `${oneIn(probability)} ever comes to it (95 % ${range(interval)}, from the number of runs, ${interval.method}). Levels, and the share that passed each: ${passed}. It took ${repeats} repeats of ${plain(trials)} replicates a level, ${plain(replicateYears / years)} whole futures in all; plain runs as exact would be about ${plain(plainRuns)}.`;
}

function level(count: number): string {
  return String(Number(count.toPrecision(6)));
}

function range({ lower, upper }: { readonly lower: number; readonly upper: number }): string {
  return lower === 0 ? `at most ${oneIn(upper)}` : `${oneIn(lower)} to ${oneIn(upper)}`;
}

function oneIn(chance: number): string {
  if (chance > 0.05) return `${percent(chance)} of futures`;
  const many = 1 / chance;
  return `1 future in ${plain(many < 100 ? Math.round(many) : Number(many.toPrecision(3)))}`;
}
