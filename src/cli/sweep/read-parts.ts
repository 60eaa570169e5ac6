// Goes through the parts of a sweep, one after the other: those that were kept, and the others from their files.
import { readFileSync } from 'node:fs';
import { isText, type FactorColumn } from '../../sweep/design/factor.ts';
import { placeOfPart, type Manifest } from '../../sweep/manifest.ts';
import type { PartColumns } from '../../sweep/point/part.ts';
import { SweptColumns, type Swept } from '../../sweep/summary/swept.ts';
import { Ending, exitCodes } from '../exit.ts';
import { reasonOf } from '../output.ts';
import type { KeptParts } from './kept-parts.ts';
import { columnsOfPart } from './part-columns.ts';
import { partPath } from './store.ts';

async function readPart(folder: string, manifest: Manifest, part: number): Promise<PartColumns> {
  const path = partPath(folder, part);
  try {
    return await columnsOfPart(manifest, placeOfPart(manifest, part), readFileSync(path));
  } catch (error) {
    const fix = 'Remove it, and the same sweep makes it again.';
    throw new Ending(exitCodes.work, `Cannot read ${path}: ${reasonOf(error)}. ${fix}`);
  }
}

export interface Reading {
  /** Parts that need not be read. */
  readonly kept?: KeptParts;
  /** Is shown each part, in their order. */
  readonly also?: (part: PartColumns) => void;
}

/** All parts, which must be in the folder. */
export async function readSwept(folder: string, manifest: Manifest, { kept, also }: Reading = {}): Promise<Swept> {
  const { design, points, parts } = manifest;
  const values = design.factors.map((factor) =>
    isText(factor) ? new Array<string>(points).fill('') : new Float64Array(points),
  );
  const named = manifest.columns.slice(1 + values.length, -1).map(({ name }, k) => [name, k] as const);
  const places = new Map(named);
  const columns = new SweptColumns(manifest);
  const failures = new Map<string, number>();
  for (let part = 0; part < parts; part++) {
    const read = kept?.release(part) ?? (await readPart(folder, manifest, part));
    also?.(read);
    read.values.forEach((column, k) => {
      copy(values[k], column, read.first);
    });
    columns.take((name) => read.numbers[places.get(name) ?? -1], read.first, read.count);
    for (const [, reason] of read.failures) failures.set(reason, (failures.get(reason) ?? 0) + 1);
  }
  const { numbers, told, perhapsBest } = columns;
  return { manifest, values, numbers, told, perhapsBest, failures };
}

function copy(into: Float64Array | string[] | undefined, column: FactorColumn, first: number): void {
  if (into instanceof Float64Array) {
    if (column instanceof Float64Array) into.set(column, first);
    else into.set(column.map(Number), first);
  } else if (into !== undefined) for (let i = 0; i < column.length; i++) into[first + i] = String(column[i]);
}
