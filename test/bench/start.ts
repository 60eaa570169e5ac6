// How long a command takes from nothing, and how much two threads gain over one.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { median } from './measure.ts';
import type { Options } from './options.ts';

export interface StartTimes {
  /** Wall-clock milliseconds, medians. */
  readonly nothing: number;
  readonly help: number;
  readonly smallest: number;
}

const skein = join('bin', 'skein.cjs');

export function measureStart({ rounds }: Options): StartTimes {
  const ways = [
    ['-e', '0'],
    [skein, '--help'],
    [skein, 'run', 'models/two-ponds.yaml', '--replicates', '1'],
  ];
  const times = ways.map((): number[] => []);
  for (let round = 0; round < 2 * rounds + 5; round++) ways.forEach((words, k) => times[k]?.push(milliseconds(words)));
  const [nothing = NaN, help = NaN, smallest = NaN] = times.map(median);
  return { nothing, help, smallest };
}

function milliseconds(words: readonly string[]): number {
  const began = performance.now();
  const done = spawnSync(process.execPath, words, { stdio: 'ignore' });
  if (done.status !== 0) throw new Error(`node ${words.join(' ')} failed.`);
  return performance.now() - began;
}

/** Wall-clock time of one thread ÷ that of two, whole commands less their start. */
export function measureThreads(name: string, { quick, rounds }: Options): number {
  const words = (threads: number, replicates: number): string[] => {
    const file = `test/bench/workloads/${name}.yaml`;
    return [skein, 'run', file, '--replicates', String(replicates), '--threads', String(threads), '--quiet', '--json'];
  };
  const many = (name === 'w4' ? 160 : 960) / (quick ? 2 : 1);
  const ratios = Array.from({ length: rounds }, () => {
    const one = milliseconds(words(1, many)) - milliseconds(words(1, 16));
    return one / (milliseconds(words(2, many)) - milliseconds(words(2, 16)));
  });
  return median(ratios);
}
