// The parts of a sweep in the thread that asks for them.
import { setImmediate } from 'node:timers/promises';
import { openParts } from './make-part.ts';
import type { PoolRequest } from './pool.ts';

/** As `runPool`. A thread more would only have to be started; between parts there is a moment for Ctrl-C. */
export async function workHere({ start, parts, signal, take }: PoolRequest): Promise<number> {
  const make = openParts(start);
  let done = 0;
  for (const part of parts) {
    await setImmediate();
    if (signal.aborted) break;
    take(part, make(part));
    done++;
  }
  return done;
}
