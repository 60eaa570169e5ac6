// One of several threads: takes the compiled module, opens the image that all share, and runs the batches it is given.
import { parentPort, workerData } from 'node:worker_threads';
import { runnerOn, type Batch } from '../kernel/batch.ts';
import { openIn } from '../kernel/open-in.ts';
import type { BatchCounts } from '../kernel/output.ts';
import { instantiate } from '../machine/instance.ts';
import type { FromWorker, ToWorker, WorkerStart } from './message.ts';

const { module }: WorkerStart = workerData;
let run: ((batch: Batch) => BatchCounts) | null = null;

function open({ image, request }: Extract<ToWorker, { kind: 'open' }>): void {
  const own = new Uint8Array(image).slice().buffer;
  const machine = instantiate(module);
  const fault = openIn(machine, own);
  if (fault !== null) throw new Error(fault.message);
  run = runnerOn(machine, own, request);
}

function work(batches: readonly Batch[]): void {
  if (run === null) throw new Error('A worker was given batches before a model.');
  const done: FromWorker = batches.map(run);
  const buffers = done.flatMap(({ counts, moved }) => [
    counts.buffer,
    ...(moved === null ? [] : [moved.animals.buffer]),
  ]);
  parentPort?.postMessage(done, buffers);
}

parentPort?.on('message', (message: ToWorker) => {
  if (message.kind === 'open') open(message);
  else work(message.batches);
});
