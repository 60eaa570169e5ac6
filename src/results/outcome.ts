// Chances that an outcome has come by each year, ever, and that it is so at the end; and when it comes.
import type { OutcomeRule } from '../model/model.ts';
import type { Chance, OutcomeResult, WhenFirst } from './results.ts';
import type { Hits } from './reduction/hits.ts';
import { simultaneousHalfWidth, wilson } from './wilson.ts';

export interface OutcomeRequest {
  readonly rule: OutcomeRule;
  readonly hits: Hits;
  /** Finished runs. */
  readonly runs: number;
  readonly firstYear: number;
}

/** Over counts 1 to the last; the start is count 0 and has no part in it. */
export function summariseOutcome({ rule, hits, runs, firstYear }: OutcomeRequest): OutcomeResult {
  const band = simultaneousHalfWidth(runs);
  let come = 0;
  const byYear = Array.from(hits.firstAt.subarray(1), (first, t) => {
    come += first;
    const ever = come / runs;
    return {
      year: firstYear + t,
      ever,
      lower: Math.max(0, ever - band),
      upper: Math.min(1, ever + band),
      now: (hits.nowAt[t + 1] ?? 0) / runs,
    };
  });
  const { name, definition, event, counts, words } = rule;
  return {
    name,
    definition,
    event,
    counts,
    words,
    ever: chance(come, runs),
    atEnd: chance(hits.nowAt.at(-1) ?? 0, runs),
    whenFirst: whenFirst(hits.firstAt, runs, firstYear),
    byYear,
  };
}

function chance(hits: number, runs: number): Chance {
  return { probability: hits / runs, interval: wilson(hits, runs), intervalFromUnknown: null };
}

function whenFirst(firstAt: Uint32Array, runs: number, firstYear: number): WhenFirst {
  let [come, sum] = [0, 0];
  firstAt.forEach((first, t) => {
    come += first;
    sum += first * t;
  });
  const yearBy = (share: number): number | null => {
    let passed = 0;
    const t = firstAt.findIndex((first) => (passed += first) > 0 && passed >= share * runs - 1e-9);
    return t < 0 ? null : firstYear - 1 + t;
  };
  return {
    quantiles: {
      '0.05': yearBy(0.05),
      '0.25': yearBy(0.25),
      '0.5': yearBy(0.5),
      '0.75': yearBy(0.75),
      '0.95': yearBy(0.95),
    },
    meanYears: come === 0 ? null : sum / come,
  };
}
