// Reads the parts of a sweep back, one after the other.
import { readFileSync } from 'node:fs';
import { parquetRead } from 'hyparquet';
import type { Manifest } from '../../sweep/manifest.ts';
import { isText, placeOfPart } from '../../sweep/manifest.ts';
import { SweptColumns, type Swept } from '../../sweep/summary/swept.ts';
import { Ending, exitCodes } from '../exit.ts';
import { reasonOf } from '../output.ts';
import { partPath } from './store.ts';

/** Cells of one column of a part; null for what is missing. */
export type PartColumns = ReadonlyMap<string, ArrayLike<unknown>>;

async function readPart(folder: string, part: number): Promise<PartColumns> {
  const path = partPath(folder, part);
  const columns = new Map<string, unknown[]>();
  try {
    const bytes = readFileSync(path);
    const file = bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength);
    await parquetRead({
      file,
      onChunk: ({ columnName, columnData }) => {
        const before = columns.get(columnName) ?? [];
        for (let i = 0; i < columnData.length; i++) before.push(columnData[i]);
        columns.set(columnName, before);
      },
    });
  } catch (error) {
    throw new Ending(
      exitCodes.work,
      `Cannot read ${path}: ${reasonOf(error)}. Remove it, and the same sweep makes it again.`,
    );
  }
  return columns;
}

/** All parts, which must be there; `also` is shown each as it is read, in their order. */
export async function readSwept(
  folder: string,
  manifest: Manifest,
  also?: (part: PartColumns, count: number) => void,
): Promise<Swept> {
  const { design, points, parts } = manifest;
  const { factors } = design;
  const values = factors.map((factor) =>
    isText(factor) ? new Array<string>(points).fill('') : new Float64Array(points),
  );
  const columns = new SweptColumns(manifest);
  const failures = new Map<string, number>();
  for (let part = 0; part < parts; part++) {
    const read = await readPart(folder, part);
    const { first, count } = placeOfPart(manifest, part);
    also?.(read, count);
    factors.forEach(({ name }, k) => {
      for (let i = 0; i < count; i++) setAt(values[k], first + i, read.get(name)?.[i]);
    });
    columns.take((name) => read.get(name), first, count);
    for (let i = 0; i < count; i++) {
      const reason = read.get('failure')?.[i];
      if (typeof reason === 'string') failures.set(reason, (failures.get(reason) ?? 0) + 1);
    }
  }
  const { numbers, told, perhapsBest } = columns;
  return { manifest, values, numbers, told, perhapsBest, failures };
}

function setAt(into: Float64Array | string[] | undefined, row: number, cell: unknown): void {
  if (into instanceof Float64Array) into[row] = typeof cell === 'number' ? cell : NaN;
  else if (into !== undefined) into[row] = typeof cell === 'string' ? cell : '';
}
