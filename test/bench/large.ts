// How long and how large: a landscape of 400 patches and six classes over a hundred years, as whole commands.
import { mkdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { largeModel } from '../large/landscape.ts';
import { command } from './command.ts';
import { median } from './measure.ts';
import { measureOpening, type OpeningTimes } from './opening.ts';
import type { Options } from './options.ts';
import { work } from './tools.ts';

export interface LargeFigures {
  /** Wall-clock seconds of 100 replicates in two threads, start and reading included. */
  readonly seconds: number;
  /** The most memory that a run with quantiles for each patch and year takes, in MB, of so many replicates. */
  readonly memory: number;
  readonly memoryReplicates: number;
  /** Of the report, in MB. */
  readonly page: number;
  /** Of the report, in a browser. */
  readonly browser: OpeningTimes;
}

export async function measureLarge({ quick, rounds }: Options): Promise<LargeFigures> {
  const folder = join(work, 'large');
  mkdirSync(folder, { recursive: true });
  const model = join(folder, 'model.yaml');
  const { text, patches } = largeModel({ patches: 400, classes: 6 });
  writeFileSync(model, text);
  writeFileSync(join(folder, 'patches.geojson'), patches);
  const run = (replicates: number): readonly string[] => {
    return ['run', model, '--years', '100', '--replicates', String(replicates), '--threads', '2', '--quiet'];
  };
  const seconds = Array.from({ length: rounds }, () => {
    const began = performance.now();
    command(run(100));
    return (performance.now() - began) / 1000;
  });
  const memoryReplicates = quick ? 1000 : 10_000;
  const { megabytes } = command(run(memoryReplicates));
  const page = join(folder, 'page.html');
  command(['report', model, '--years', '100', '--quiet', '-o', page]);
  const browser = await measureOpening(page, rounds);
  return {
    seconds: median(seconds),
    memory: megabytes,
    memoryReplicates,
    page: statSync(page).size / 1e6,
    browser,
  };
}
