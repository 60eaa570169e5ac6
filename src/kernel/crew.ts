// Who runs the batches of a job: this thread alone, or several threads. The batches that were finished are the same.
import type { Batch, RunRequest } from './batch.ts';
import type { BatchCounts } from './output.ts';

export interface Job {
  /** One or several, of which the same batches are run. */
  readonly images: readonly ArrayBuffer[];
  readonly request: RunRequest;
  /** Begun in this order. */
  readonly batches: readonly Batch[];
}

export interface JobOptions {
  /** Once it is aborted no further batch is begun; those that were begun are finished. */
  readonly signal?: AbortSignal;
}

export interface Crew {
  /**
   * `take` is given every batch when it is finished, in any order, once for each image in their order. Resolves to the number of
   * batches that were finished for all images: always the first ones.
   */
  run(job: Job, take: (batch: BatchCounts, image: number) => void, options?: JobOptions): Promise<number>;
  /** The batch is done with, and its counts may be written over: fresh memory costs more than it takes to fill it. */
  release?(batch: BatchCounts): void;
  close(): Promise<void>;
}
