// A table as Parquet: typed columns, nulls for what is missing, and the dictionary in the file too. The same table gives the
// same bytes.
import { parquetWriteBuffer } from 'hyparquet-writer';
import { isMissing, typeOf, type Cell, type Column, type Table } from './tables.ts';

const types = { text: 'STRING', integer: 'INT32', number: 'DOUBLE' } as const;
const rowsInGroup = 100_000;

export function parquetBytes({ name, columns, rows }: Table): Uint8Array {
  const columnData = columns.map((column, c) => ({
    name: column.name,
    type: types[typeOf(column)],
    nullable: true,
    data: rows.map((row) => presentOrNull(row[c] ?? null)),
  }));
  const dictionary = JSON.stringify(columns.map((column) => entryOf(column)));
  const kvMetadata = [
    { key: 'skein-table', value: name },
    { key: 'skein-dictionary', value: dictionary },
  ];
  return new Uint8Array(parquetWriteBuffer({ columnData, kvMetadata, rowGroupSize: rowsInGroup, createdBy: 'skein' }));
}

function entryOf(column: Column): unknown {
  const { name, unit, meaning } = column;
  return { column: name, type: typeOf(column), unit, meaning };
}

function presentOrNull(cell: Cell): Cell {
  return isMissing(cell) ? null : cell;
}
