// Chances of having fallen below a threshold: by each year, ever, and at the end.
import type { OutcomeRule } from '../model/model.ts';
import type { Chance, OutcomeResult } from './results.ts';
import type { FinishedRuns } from './runs.ts';
import { simultaneousHalfWidth, wilson } from './wilson.ts';

export interface OutcomeRequest {
  readonly rule: OutcomeRule;
  readonly column: number;
  readonly firstYear: number;
}

/** Over counts 1 to the last; the start is count 0 and has no part in it. Below is strict. */
export function summariseOutcome(finished: FinishedRuns, { rule, column, firstYear }: OutcomeRequest): OutcomeResult {
  const { runs, steps } = finished;
  const fallen = new Uint8Array(runs);
  const band = simultaneousHalfWidth(runs);
  let below = 0;
  const byYear = Array.from({ length: steps }, (_, t) => {
    below = 0;
    finished.at(t + 1, column).forEach((animals, r) => {
      if (animals < rule.below) {
        fallen[r] = 1;
        below++;
      }
    });
    const everBelow = fallen.reduce((sum, one) => sum + one, 0) / runs;
    return {
      year: firstYear + t,
      everBelow,
      lower: Math.max(0, everBelow - band),
      upper: Math.min(1, everBelow + band),
      below: below / runs,
    };
  });
  const ever = fallen.reduce((sum, one) => sum + one, 0);
  const { name, definition } = rule;
  return { name, definition, below: rule.below, ever: chance(ever, runs), atEnd: chance(below, runs), byYear };
}

function chance(hits: number, runs: number): Chance {
  return { probability: hits / runs, interval: wilson(hits, runs), intervalFromUnknown: null };
}
