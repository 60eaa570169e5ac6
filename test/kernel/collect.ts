// All counts of a run side by side, for tests that look at single replicates.
import * as layout from '../../assembly/layout.ts';
import { headerOf } from '../../src/compile/image/read.ts';
import { batchesOf, type RunRequest } from '../../src/kernel/batch.ts';
import { openRunner } from '../../src/kernel/run.ts';
import type { Moved, Stop } from '../../src/kernel/output.ts';

export interface WholeRun {
  readonly columns: number;
  /** At (t * columns + k) * replicates + r. */
  readonly counts: Float64Array;
  readonly stopped: readonly Stop[];
  readonly moved: Moved;
}

export interface WholeRequest extends RunRequest {
  readonly replicates: number;
  readonly lanes?: number;
}

export function runReplicates(image: ArrayBuffer, request: WholeRequest): WholeRun {
  const { replicates, steps, lanes } = request;
  const run = openRunner(image, { ...request, keepMoved: true });
  const header = headerOf(image);
  const [columns, ways] = [header[layout.headerColumns]!, header[layout.headerWays]!];
  const counts = new Float64Array((steps + 1) * columns * replicates);
  const animals = new Float64Array(steps * ways);
  const stopped: Stop[] = [];
  for (const one of batchesOf(replicates, lanes)) {
    const batch = run(one);
    for (let row = 0; row < (steps + 1) * columns; row++) {
      const kept = batch.counts.subarray(row * layout.lanes, row * layout.lanes + batch.lanes);
      counts.set(kept, row * replicates + batch.first);
    }
    batch.moved?.animals.forEach((moved, i) => (animals[i]! += moved));
    stopped.push(...batch.stopped);
  }
  return { columns, counts, stopped, moved: { ways, animals } };
}
