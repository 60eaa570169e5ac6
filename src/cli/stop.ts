// Ctrl-C: what was begun is finished and kept.
import { writeError } from './output.ts';

/** The first Ctrl-C (or SIGTERM) lets what was begun be finished; the second ends at once. */
export function stopSignal(): { readonly signal: AbortSignal; close(): void } {
  const controller = new AbortController();
  const stop = (): void => {
    controller.abort();
    close();
    writeError('\nStopping; what is finished is kept. Once more to end at once.\n');
  };
  const close = (): void => {
    process.off('SIGINT', stop).off('SIGTERM', stop);
  };
  process.on('SIGINT', stop).on('SIGTERM', stop);
  return { signal: controller.signal, close };
}
