// Makes the parts of a sweep that are not there yet, in several threads.
import type { Spec } from '../../spec/schema/spec.ts';
import { openDesign } from '../../sweep/design/design.ts';
import { placeOfPart, type Manifest } from '../../sweep/manifest.ts';
import { openEvaluator } from '../../sweep/point/evaluate.ts';
import { ThreadsFailure } from '../../threads/failure.ts';
import { Ending, exitCodes } from '../exit.ts';
import { writeError } from '../output.ts';
import { showProgress } from '../progress.ts';
import { stopSignal } from '../stop.ts';
import type { Shard } from './flags.ts';
import type { KeptParts } from './kept-parts.ts';
import type { MadePart } from './make-part.ts';
import { costText } from './plan-text.ts';
import type { Store } from './store.ts';
import { workHere } from './work-here.ts';

export interface Filling {
  readonly spec: Spec;
  readonly manifest: Manifest;
  readonly threads: number;
  readonly shard: Shard | undefined;
  readonly quiet: boolean;
  /** Takes what is made, too. */
  readonly kept: KeptParts;
}

/** Those of the shard; an ending where it was cut short. */
export async function fillStore(store: Store, { spec, manifest, threads, shard, quiet, kept }: Filling): Promise<void> {
  const there = store.finished();
  const wanted = partsOfShard(manifest, shard);
  const parts = wanted.filter((part) => !there.has(part));
  if (parts.length === 0) return;
  const points = parts.reduce((sum, part) => sum + placeOfPart(manifest, part).count, 0);
  if (!quiet) {
    const already = wanted.length - parts.length;
    if (already > 0) writeError(`  there     ${already} of ${wanted.length} parts\n`);
    writeError(`${costText(msAPoint(spec, manifest), { left: points, threads })}\n`);
  }
  const progress = showProgress('Points', quiet);
  const stop = stopSignal();
  let made = 0;
  const take = (part: number, { pieces, columns }: MadePart): void => {
    store.write(part, pieces);
    kept.take(part, columns);
    progress.update((made += placeOfPart(manifest, part).count), points);
  };
  try {
    const alone = Math.min(threads, parts.length) === 1;
    const run = alone ? workHere : (await import('./pool.ts')).runPool;
    const done = await run({ start: { spec, manifest }, threads, parts, signal: stop.signal, take, onDeath });
    if (done === parts.length) return;
    const kept = wanted.length - parts.length + done;
    throw new Ending(exitCodes.work, `Stopped with ${kept} of ${wanted.length} parts done.`);
  } catch (error) {
    if (error instanceof ThreadsFailure) throw new Ending(exitCodes.work, error.message);
    throw error;
  } finally {
    progress.finish();
    stop.close();
  }
}

function onDeath(reason: string): void {
  writeError(`A thread died (${reason}); its points are run again.\n`);
}

/** Every n-th part, so that all shards have the same mix of points. */
function partsOfShard({ parts }: Manifest, shard: Shard | undefined): readonly number[] {
  const all = Array.from({ length: parts }, (_, part) => part);
  return shard === undefined ? all : all.filter((part) => part % shard.of === shard.shard - 1);
}

/** Milliseconds a point, over some that lie apart; the first is tried twice, since the first time everything is slow. */
export function msAPoint(spec: Spec, manifest: Manifest): number {
  const design = openDesign(manifest.design);
  const evaluator = openEvaluator(spec, manifest);
  evaluator.at(design.at(0));
  const tried = [...new Set([0, 1 / 3, 2 / 3, 1].map((share) => Math.floor(share * (design.size - 1))))];
  const started = performance.now();
  for (const point of tried) evaluator.at(design.at(point));
  return (performance.now() - started) / tried.length;
}
