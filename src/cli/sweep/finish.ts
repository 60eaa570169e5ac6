// What a whole sweep is told as: one table as CSV with its dictionary, and the summary.
import { closeSync, fsyncSync, openSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { openNumberLines } from '../../kernel/number-lines.ts';
import type { FactorColumn } from '../../sweep/design/factor.ts';
import type { Manifest } from '../../sweep/manifest.ts';
import type { PartColumns } from '../../sweep/point/part.ts';
import type { Swept } from '../../sweep/summary/swept.ts';
import { summariseSweep, type SweepSummary } from '../../sweep/summary/summarise.ts';
import { pendingFile } from '../files.ts';
import { Ending, exitCodes } from '../exit.ts';
import { reasonOf, writeAll } from '../output.ts';
import { csvCell, dictionaryText, rowsText, type Column } from '../tables.ts';
import type { KeptParts } from './kept-parts.ts';
import { readSwept } from './read-parts.ts';

const tableName = 'points';

/** Every part is there; those that were kept need not be read. The same parts give the same bytes. */
export async function finishSweep(folder: string, manifest: Manifest, kept?: KeptParts): Promise<SweepSummary> {
  const swept = await writePoints(folder, manifest, kept);
  const columns = manifest.columns.map(({ name, type, unit, meaning }): Column => ({ name, type, unit, meaning }));
  pendingFile(join(folder, 'dictionary.csv')).finish(dictionaryText([{ name: tableName, columns, rows: [] }]));
  const summary = summariseSweep(swept);
  pendingFile(join(folder, 'summary.json')).finish(`${JSON.stringify(summary, null, 2)}\n`);
  return summary;
}

/** Part by part as they are read, so that the table takes no memory of its own. */
async function writePoints(folder: string, manifest: Manifest, kept?: KeptParts): Promise<Swept> {
  const path = join(folder, `${tableName}.csv`);
  const unfinished = join(folder, `.skein-${process.pid}-${tableName}.tmp`);
  const descriptor = attempt(path, () => openSync(unfinished, 'w'));
  try {
    const swept = await readAndWrite(descriptor, { folder, manifest, path, ...(kept && { kept }) }).finally(() => {
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
  readonly kept?: KeptParts;
}

async function readAndWrite(descriptor: number, { folder, manifest, path, kept }: Points): Promise<Swept> {
  writeAll(descriptor, rowsText([manifest.columns.map(({ name }) => name)]), path);
  const numbers = openNumberLines(manifest.columns.length, linesAtATime);
  const also = (part: PartColumns): void => {
    for (let from = 0; from < part.count; from += linesAtATime) {
      const count = Math.min(linesAtATime, part.count - from);
      const cells = cellsOf(part, from, count);
      const plain = cells.flatMap((column) => (column instanceof Float64Array ? [column] : []));
      const lines = plain.length === cells.length ? numbers.bytesOf(plain, count) : linesText(count, cells);
      writeAll(descriptor, lines, path);
    }
  };
  const swept = await readSwept(folder, manifest, { also, ...(kept && { kept }) });
  attempt(path, () => {
    fsyncSync(descriptor);
  });
  return swept;
}

const linesAtATime = 4096;

/** All columns of so many points of a part: numbers, too, where words would all be empty. */
function cellsOf(
  { first, values, numbers, failures }: PartColumns,
  from: number,
  count: number,
): readonly FactorColumn[] {
  const points = new Float64Array(count);
  for (let i = 0; i < count; i++) points[i] = first + from + i;
  const own = [...values, ...numbers].map((column): FactorColumn =>
    column instanceof Float64Array ? column.subarray(from, from + count) : column.slice(from, from + count),
  );
  if (failures.size === 0) return [points, ...own, new Float64Array(count).fill(NaN)];
  return [points, ...own, Array.from({ length: count }, (_, i) => failures.get(from + i) ?? '')];
}

function linesText(count: number, columns: readonly FactorColumn[]): string {
  let text = '';
  for (let i = 0; i < count; i++) text += `${columns.map((column) => csvCell(column[i] ?? null)).join(',')}\n`;
  return text;
}

function attempt<T>(path: string, action: () => T): T {
  try {
    return action();
  } catch (error) {
    throw new Ending(exitCodes.work, `Cannot write ${path}: ${reasonOf(error)}.`);
  }
}
