// What a run says of the windows of criterion E, in words that no one can take for a listing.
import type { CriterionE, CriterionWindow, RunResults } from '../results/results.ts';
import { decimal, percent } from '../view/number.ts';

export interface CriterionSaid {
  readonly lead: string;
  /** One for each window. */
  readonly windows: readonly string[];
  readonly caution: string;
}

export function criterionSaid({ outcome, generationLength, windows }: CriterionE): CriterionSaid {
  return {
    lead: `Windows of criterion E of the IUCN Red List (2012), for “${outcome}” and a generation of ${decimal(generationLength)} years:`,
    windows: windows.map(windowWords),
    caution:
      'Whether the model meets what the guidelines ask of such an analysis, and what a species is listed as, is for assessors to say.',
  };
}

/** Of plans beside others that have windows; nothing where each has. */
export function withoutWindows(names: readonly string[]): string {
  if (names.length === 0) return '';
  return `Without a single generation length there are no windows: ${names.map((name) => `“${name}”`).join(', ')}.`;
}

/** Line by line, for a terminal. */
export function criterionWords({ criterionE }: Pick<RunResults, 'criterionE'>): readonly string[] {
  if (criterionE === undefined) return [];
  const { lead, windows, caution } = criterionSaid(criterionE);
  return [lead, ...windows.map((words) => `- ${words}`), caution];
}

function windowWords({ category, years, chance, found, says }: CriterionWindow): string {
  const threshold = `the threshold of ${category} (at least ${percent(chance)} within ${years} years)`;
  if (found === null) return `this run looks less far ahead than ${threshold}`;
  const range = `${percent(found.probability)} within ${years} years (band ${percent(found.lower)} to ${percent(found.upper)})`;
  return says === 'undecided' ? `${range}: undecided beside ${threshold}` : `${range}: ${says} ${threshold}`;
}
