// How long the flagship takes: in the process, and as a whole command.
import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { compileSpec, runModel } from '../../src/pipeline.ts';
import { median } from './measure.ts';
import type { Options } from './options.ts';
import { compileText } from './workload.ts';

const file = 'models/reed-hare.yaml';
const replicates = 1000;
const years = 50;

/** Wall-clock milliseconds, medians. */
export interface FlagshipTimes {
  readonly compile: number;
  readonly run: number;
  readonly command: number;
}

export function measureFlagship({ rounds }: Options): FlagshipTimes {
  const compiled = compileText(readFileSync(file, 'utf8'), { settings: { replicates, years } });
  const time = (action: () => void): number => {
    action();
    return median(
      Array.from({ length: rounds }, () => {
        const began = performance.now();
        action();
        return performance.now() - began;
      }),
    );
  };
  const words = ['bin/skein.cjs', 'run', file, '--replicates', String(replicates), '--years', String(years)];
  return {
    compile: time(() => void compileSpec(compiled.spec)),
    run: time(() => void runModel(compiled)),
    command: time(() => void spawnSync(process.execPath, words, { stdio: 'ignore' })),
  };
}
