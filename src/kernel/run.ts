// Runs batches one after the other in this thread.
import type { BatchCounts } from './output.ts';
import { openOwnImage } from './open.ts';
import { runnerOn, type Batch, type RunRequest } from './batch.ts';

export type BatchRunner = (batch: Batch) => BatchCounts;

/** A runner on an instance of its own. */
export function openRunner(
  image: ArrayBuffer,
  request: RunRequest,
  spare: Float64Array<ArrayBuffer>[] = [],
): BatchRunner {
  return runnerOn(openOwnImage(image), image, request, spare);
}
