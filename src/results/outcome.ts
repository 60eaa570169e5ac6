// Chances of having fallen below a threshold: by each year, ever, and at the end.
import type { OutcomeRule } from '../model/model.ts';
import type { Chance, OutcomeResult } from './results.ts';
import type { Falls } from './reduction/falls.ts';
import { simultaneousHalfWidth, wilson } from './wilson.ts';

export interface OutcomeRequest {
  readonly rule: OutcomeRule;
  readonly falls: Falls;
  /** Finished runs. */
  readonly runs: number;
  readonly firstYear: number;
}

/** Over counts 1 to the last; the start is count 0 and has no part in it. Below is strict. */
export function summariseOutcome({ rule, falls, runs, firstYear }: OutcomeRequest): OutcomeResult {
  const band = simultaneousHalfWidth(runs);
  let fallen = 0;
  const byYear = Array.from(falls.firstAt.subarray(1), (first, t) => {
    fallen += first;
    const everBelow = fallen / runs;
    return {
      year: firstYear + t,
      everBelow,
      lower: Math.max(0, everBelow - band),
      upper: Math.min(1, everBelow + band),
      below: (falls.belowAt[t + 1] ?? 0) / runs,
    };
  });
  const { name, definition } = rule;
  const atEnd = chance(falls.belowAt.at(-1) ?? 0, runs);
  return { name, definition, below: rule.below, ever: chance(fallen, runs), atEnd, byYear };
}

function chance(hits: number, runs: number): Chance {
  return { probability: hits / runs, interval: wilson(hits, runs), intervalFromUnknown: null };
}
