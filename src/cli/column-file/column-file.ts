// Columns as the bytes of a Parquet file: one group of rows, a page a column, plain and not compressed, since numbers of a model
// hardly can be, and packing them took longer than the model. The same columns give the same bytes.
import { compactBytes, writeVarint, type Field, type Fields } from './compact.ts';

/** What is missing is NaN among numbers and null among words. */
export type FileColumn = { readonly name: string } & (
  | { readonly type: 'integer' | 'number'; readonly cells: Float64Array<ArrayBuffer> }
  | { readonly type: 'text'; readonly cells: readonly (string | null)[] }
);

/** Numbers of the format (parquet.thrift of Apache Parquet 2). */
const physical = { integer: 1, number: 5, text: 6 } as const;
const [optional, utf8, plain, runs, uncompressed, dataPage] = [1, 0, 0, 3, 0, 0];
const magic = new TextEncoder().encode('PAR1');

/**
 * In pieces, of which those that are columns of numbers are the memory of the columns themselves. All columns have `rows` cells.
 * Integers fit 32 bits.
 */
export function columnFile(
  columns: readonly FileColumn[],
  rows: number,
  notes: Readonly<Record<string, string>>,
): readonly Uint8Array<ArrayBuffer>[] {
  const pieces = [Uint8Array.from(magic)];
  let offset = magic.length;
  const chunks = columns.map((column): Field => {
    const page = pageOf(column, rows);
    pieces.push(...page);
    const size = page.reduce((sum, piece) => sum + piece.length, 0);
    offset += size;
    return chunkOf(column, { rows, size, offset: offset - size });
  });
  const group: Fields = [
    [1, { list: chunks }],
    [2, { i64: offset - magic.length }],
    [3, { i64: rows }],
  ];
  const footer = compactBytes([
    [1, { i32: 2 }],
    [
      2,
      {
        list: [
          {
            struct: [
              [4, { binary: 'root' }],
              [5, { i32: columns.length }],
            ],
          },
          ...columns.map(elementOf),
        ],
      },
    ],
    [3, { i64: rows }],
    [4, { list: [{ struct: group }] }],
    [
      5,
      {
        list: Object.entries(notes).map(([key, value]) => ({
          struct: [
            [1, { binary: key }],
            [2, { binary: value }],
          ],
        })),
      },
    ],
    [6, { binary: 'skein' }],
  ]);
  return [...pieces, joined([footer, wordBytes(footer.length), magic])];
}

function elementOf({ name, type }: FileColumn): Field {
  const own: Fields = [
    [1, { i32: physical[type] }],
    [3, { i32: optional }],
    [4, { binary: name }],
  ];
  return { struct: type === 'text' ? [...own, [6, { i32: utf8 }]] : own };
}

interface ChunkPlace {
  readonly rows: number;
  readonly size: number;
  readonly offset: number;
}

function chunkOf({ name, type }: FileColumn, { rows, size, offset }: ChunkPlace): Field {
  const about: Fields = [
    [1, { i32: physical[type] }],
    [2, { list: [{ i32: plain }, { i32: runs }] }],
    [3, { list: [{ binary: name }] }],
    [4, { i32: uncompressed }],
    [5, { i64: rows }],
    [6, { i64: size }],
    [7, { i64: size }],
    [9, { i64: offset }],
  ];
  return {
    struct: [
      [2, { i64: offset }],
      [3, { struct: about }],
    ],
  };
}

/** Header, which cells are there, and those. */
function pageOf(column: FileColumn, rows: number): readonly Uint8Array<ArrayBuffer>[] {
  const missing = missingIn(column);
  const there = missing === 0 || missing === rows ? runOf(rows, missing === 0) : presenceOf(column, rows);
  const cells = missing === rows ? new Uint8Array(0) : cellBytes(column, missing);
  const size = 4 + there.length + cells.length;
  const header = compactBytes([
    [1, { i32: dataPage }],
    [2, { i32: size }],
    [3, { i32: size }],
    [
      5,
      {
        struct: [
          [1, { i32: rows }],
          [2, { i32: plain }],
          [3, { i32: runs }],
          [4, { i32: runs }],
        ],
      },
    ],
  ]);
  return [joined([header, wordBytes(there.length), there]), cells];
}

function missingIn({ type, cells }: FileColumn): number {
  let missing = 0;
  if (type === 'text') for (let i = 0; i < cells.length; i++) missing += cells[i] === null ? 1 : 0;
  else for (let i = 0; i < cells.length; i++) missing += Number.isNaN(cells[i]) ? 1 : 0;
  return missing;
}

/** Cells that are there (1) or missing (0). */
function runOf(rows: number, there: boolean): Uint8Array {
  const bytes: number[] = [];
  if (rows > 0) {
    writeVarint(bytes, rows * 2);
    bytes.push(there ? 1 : 0);
  }
  return Uint8Array.from(bytes);
}

function presenceOf(column: FileColumn, rows: number): Uint8Array {
  const pieces: Uint8Array[] = [];
  for (let from = 0; from < rows;) {
    const there = isThere(column, from);
    let to = from + 1;
    while (to < rows && isThere(column, to) === there) to++;
    pieces.push(runOf(to - from, there));
    from = to;
  }
  return joined(pieces);
}

function isThere(column: FileColumn, row: number): boolean {
  return column.type === 'text' ? column.cells[row] !== null : !Number.isNaN(column.cells[row]);
}

/** The lowest byte of a number comes first, as in the memory of nearly every machine. */
const asInMemory = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1;

function cellBytes(column: FileColumn, missing: number): Uint8Array<ArrayBuffer> {
  if (column.type === 'text') return textBytes(column.cells);
  const { type, cells } = column;
  if (asInMemory && missing === 0) {
    const own = type === 'integer' ? new Int32Array(cells) : cells;
    return new Uint8Array(own.buffer, own.byteOffset, own.byteLength);
  }
  const bytes = new Uint8Array((cells.length - missing) * (type === 'integer' ? 4 : 8));
  const view = new DataView(bytes.buffer);
  let at = 0;
  for (const cell of cells) {
    if (Number.isNaN(cell)) continue;
    if (type === 'integer') view.setInt32(at, cell, true);
    else view.setFloat64(at, cell, true);
    at += type === 'integer' ? 4 : 8;
  }
  return bytes;
}

function textBytes(cells: readonly (string | null)[]): Uint8Array<ArrayBuffer> {
  const encoder = new TextEncoder();
  return joined(
    cells.flatMap((cell) => {
      if (cell === null) return [];
      const text = encoder.encode(cell);
      return [wordBytes(text.length), text];
    }),
  );
}

/** 32 bits, the lowest byte first. */
function wordBytes(value: number): Uint8Array {
  const bytes = new Uint8Array(4);
  new DataView(bytes.buffer).setUint32(0, value, true);
  return bytes;
}

function joined(pieces: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const bytes = new Uint8Array(pieces.reduce((sum, piece) => sum + piece.length, 0));
  let at = 0;
  for (const piece of pieces) {
    bytes.set(piece, at);
    at += piece.length;
  }
  return bytes;
}
