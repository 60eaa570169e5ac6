// Why there is no interval from what is not known, in words.
import { enoughDraws } from '../results/draws/intervals.ts';
import type { NoUnknown } from '../results/results.ts';

const meanings: Readonly<Record<NoUnknown, string>> = {
  'too few draws': `from ${enoughDraws} draws of what is not known on there is an interval from it`,
  'nothing unknown': 'no number that is not exactly known enters there',
  'within the noise': 'the draws differ by no more than their numbers of runs explain',
};

/** What the reasons that were told stand for, in the order of their list; empty for none. */
export function meaningsOf(told: readonly (NoUnknown | undefined)[]): string {
  const words = Object.entries(meanings).flatMap(([reason, meaning]) =>
    told.some((one) => one === reason) ? [`${reason}: ${meaning}`] : [],
  );
  return words.length === 0 ? '' : `${words.join('; ')}.`;
}
