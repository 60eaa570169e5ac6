// One of several threads of a sweep: works out whole parts, one after the other.
import { parentPort, workerData } from 'node:worker_threads';
import { openParts, type PartsStart } from './make-part.ts';

const start: PartsStart = workerData;
const make = openParts(start);

parentPort?.on('message', (part: number) => {
  const made = make(part);
  parentPort?.postMessage(made, [...new Set(made.pieces.map(({ buffer }) => buffer))]);
});
