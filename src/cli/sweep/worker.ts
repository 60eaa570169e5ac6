// One of several threads of a sweep: works out whole parts, one after the other.
import { parentPort, workerData } from 'node:worker_threads';
import type { Spec } from '../../spec/schema/spec.ts';
import { openDesign } from '../../sweep/design/design.ts';
import { placeOfPart, type Manifest } from '../../sweep/manifest.ts';
import { openEvaluator } from '../../sweep/point/evaluate.ts';
import { makePart } from './part-file.ts';

export interface SweepWorkerStart {
  readonly spec: Spec;
  readonly manifest: Manifest;
}

const { spec, manifest }: SweepWorkerStart = workerData;
const request = { design: openDesign(manifest.design), evaluator: openEvaluator(spec, manifest), manifest };

parentPort?.on('message', (part: number) => {
  const bytes = makePart(request, placeOfPart(manifest, part));
  parentPort?.postMessage(bytes, [bytes.buffer as ArrayBuffer]);
});
