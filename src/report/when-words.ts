// When an outcome comes first, in a sentence.
import type { OutcomeResult } from '../results/results.ts';
import { decimal } from '../view/number.ts';

/** Without a full stop; null where no future comes to it. */
export function whenWords({ whenFirst: { quantiles, meanYears } }: OutcomeResult, end: number): string | null {
  if (meanYears === null) return null;
  const [early, half] = [quantiles['0.05'], quantiles['0.5']];
  const twentieth = early === null ? '' : `a twentieth of the futures have come to it by ${early}, `;
  const middle = half === null ? `fewer than half by ${end}` : `half by ${half}`;
  return `${twentieth}${middle}; those that do come to it after ${decimal(meanYears)} years in the mean`;
}
