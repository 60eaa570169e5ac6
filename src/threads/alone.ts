// A crew of one: this thread, which lets others have a turn after each batch, so that it can be told to stop.
import { setImmediate } from 'node:timers/promises';
import type { Crew } from '../kernel/crew.ts';
import { openOwnImage } from '../kernel/open.ts';
import { togetherOn } from '../kernel/together.ts';

/** As many counts of batches are kept for the next ones, at most. */
const mostSpare = 512;
const spare: Float64Array<ArrayBuffer>[] = [];

export const alone: Crew = {
  run: async ({ images, request, batches }, take, { signal } = {}) => {
    const opened = images.map((image) => ({ image, machine: openOwnImage(image) }));
    const run = togetherOn(opened, request, spare);
    let done = 0;
    for (const batch of batches) {
      if (signal?.aborted === true) break;
      run(batch).forEach(take);
      done++;
      await setImmediate();
    }
    return done;
  },
  release: ({ counts }) => {
    if (spare.length < mostSpare) spare.push(counts);
  },
  close: () => {
    spare.length = 0;
    return Promise.resolve();
  },
};
