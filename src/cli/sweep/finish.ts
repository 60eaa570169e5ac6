// What a whole sweep is told as: one table as CSV with its dictionary, and the summary.
import { closeSync, fsyncSync, openSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import type { Manifest } from '../../sweep/manifest.ts';
import { placeOfPart } from '../../sweep/manifest.ts';
import { summariseSweep, type SweepSummary } from '../../sweep/summary/summarise.ts';
import { pendingFile } from '../files.ts';
import { Ending, exitCodes } from '../exit.ts';
import { reasonOf, writeAll } from '../output.ts';
import { csvText, dictionaryText, type Cell, type Column } from '../tables.ts';
import { readPart, readSwept } from './read-parts.ts';

const tableName = 'points';

/** Every part is there. The same parts give the same bytes. */
export async function finishSweep(folder: string, manifest: Manifest): Promise<SweepSummary> {
  await writePoints(folder, manifest);
  const columns = manifest.columns.map(({ name, type, unit, meaning }): Column => ({ name, type, unit, meaning }));
  pendingFile(join(folder, 'dictionary.csv')).finish(dictionaryText([{ name: tableName, columns, rows: [] }]));
  const summary = summariseSweep(await readSwept(folder, manifest));
  pendingFile(join(folder, 'summary.json')).finish(`${JSON.stringify(summary, null, 2)}\n`);
  return summary;
}

/** Part by part, so that memory does not grow with the points. */
async function writePoints(folder: string, manifest: Manifest): Promise<void> {
  const path = join(folder, `${tableName}.csv`);
  const unfinished = join(folder, `.skein-${process.pid}-${tableName}.tmp`);
  const descriptor = attempt(path, () => openSync(unfinished, 'w'));
  try {
    const columns = manifest.columns.map(({ name }): Column => ({ name, unit: '', meaning: '' }));
    writeAll(descriptor, csvText({ columns, rows: [] }), path);
    for (let part = 0; part < manifest.parts; part++) {
      const read = await readPart(folder, part);
      const { count } = placeOfPart(manifest, part);
      const rows = Array.from({ length: count }, (_, i) =>
        manifest.columns.map(({ name }) => cellOf(read.get(name)?.[i])),
      );
      const text = csvText({ columns, rows });
      writeAll(descriptor, text.slice(text.indexOf('\n') + 1), path);
    }
    attempt(path, () => {
      fsyncSync(descriptor);
    });
  } catch (error) {
    rmSync(unfinished, { force: true });
    throw error;
  } finally {
    closeSync(descriptor);
  }
  attempt(path, () => {
    renameSync(unfinished, path);
  });
}

function attempt<T>(path: string, action: () => T): T {
  try {
    return action();
  } catch (error) {
    throw new Ending(exitCodes.work, `Cannot write ${path}: ${reasonOf(error)}.`);
  }
}

function cellOf(cell: unknown): Cell {
  return typeof cell === 'number' || typeof cell === 'string' ? cell : null;
}
