// One part of a sweep as the bytes of a Parquet file: the same part has the same bytes wherever it is made.
import type { Manifest } from '../../sweep/manifest.ts';
import type { PartColumns } from '../../sweep/point/part.ts';
import { columnFile, type FileColumn } from '../column-file/column-file.ts';

/** Point, factors, numbers, failure; in pieces that share the memory of the columns. */
export function partPieces(
  { columns, hash }: Pick<Manifest, 'columns' | 'hash'>,
  { first, count, values, numbers, failures }: PartColumns,
): readonly Uint8Array<ArrayBuffer>[] {
  const points = new Float64Array(count);
  for (let i = 0; i < count; i++) points[i] = first + i;
  const reasons = new Array<string | null>(count).fill(null);
  for (const [i, reason] of failures) reasons[i] = reason;
  const cells = [points, ...values, ...numbers];
  const own = columns.map(({ name, type }, c): FileColumn => {
    const column = cells[c] ?? reasons;
    if (column === reasons) return { name, type: 'text', cells: reasons };
    if (type === 'text') return { name, type, cells: Array.from(column, String) };
    return { name, type, cells: column instanceof Float64Array ? column : Float64Array.from(column, Number) };
  });
  return columnFile(own, count, { 'skein-sweep': hash, 'skein-dictionary': JSON.stringify(columns) });
}
