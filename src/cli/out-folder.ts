// What `--out` writes: results, tidy tables with a dictionary, and what is needed to run again.
import { join } from 'node:path';
import type { Analysis } from '../analysis/schema.ts';
import type { CompiledModel } from '../pipeline.ts';
import type { PathResults, RunResults } from '../results/results.ts';
import { makeFolder, pendingFile } from './files.ts';
import { specJson } from './spec-json.ts';
import { csvText, dictionaryText, type Table } from './tables.ts';

export interface OutContent {
  readonly results: RunResults | PathResults | Analysis;
  readonly tables: readonly Table[];
}

export interface OutFolder {
  write(compiled: CompiledModel, content: OutContent): void;
}

/** Made, and tried for writing, before the work begins. */
export function openOutFolder(folder: string): OutFolder {
  makeFolder(folder);
  pendingFile(join(folder, 'results.json'));
  return {
    write: ({ spec, provenance }, { results, tables }) => {
      const put = (name: string, text: string): void => {
        pendingFile(join(folder, name)).finish(text);
      };
      for (const table of tables) put(`${table.name}.csv`, csvText(table));
      put('dictionary.csv', dictionaryText(tables));
      put(
        'run.json',
        `${JSON.stringify({ format: 'skein-inputs/1', ...provenance, spec: specJson(spec) }, null, 2)}\n`,
      );
      put('results.json', `${JSON.stringify(results, null, 2)}\n`);
    },
  };
}
