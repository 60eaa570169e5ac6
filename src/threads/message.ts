// What the main thread and its workers say to each other.
import type { Batch, RunRequest } from '../kernel/batch.ts';
import type { BatchCounts } from '../kernel/output.ts';

/** The compiled kernel module goes along when the worker is made. */
export interface WorkerStart {
  readonly module: WebAssembly.Module;
}

export type ToWorker =
  | {
      readonly kind: 'open';
      /** Memory that all threads share. */
      readonly images: readonly SharedArrayBuffer[];
      readonly request: RunRequest;
    }
  | { readonly kind: 'run'; readonly batches: readonly Batch[] };

/** The batches of one task, of each image. */
export type FromWorker = readonly (readonly BatchCounts[])[];
