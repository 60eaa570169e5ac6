// The mean lowest count in words, with how far chance alone may have moved it.
import type { RunResults } from '../results/results.ts';
import { whole } from '../view/number.ts';

/** A single run has no spread, so nothing is said of it. */
export function lowestWords({ meanLowestCount: { mean, standardError } }: RunResults, animals: string): string {
  const sure = Number.isFinite(standardError)
    ? `, give or take ${whole(1.96 * standardError)} from the number of runs`
    : '';
  return `${whole(mean)} ${animals}${sure}`;
}
