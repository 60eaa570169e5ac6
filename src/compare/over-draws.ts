// Differences where what is not known is drawn. The draw is the unit: all its runs share its values, under every plan.
import type { Interval } from '../results/results.ts';
import { middleOfDraws, ofDraws } from '../results/draws/intervals.ts';
import { meanDifference, meanOf, varianceOf } from './paired-mean.ts';
import { futuresOf, pairedShareDifference, type Estimate, type PairedCounts } from './paired-share.ts';

/**
 * Under common chance most of the spread of differences can be that of the runs. Taken out as it stands, it left intervals
 * that held 80 to 90 of 100 times; with the spread 1.25 standard errors above what was seen, they hold 93 to 96.
 */
const spreadAbove = 1.25;

export const overDrawsMethod = "paired differences with the draw as their unit, Student's t";

/**
 * Mean over draws of the difference between two shares, and how far it can be off from the number of draws and runs. A draw
 * of which no future came to its end says nothing.
 */
export function shareDifferenceFromRuns(draws: readonly PairedCounts[]): Estimate {
  const known = draws.filter((draw) => futuresOf(draw) > 0);
  const found = meanDifference(Float64Array.from(known, differenceOf));
  if (found.lower < found.upper && Number.isFinite(found.lower)) return found;
  // Draws that are all alike say little more than that many draws are.
  const { lower, upper } = pairedShareDifference({ both: 0, onlyFrom: 0, onlyTo: 0, neither: known.length });
  return { ...found, lower: Math.max(-1, found.estimate + lower), upper: Math.min(1, found.estimate + upper) };
}

/** Mean over draws of a difference of means; each draw gives the differences of its runs. */
export function meanDifferenceFromRuns(draws: readonly Float64Array[]): Estimate {
  const known = draws.filter((draw) => draw.length > 0);
  return meanDifference(Float64Array.from(known, meanOf));
}

/** Between which a further draw would put the difference with 95 %. Null for fewer than two draws. */
export function shareDifferenceFromUnknown(draws: readonly PairedCounts[]): Interval | null {
  const known = draws.filter((draw) => futuresOf(draw) > 1);
  const middle = middleOfDraws(known.map(differenceOf), known.map(noiseOf), spreadAbove);
  return middle === null ? null : { ...middle, ...ofDraws(known.length) };
}

/** The same of a mean. */
export function meanDifferenceFromUnknown(draws: readonly Float64Array[]): Interval | null {
  const known = draws.filter((draw) => draw.length > 1);
  const means = known.map((draw) => meanOf(draw));
  const middle = middleOfDraws(
    means,
    known.map((draw) => varianceOf(draw) / draw.length),
    spreadAbove,
  );
  return middle === null ? null : { ...middle, ...ofDraws(known.length) };
}

function differenceOf(counts: PairedCounts): number {
  return (counts.onlyTo - counts.onlyFrom) / futuresOf(counts);
}

/** Variance of the difference of one draw from its number of runs. */
function noiseOf(counts: PairedCounts): number {
  const n = futuresOf(counts);
  const difference = differenceOf(counts);
  return ((counts.onlyFrom + counts.onlyTo) / n - difference * difference) / (n - 1);
}
