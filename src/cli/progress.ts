// How far the work is: one line with the time left on a terminal, a plain line now and then elsewhere.
import { writeError } from './output.ts';

export interface Progress {
  update(done: number, of: number): void;
  finish(): void;
}

const silentMs = 1000;

export function showProgress(what: string, quiet: boolean): Progress {
  const started = Date.now();
  let [last, shown] = [-Infinity, false];
  return {
    update: (done, of) => {
      const now = Date.now();
      if (quiet || done >= of || now - started < silentMs) return;
      // Looked at late: it takes a good part of the start of a command.
      const live = process.stderr.isTTY;
      if (now - last < (live ? 100 : 10_000)) return;
      last = now;
      shown = true;
      const seconds = Math.ceil((((now - started) / 1000) * (of - done)) / done);
      const line = `${what}: ${done.toLocaleString('en')} of ${of.toLocaleString('en')}, about ${timeWords(seconds)} left`;
      writeError(live ? `\r\u001b[2K${line}` : `${line}\n`);
    },
    finish: () => {
      if (shown && process.stderr.isTTY) writeError('\r\u001b[2K');
    },
  };
}

function timeWords(seconds: number): string {
  if (seconds < 90) return `${seconds} s`;
  if (seconds < 5400) return `${Math.round(seconds / 60)} min`;
  return `${(seconds / 3600).toFixed(1)} h`;
}
