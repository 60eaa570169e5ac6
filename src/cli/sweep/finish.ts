// What a whole sweep is told as: one table as CSV with its dictionary, and the summary.
import { closeSync, fsyncSync, openSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import type { Manifest } from '../../sweep/manifest.ts';
import type { Swept } from '../../sweep/summary/swept.ts';
import { summariseSweep, type SweepSummary } from '../../sweep/summary/summarise.ts';
import { pendingFile } from '../files.ts';
import { Ending, exitCodes } from '../exit.ts';
import { reasonOf, writeAll } from '../output.ts';
import { dictionaryText, rowsText, type Cell, type Column } from '../tables.ts';
import { readSwept } from './read-parts.ts';

const tableName = 'points';

/** Every part is there. The same parts give the same bytes. */
export async function finishSweep(folder: string, manifest: Manifest): Promise<SweepSummary> {
  const swept = await writePoints(folder, manifest);
  const columns = manifest.columns.map(({ name, type, unit, meaning }): Column => ({ name, type, unit, meaning }));
  pendingFile(join(folder, 'dictionary.csv')).finish(dictionaryText([{ name: tableName, columns, rows: [] }]));
  const summary = summariseSweep(swept);
  pendingFile(join(folder, 'summary.json')).finish(`${JSON.stringify(summary, null, 2)}\n`);
  return summary;
}

/** Part by part as they are read, so that the table takes no memory of its own. */
async function writePoints(folder: string, manifest: Manifest): Promise<Swept> {
  const path = join(folder, `${tableName}.csv`);
  const unfinished = join(folder, `.skein-${process.pid}-${tableName}.tmp`);
  const descriptor = attempt(path, () => openSync(unfinished, 'w'));
  try {
    const swept = await readAndWrite(descriptor, { folder, manifest, path }).finally(() => {
      closeSync(descriptor);
    });
    attempt(path, () => {
      renameSync(unfinished, path);
    });
    return swept;
  } catch (error) {
    rmSync(unfinished, { force: true });
    throw error;
  }
}

interface Points {
  readonly folder: string;
  readonly manifest: Manifest;
  readonly path: string;
}

async function readAndWrite(descriptor: number, { folder, manifest, path }: Points): Promise<Swept> {
  const names = manifest.columns.map(({ name }) => name);
  writeAll(descriptor, rowsText([names]), path);
  const swept = await readSwept(folder, manifest, (part, count) => {
    const cells = names.map((name) => part.get(name));
    const rows = Array.from({ length: count }, (_, i) => cells.map((own) => cellOf(own?.[i])));
    writeAll(descriptor, rowsText(rows), path);
  });
  attempt(path, () => {
    fsyncSync(descriptor);
  });
  return swept;
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
