// Columns as Parquet are read by others as they were written, what is missing as such.
import { parquetMetadata, parquetReadObjects } from 'hyparquet';
import { expect, test } from 'vitest';
import { columnFile, type FileColumn } from '../../src/cli/column-file/column-file.ts';

const fileOf = (...asked: Parameters<typeof columnFile>): ArrayBuffer => {
  const bytes = columnFile(...asked).flatMap((piece) => [...piece]);
  return Uint8Array.from(bytes).buffer;
};

const rows = 1000;
const columns: readonly FileColumn[] = [
  { name: 'point', type: 'integer', cells: Float64Array.from({ length: rows }, (_, i) => i * 2_000_000) },
  { name: 'growth', type: 'number', cells: Float64Array.from({ length: rows }, (_, i) => Math.sqrt(i) - 3) },
  { name: 'holes', type: 'number', cells: Float64Array.from({ length: rows }, (_, i) => (i % 7 < 3 ? NaN : -i / 3)) },
  { name: 'none', type: 'number', cells: new Float64Array(rows).fill(NaN) },
  { name: 'Größe', type: 'text', cells: Array.from({ length: rows }, (_, i) => (i % 300 === 5 ? `ü "${i}"` : null)) },
];

test('every cell comes back', async () => {
  const file = fileOf(columns, rows, { 'a-note': 'für später' });
  const found = await parquetReadObjects({ file });
  const expected = Array.from({ length: rows }, (_, i) =>
    Object.fromEntries(columns.map(({ name, cells }) => [name, Number.isNaN(cells[i]) ? null : cells[i]])),
  );
  expect(found).toEqual(expected);
  const { num_rows: count, created_by: by, key_value_metadata: notes } = parquetMetadata(file);
  expect({ count, by, notes }).toEqual({
    count: BigInt(rows),
    by: 'skein',
    notes: [{ key: 'a-note', value: 'für später' }],
  });
});

test('more columns than a short list holds, and no rows', async () => {
  const wide = Array.from({ length: 40 }, (_, k): FileColumn => ({
    name: `c${k}`,
    type: 'number',
    cells: Float64Array.of(k),
  }));
  const [row] = await parquetReadObjects({ file: fileOf(wide, 1, {}) });
  expect(row).toEqual(Object.fromEntries(wide.map(({ name }, k) => [name, k])));
  const empty = fileOf([{ name: 'x', type: 'text', cells: [] }], 0, {});
  expect(await parquetReadObjects({ file: empty })).toEqual([]);
});

test('the same columns give the same bytes', () => {
  expect(new Uint8Array(fileOf(columns, rows, {}))).toEqual(new Uint8Array(fileOf(columns, rows, {})));
});
