// One of several threads: takes the compiled module, opens the images that all share, and runs the batches it is given.
import { parentPort, workerData } from 'node:worker_threads';
import type { Batch } from '../kernel/batch.ts';
import { openIn } from '../kernel/open-in.ts';
import { togetherOn, type OpenedImage, type TogetherRunner } from '../kernel/together.ts';
import { instantiate } from '../machine/instance.ts';
import type { FromWorker, ToWorker, WorkerStart } from './message.ts';

const { module }: WorkerStart = workerData;
let run: TogetherRunner | null = null;

function open({ images, request }: Extract<ToWorker, { kind: 'open' }>): void {
  run = togetherOn(images.map(openShared), request);
}

function openShared(shared: SharedArrayBuffer): OpenedImage {
  const image = new Uint8Array(shared).slice().buffer;
  const machine = instantiate(module);
  const fault = openIn(machine, image);
  if (fault !== null) throw new Error(fault.message);
  return { machine, image };
}

function work(batches: readonly Batch[]): void {
  if (run === null) throw new Error('A worker was given batches before a model.');
  const done: FromWorker = batches.map(run);
  const buffers = done
    .flat()
    .flatMap(({ counts, moved }) => [counts.buffer, ...(moved === null ? [] : [moved.animals.buffer])]);
  parentPort?.postMessage(done, buffers);
}

parentPort?.on('message', (message: ToWorker) => {
  if (message.kind === 'open') open(message);
  else work(message.batches);
});
