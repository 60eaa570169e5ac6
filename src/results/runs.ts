// The counts of the runs that were finished, column by column.
import type { RawRun } from '../kernel/output.ts';

export interface FinishedRuns {
  readonly runs: number;
  readonly steps: number;
  /** Counts of column k at count t, one for each finished run. */
  at(step: number, column: number): Float64Array;
}

/** Runs that the kernel had to stop are left out of every number. */
export function finishedRuns(raw: RawRun): FinishedRuns {
  const { replicates, columns, counts, steps } = raw;
  const stopped = new Set(raw.stopped.map(({ replicate }) => replicate));
  const kept = Int32Array.from({ length: replicates }, (_, r) => r).filter((r) => !stopped.has(r));
  return {
    runs: kept.length,
    steps,
    at: (step, column) => {
      const all = counts.subarray((step * columns + column) * replicates, (step * columns + column + 1) * replicates);
      return stopped.size === 0 ? all : Float64Array.from(kept, (r) => all[r] ?? 0);
    },
  };
}
