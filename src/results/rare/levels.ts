// Levels for splitting, from a pilot under a seed of its own: each is passed by about a fifth of the trials that came to the
// one before.
import type { Entrance, Trials } from '../../kernel/trials.ts';
import { assigned } from './assign.ts';

export interface PilotRequest {
  readonly outcome: number;
  /** The threshold of the outcome: the last level. */
  readonly below: number;
  /** Counts and levels are −N, of an outcome that is a rise. */
  readonly rising: boolean;
  readonly steps: number;
  readonly seed: number;
  readonly trials: number;
}

export interface Pilot {
  /** From high to low, the threshold last; null where numbers do not fall level by level. */
  readonly levels: readonly number[] | null;
  readonly replicateYears: number;
  /** Replicates that the kernel had to stop. */
  readonly stopped: number;
}

const passing = 0.2;
const mostLevels = 40;

export function pilotLevels(runner: Trials, { outcome, below, rising, steps, seed, trials }: PilotRequest): Pilot {
  const levels: number[] = [];
  let entrances: readonly Entrance[] = [atStart];
  let [replicateYears, stopped] = [0, 0];
  for (let stage = 0; stage < mostLevels; stage++) {
    const chosen = assigned(entrances, { trials, seed, words: [stage, outcome] });
    const request = { outcome, rising, steps, seed, firstReplicate: stage * trials };
    const whole = runner.run(chosen, { ...request, level: -Infinity });
    const level = nextLevel(whole.lowest, levels.at(-1) ?? Infinity);
    replicateYears += whole.replicateYears;
    stopped += whole.stopped;
    if (level === null) return { levels: null, replicateYears, stopped };
    levels.push(Math.max(below, level));
    if (level <= below) return { levels, replicateYears, stopped };
    // The same trials again, now to be kept where they pass.
    const kept = runner.run(chosen, { ...request, level });
    replicateYears += kept.replicateYears;
    entrances = kept.hits;
  }
  return { levels: null, replicateYears, stopped };
}

export const atStart: Entrance = { step: 0, value: Infinity, state: null };

/** A level below the last that as near as can be to a fifth of these lowest counts lie below; null where none does. */
function nextLevel(lowest: Float64Array, last: number): number | null {
  const sorted = [...lowest].sort((a, b) => a - b);
  const share = sorted[Math.max(0, Math.ceil(passing * sorted.length) - 1)] ?? Infinity;
  const above = sorted.find((value) => value > share) ?? share + 1;
  if (above < last) return above;
  // So many lie just below the last level that the next is the lowest but one that is different.
  const lower = [...new Set(sorted)].filter((value) => value < last);
  return lower.length < 2 ? null : (lower.at(-1) ?? null);
}
