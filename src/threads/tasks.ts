// Batches in tasks for a thread: large enough that messages cost little, small enough that every thread has some.
import type { Batch } from '../kernel/batch.ts';

/** Numbers that one message may carry, where a batch is not larger by itself. */
const mostNumbers = 1 << 17;
const tasksForEach = 4;

export interface TaskSize {
  readonly threads: number;
  /** That one batch gives back. */
  readonly numbersInBatch: number;
}

export function tasksOf(
  batches: readonly Batch[],
  { threads, numbersInBatch }: TaskSize,
): readonly (readonly Batch[])[] {
  const fitting = Math.floor(mostNumbers / numbersInBatch);
  const shared = Math.ceil(batches.length / (threads * tasksForEach));
  const size = Math.max(1, Math.min(fitting, shared));
  const starts = Array.from({ length: Math.ceil(batches.length / size) }, (_, i) => i * size);
  return starts.map((start) => batches.slice(start, start + size));
}
