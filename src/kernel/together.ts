// Runs the same replicates of several images one after the other, batch by batch; the weather is drawn once for all that share it.
import { weatherNumbersOf, weatherSource } from '../compile/image/weather.ts';
import type { Machine } from '../machine/instance.ts';
import { tapedRunnerOn, type Batch, type RunRequest } from './batch.ts';
import type { BatchCounts } from './output.ts';
import { WeatherTape } from './weather-tape.ts';

/** An image and the instance that it is open in. */
export interface OpenedImage {
  readonly machine: Machine;
  readonly image: ArrayBuffer;
}

export type TogetherRunner = (batch: Batch) => readonly BatchCounts[];

/** Gives the counts of each image in their order, the same as if each were run by itself. */
export function togetherOn(
  opened: readonly OpenedImage[],
  request: RunRequest,
  spare: Float64Array<ArrayBuffer>[] = [],
): TogetherRunner {
  const sources = opened.length < 2 ? [] : opened.map(({ image }) => weatherSource(image));
  const tapes = new Map<string, WeatherTape>();
  opened.forEach(({ image }, i) => {
    const source = sources[i] ?? '';
    const weather = weatherNumbersOf(image);
    const shared = sources.indexOf(source) !== sources.lastIndexOf(source);
    if (shared && weather > 0) tapes.set(source, new WeatherTape({ steps: request.steps, weather }));
  });
  const runs = opened.map(({ machine, image }, i) => {
    const tape = tapes.get(sources[i] ?? '') ?? null;
    const run = tapedRunnerOn(machine, image, request, spare);
    return (batch: Batch) => run(batch, tape);
  });
  return (batch) => {
    for (const tape of tapes.values()) tape.clear();
    return runs.map((run) => run(batch));
  };
}
