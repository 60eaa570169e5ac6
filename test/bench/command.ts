// Whole commands, with the processor time and the most memory that they took, by their own account.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';

export interface CommandFigures {
  /** Of the processor, all threads together. */
  readonly seconds: number;
  readonly megabytes: number;
}

const telling = `import { isMainThread } from 'node:worker_threads';
if (isMainThread) process.on('exit', () => {
  const { userCPUTime, systemCPUTime, maxRSS } = process.resourceUsage();
  process.stderr.write('\\ntook ' + (userCPUTime + systemCPUTime) / 1e6 + ' ' + maxRSS / 1024 + '\\n');
});`;

/** Errors: throws where the command fails. */
export function command(words: readonly string[]): CommandFigures {
  const inside = ['--import', `data:text/javascript,${encodeURIComponent(telling)}`, join('bin', 'skein.cjs')];
  const { status, stderr } = spawnSync(process.execPath, [...inside, ...words], { encoding: 'utf8', maxBuffer: 1e9 });
  const [seconds = NaN, megabytes = NaN] = /\ntook ([\d.]+) ([\d.]+)\n/.exec(stderr)?.slice(1).map(Number) ?? [];
  if (status !== 0 || Number.isNaN(megabytes)) throw new Error(`skein ${words.join(' ')} failed: ${stderr}`);
  return { seconds, megabytes };
}
