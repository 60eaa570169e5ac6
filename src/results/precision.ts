// A run that goes on until its chances are known well enough: in fixed blocks, so that neither threads nor machine decide
// where it ends.
import { batchesOf, lanes, type Batch } from '../kernel/batch.ts';
import type { Model } from '../model/model.ts';
import type { OutcomeResult, ReachedPrecision, RunResults } from './results.ts';

/** Whole batches. */
const replicatesInBlock = 64 * lanes;
const drawsInBlock = 10;

/** Replicates that can come at most, of one draw where there are draws. */
export function mostReplicates({ replicates, draws, precision }: Model): number {
  return precision === undefined || draws > 0 ? replicates : precision.atMost;
}

/** Draws that can come at most. */
export function mostDraws({ replicates, draws, precision }: Model): number {
  return precision === undefined || draws === 0 ? draws : Math.max(draws, Math.floor(precision.atMost / replicates));
}

/** The batches of the first replicates, then block after block of further ones as long as somebody asks. */
export function* blocksOf(model: Model): Generator<readonly Batch[]> {
  yield batchesOf(model.replicates);
  const most = mostReplicates(model);
  for (let first = model.replicates; first < most; first += replicatesInBlock) {
    const block = batchesOf(Math.min(replicatesInBlock, most - first));
    yield block.map((batch) => ({ ...batch, first: batch.first + first }));
  }
}

/** Whether it is time to look how precise the draws so far are. */
export function endsBlockOfDraws({ draws, precision }: Model, done: number): boolean {
  return precision !== undefined && done >= draws && (done - draws) % drawsInBlock === 0;
}

/** Half the width of the widest interval from the number of runs. */
function widestHalf(outcomes: readonly OutcomeResult[]): number {
  const intervals = outcomes.flatMap(({ ever, atEnd }) => [ever.interval, atEnd.interval]);
  return Math.max(...intervals.map(({ lower, upper }) => (upper - lower) / 2));
}

/** What a run that was to be precise came to; null where it was not. */
export function precisionOf({ precision }: Model, outcomes: readonly OutcomeResult[]): ReachedPrecision | null {
  if (precision === undefined) return null;
  const { halfWidth: asked, atMost } = precision;
  const halfWidth = widestHalf(outcomes);
  return { asked, halfWidth, reached: halfWidth <= asked, atMost };
}

/** Results of a run that went on by itself, with what it came to. */
export function withPrecision(model: Model, results: RunResults): RunResults {
  const precision = precisionOf(model, results.outcomes);
  return precision === null ? results : { ...results, precision };
}

/** About how many replicates it takes in all, for a word on the time left. */
export function expectedReplicates(done: number, { asked, halfWidth, atMost }: ReachedPrecision): number {
  return Math.min(atMost, Math.ceil(done * (halfWidth / asked) * (halfWidth / asked)));
}
