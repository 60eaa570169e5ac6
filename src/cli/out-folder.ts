// What `--out` writes: results, tidy tables with a dictionary, what is needed to run again, and how the work went. Every file
// is written whole under another name first; only then do all of them get theirs, one after the other.
import { join } from 'node:path';
import type { Analysis } from '../analysis/schema.ts';
import type { Comparison } from '../compare/results.ts';
import type { CompiledModel } from '../pipeline.ts';
import type { Hidden } from '../report/hiding/hide.ts';
import type { PathResults, RunResults } from '../results/results.ts';
import { makeFolder, pendingFile, type PreparedFile } from './files.ts';
import { logOf } from './log.ts';
import { parquetBytes } from './parquet.ts';
import { specJson } from './spec-json.ts';
import { csvText, dictionaryText, type Table } from './tables.ts';

export interface OutContent {
  readonly command: 'run' | 'path' | 'analyse' | 'compare';
  readonly results: RunResults | PathResults | Analysis | Comparison;
  readonly tables: readonly Table[];
  /** 1 where it is not said. */
  readonly threads?: number;
  /** Whether a comparison asked other sound models. */
  readonly robust?: boolean;
  /** Takes the place of everything that tells where patches are. */
  readonly hidden?: Hidden | null;
}

export interface OutFolder {
  write(compiled: CompiledModel, content: OutContent): void;
}

/** Made, and tried for writing, before the work begins. */
export function openOutFolder(folder: string): OutFolder {
  const started = new Date();
  makeFolder(folder);
  pendingFile(join(folder, 'results.json'));
  return {
    write: ({ spec, provenance }, { command, results, tables, threads = 1, robust = false, hidden = null }) => {
      const { hash } = hidden ?? provenance;
      const places = hidden === null ? {} : { places: hidden.places };
      const inputs = {
        format: 'skein-inputs/1',
        command,
        ...provenance,
        hash,
        ...places,
        ...(robust ? { robust } : {}),
        spec: specJson(hidden?.spec ?? spec),
      };
      writeTogether(folder, [
        ...tables.flatMap((table) => tableFiles(table)),
        ['dictionary.csv', dictionaryText(tables)],
        ['results.json', jsonText(results)],
        ['log.json', jsonText(logOf({ command, hash, started, threads }))],
        ['run.json', jsonText(inputs)],
      ]);
    },
  };
}

type NamedContent = readonly [name: string, content: string | Uint8Array];

function tableFiles(table: Table): readonly NamedContent[] {
  return [
    [`${table.name}.csv`, csvText(table)],
    [`${table.name}.parquet`, parquetBytes(table)],
  ];
}

function jsonText(value: unknown): string {
  return `${JSON.stringify(value, null, 2)}\n`;
}

function writeTogether(folder: string, files: readonly NamedContent[]): void {
  const prepared: PreparedFile[] = [];
  try {
    for (const [name, content] of files) prepared.push(pendingFile(join(folder, name)).prepare(content));
    for (const file of prepared) file.publish();
  } finally {
    for (const file of prepared) file.discard();
  }
}
