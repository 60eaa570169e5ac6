// A crew of one: this thread, which lets others have a turn after each batch, so that it can be told to stop.
import { setImmediate } from 'node:timers/promises';
import type { Crew } from '../kernel/crew.ts';
import { openRunner } from '../kernel/run.ts';

export const alone: Crew = {
  run: async ({ image, request, batches }, take, { signal } = {}) => {
    const run = openRunner(image, request);
    let done = 0;
    for (const batch of batches) {
      if (signal?.aborted === true) break;
      take(run(batch));
      done++;
      await setImmediate();
    }
    return done;
  },
  close: () => Promise.resolve(),
};
